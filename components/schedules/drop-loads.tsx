'use client';

import { useMemo, useState } from 'react';
import { newUuid } from '@/components/sheet/identity';
import type { DrawingStore } from '@/components/sheet/store';
import { Button } from '@/components/ui/button';
import { moveLoad, waysFor } from '@/diagram/commands/move-load';
import { isRefusal } from '@/diagram/commands/types';
import type { Installation } from '@/diagram/document/schema';
import { findWays } from '@/diagram/terminals/ways';
import { hoursWithout, type BackupPlot } from '@/diagram/schedules/backup-plot';
import { hoursText } from '@/diagram/schedules/figure';
import type { Desk } from './desk';

interface DropLoadsProps {
  plot: BackupPlot;
  off: ReadonlySet<string>;
  onOff(off: ReadonlySet<string>): void;
  desk: Desk;
  drawing: DrawingStore;
  document: Installation;
  mayEdit: boolean;
}

/** Mains ways that the loads could be fed by; one that serves the same room already stands first. */
function mainsWays(document: Installation, ids: readonly string[]) {
  const [first] = ids;
  if (first === undefined) return [];
  const place = document.parts.find(({ id }) => id === first)?.place;
  const near = new Set(
    findWays(document)
      .filter(({ places }) => place && places.includes(place))
      .map(({ device }) => device),
  );
  const light = (words: string) => (/lamp|light/i.test(words) ? 0 : 1);
  return waysFor(document, first)
    .filter(({ backup }) => !backup)
    .sort((a, b) => Number(near.has(b.device)) - Number(near.has(a.device)) || light(a.words) - light(b.words));
}

/** "What if this were off?", load by load, and the command that takes it off for good. */
export function DropLoads({ plot, off, onOff, desk, drawing, document, mayEdit }: DropLoadsProps) {
  const [wanted, setWanted] = useState<string | null>(null);
  const ids = useMemo(() => plot.loads.map(({ id }) => id).filter((id) => off.has(id)), [plot, off]);
  const ways = useMemo(() => (mayEdit ? mainsWays(document, ids) : []), [document, ids, mayEdit]);
  const way = ways.find(({ device }) => device === wanted) ?? ways[0];
  const toggle = (id: string) => {
    const next = new Set(off);
    if (!next.delete(id)) next.add(id);
    onOff(next);
  };
  const takeOff = () => {
    if (!way) return;
    const outcome = moveLoad(document, ids, way.device, newUuid);
    if (isRefusal(outcome)) return drawing.getState().say(outcome.refused);
    if (desk.getState().run(outcome.label, outcome.patch)) onOff(new Set());
  };
  return (
    <fieldset className="mt-3 print:hidden">
      <legend className="font-semibold">What if it were off?</legend>
      <ul className="mt-1 grid gap-x-10 sm:grid-cols-2 lap:grid-cols-1">
        {plot.loads.map((load) => {
          const without = hoursWithout(plot, new Set([...off, load.id]));
          return (
            <li key={load.id}>
              <label className="flex min-h-6 items-center gap-2 pointer-coarse:min-h-11">
                <input
                  type="checkbox"
                  className="accent-ink"
                  checked={off.has(load.id)}
                  onChange={() => toggle(load.id)}
                />
                <span className="min-w-0 flex-1 truncate" title={`${load.name}, ${load.room}`}>
                  {load.name} <span className="text-grey">{load.room}</span>
                </span>
                <span className="tabular-nums">{Math.round(load.watts)} W</span>
                <span className="w-18 text-right text-grey tabular-nums">
                  {off.has(load.id) ? 'off' : hoursText(without.hours)}
                </span>
              </label>
            </li>
          );
        })}
      </ul>
      {ids.length > 0 && (
        <div className="mt-2 flex flex-wrap items-center gap-2">
          {way && (
            <>
              <Button tone="red" onClick={takeOff}>
                {ids.length === 1 ? 'Take it off the backup' : `Take the ${ids.length} off the backup`}
              </Button>
              <label className="flex items-center gap-2">
                <span className="text-grey">to</span>
                <select
                  value={way.device}
                  className="max-w-64 border-b border-ink bg-paper text-ink pointer-coarse:min-h-11"
                  onChange={(event) => setWanted(event.target.value)}
                >
                  {ways.map(({ device, words }) => (
                    <option key={device} value={device}>
                      {words}
                    </option>
                  ))}
                </select>
              </label>
            </>
          )}
          <Button onClick={() => onOff(new Set())}>All on again</Button>
        </div>
      )}
    </fieldset>
  );
}
