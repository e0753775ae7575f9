'use client';

import { useMemo, useState } from 'react';
import { KIND_NAME } from '@/diagram/document/kinds';
import { byDesignation } from '@/diagram/document/names';
import type { Installation } from '@/diagram/document/schema';
import type { Figures } from '@/diagram/rehearsal/figures';
import type { Rehearsed } from '@/diagram/rehearsal/rehearse';
import { nextSetting, settingsOf, settingWord } from '@/diagram/rehearsal/settings';
import { ampText, partName, voltText } from '@/diagram/rehearsal/words';
import { useRehearsalStore } from './state';

interface DeviceListProps {
  document: Installation;
  answer: Rehearsed;
  figures: Figures;
  opened: readonly string[];
}

/** Every switch, device and load as a list: the whole rehearsal without the drawing. */
export function DeviceList({ document, answer, figures, opened }: DeviceListProps) {
  const store = useRehearsalStore();
  // A large home has hundreds: they are drawn when somebody looks.
  const [devicesOpen, setDevicesOpen] = useState(false);
  const [loadsOpen, setLoadsOpen] = useState(false);
  const sorted = useMemo(() => [...document.parts].sort(byDesignation), [document]);
  const devices = useMemo(() => sorted.filter((part) => settingsOf(part).length > 0), [sorted]);
  const loads = sorted.filter(({ id }) => figures.parts[id]?.load);
  const word = 'cursor-pointer text-left underline underline-offset-2 pointer-coarse:min-h-11';
  return (
    <div className="flex flex-col gap-2">
      <details onToggle={(event) => setDevicesOpen(event.currentTarget.open)}>
        <summary className="cursor-pointer text-grey">{devices.length} switches and devices</summary>
        <ul className="mt-1 flex flex-col gap-1">
          {(devicesOpen ? devices : []).map((part) => {
            const setting = answer.settings[part.id]!;
            const name = partName(document, part);
            const stands = opened.includes(part.id) ? 'tripped' : settingWord(part, setting);
            return (
              <li key={part.id} className="flex justify-between gap-2">
                <button type="button" className={word} onClick={() => store.getState().take(part.id)}>
                  {name} <span className="text-grey">{part.ref ? KIND_NAME[part.kind] : ''}</span>
                </button>
                <button
                  type="button"
                  className={`${word} font-bold`}
                  aria-label={`${name} is ${stands}: turn it`}
                  onClick={() => store.getState().operate(part.id, nextSetting(part, setting))}
                >
                  {stands}
                </button>
              </li>
            );
          })}
        </ul>
      </details>
      <details onToggle={(event) => setLoadsOpen(event.currentTarget.open)}>
        <summary className="cursor-pointer text-grey">{loads.length} loads and outlets</summary>
        <table className="mt-1 w-full text-left">
          <thead>
            <tr className="text-grey">
              <th scope="col" className="font-normal">
                load
              </th>
              <th scope="col" className="text-right font-normal">
                volts
              </th>
              <th scope="col" className="text-right font-normal">
                amperes
              </th>
            </tr>
          </thead>
          <tbody>
            {(loadsOpen ? loads : []).map((part) => {
              const { load } = figures.parts[part.id]!;
              return (
                <tr key={part.id}>
                  <th scope="row" className="font-normal">
                    <button type="button" className={word} onClick={() => store.getState().take(part.id)}>
                      {partName(document, part)}
                    </button>
                  </th>
                  <td className="text-right whitespace-nowrap">{voltText(load!.volts)}</td>
                  <td className="text-right whitespace-nowrap">{ampText(load!.amps)}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </details>
    </div>
  );
}
