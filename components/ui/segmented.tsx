'use client';

import { useId } from 'react';

export interface Segment<T extends string> {
  value: T;
  label: string;
}

interface SegmentedProps<T extends string> {
  /** read to a screen reader; printed before the segments when `showLabel` is set */
  label: string;
  showLabel?: boolean;
  segments: readonly Segment<T>[];
  value: T;
  onChange(value: T): void;
}

/** A row of switches of which one is on: radio buttons underneath, so that arrows choose. */
export function Segmented<T extends string>({ label, showLabel = false, segments, value, onChange }: SegmentedProps<T>) {
  const name = useId();
  return (
    <fieldset className="flex flex-wrap items-center gap-3">
      <legend className={showLabel ? 'float-left mr-3 text-grey' : 'sr-only'}>{label}</legend>
      <div className="flex flex-wrap">
        {segments.map((segment) => (
          <label
            key={segment.value}
            className="-ml-px flex min-h-6 cursor-pointer items-center border border-ink bg-paper px-2 py-[3px] first:ml-0 has-checked:bg-ink has-checked:font-semibold has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-blue pointer-coarse:min-h-11"
          >
            <input
              type="radio"
              className="sr-only"
              name={name}
              value={segment.value}
              checked={segment.value === value}
              onChange={() => onChange(segment.value)}
            />
            {segment.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
