'use client';

import { Button } from '@/components/ui/button';
import type { Installation } from '@/diagram/document/schema';
import type { Figures } from '@/diagram/rehearsal/figures';
import type { Rehearsed } from '@/diagram/rehearsal/rehearse';
import { CONDITION_MEANS } from '@/diagram/rehearsal/say-change';
import { settingWord } from '@/diagram/rehearsal/settings';
import { ampText, partName, partNames, timeText } from '@/diagram/rehearsal/words';
import { useRehearsalStore } from './state';

interface HomeNowProps {
  document: Installation;
  answer: Rehearsed;
  figures: Figures;
}

/** What feeds what, in words: the same facts as on the sheet. */
export function HomeNow({ document, answer, figures }: HomeNowProps) {
  const store = useRehearsalStore();
  const parts = new Map(document.parts.map((part) => [part.id, part]));
  const all = (ids: readonly string[]) =>
    partNames(
      document,
      ids.flatMap((id) => parts.get(id) ?? []),
    );
  const loads = Object.entries(figures.parts).flatMap(([id, now]) =>
    now.load ? [{ id, now, works: now.load.works }] : [],
  );
  const dark = loads.filter(({ now }) => now.state === 'dead').map(({ id }) => id);
  const moved = Object.entries(answer.stance.moved).filter(([id]) => parts.has(id));
  return (
    <div className="flex flex-col gap-4">
      <p className="text-grey">{CONDITION_MEANS[answer.condition]}</p>
      <ul className="flex flex-col gap-2">
        {Object.entries(figures.sources).map(([id, amps]) => {
          const working = loads.filter(({ now, works }) => works && now.from[0] === id);
          const battery = answer.onBattery.includes(id);
          return (
            <li key={id} className="border-l-2 border-ink pl-[18px]">
              <b>
                {battery ? 'Battery' : 'Mains'}: {all([id])} gives {ampText(amps)}
              </b>
              <span className="block">
                {working.length > 0 ? `At work: ${all(working.map((each) => each.id))}.` : 'Nothing works on it.'}
              </span>
            </li>
          );
        })}
        {Object.keys(figures.sources).length === 0 && (
          <li className="border-l-2 border-ink pl-[18px] font-bold">No source drives anything.</li>
        )}
        {dark.length > 0 && (
          <li className="border-l-2 border-dashed border-grey pl-[18px]">
            <b>Dead, 0 V</b>
            <span className="block">{all(dark)}.</span>
          </li>
        )}
      </ul>
      {answer.unheld.map(({ part, amps, astrayAmps, latestS }) => {
        const device = parts.get(part);
        if (!device) return null;
        const name = partName(document, device);
        return (
          <div key={part} className="border-l-2 border-red pl-[18px]">
            <p>
              <b className="text-red">{name} will not stay closed.</b>{' '}
              {astrayAmps > amps / 2 || astrayAmps > 0.01
                ? `${ampText(astrayAmps)} runs astray`
                : `${ampText(amps)} runs through it`}
              : it opens within {timeText(latestS)}.
            </p>
            <Button className="mt-1" onClick={() => store.getState().operate(part, 'open')}>
              Let it open
            </Button>
          </div>
        );
      })}
      {(moved.length > 0 || answer.stance.supply === 'dead') && (
        <div>
          <p className="text-grey">
            Put by hand:{' '}
            {[
              ...(answer.stance.supply === 'dead' ? ['the supply dead'] : []),
              ...moved.map(
                ([id, setting]) => `${partName(document, parts.get(id)!)} ${settingWord(parts.get(id)!, setting)}`,
              ),
            ].join(', ')}
            .
          </p>
          <Button className="mt-1" onClick={() => store.getState().putBack()}>
            All as drawn
          </Button>
        </div>
      )}
    </div>
  );
}
