'use client';

import { useMemo } from 'react';
import { Segmented } from '@/components/ui/segmented';
import type { Installation } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import { useView, useViewStore, type Condition } from '../view';
import { placesOf } from './notes';

const CONDITIONS: readonly { value: Condition; label: string }[] = [
  { value: 'all', label: 'all' },
  { value: 'mains', label: 'mains' },
  { value: 'outage', label: 'outage' },
  { value: 'main-off', label: 'off' },
];
const SEVERITIES = ['danger', 'defect', 'advice'] as const;

interface FilterProps {
  open: readonly Finding[];
  document: Installation;
  /** the home has a source that stays on: conditions differ */
  backup: boolean;
}

/** Which findings stand in the margin: by condition, by severity, by room. */
export function Filter({ open, document, backup }: FilterProps) {
  const view = useViewStore();
  const condition = useView((state) => state.condition);
  const severities = useView((state) => state.severities);
  const room = useView((state) => state.room);
  const { set } = view.getState();
  const rooms = useMemo(() => {
    const counts = new Map<string, number>();
    for (const finding of open) for (const place of placesOf(document, finding)) counts.set(place, (counts.get(place) ?? 0) + 1);
    return document.places.filter(({ id }) => counts.has(id) || id === room).map(({ id, name }) => ({ id, name, count: counts.get(id) ?? 0 }));
  }, [open, document, room]);
  const toggle = (severity: Finding['severity']) => {
    const next = new Set(severities);
    if (!next.delete(severity)) next.add(severity);
    set({ severities: next });
  };
  return (
    <>
      {backup && (
        <Segmented
          label="True in"
          showLabel
          segments={CONDITIONS}
          value={condition}
          onChange={(value) => set({ condition: value })}
        />
      )}
      {open.length > 0 && (
        <div className="flex flex-wrap gap-x-4" role="group" aria-label="Severities shown">
          {SEVERITIES.map((severity) => (
            <label key={severity} className="flex items-center gap-2 pointer-coarse:min-h-11">
              <input
                type="checkbox"
                className="accent-ink"
                checked={severities.has(severity)}
                onChange={() => toggle(severity)}
              />
              {severity} {open.filter((finding) => finding.severity === severity).length}
            </label>
          ))}
        </div>
      )}
      {rooms.length > 0 && (
        <label className="flex items-center gap-2">
          <span className="text-grey">In</span>
          <select
            value={room ?? ''}
            onChange={(event) => set({ room: event.target.value || null })}
            className="min-w-0 flex-1 border-b border-ink bg-paper py-[2px] pointer-coarse:min-h-11"
          >
            <option value="">every room</option>
            {rooms.map(({ id, name, count }) => (
              <option key={id} value={id}>
                {name} {count}
              </option>
            ))}
          </select>
        </label>
      )}
    </>
  );
}
