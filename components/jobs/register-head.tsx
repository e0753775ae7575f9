'use client';

import { useEffect, useRef } from 'react';
import { Key } from '@/components/ui/key';
import { Segmented } from '@/components/ui/segmented';
import type { JobQuery } from '@/lib/shared/jobs';

interface RegisterHeadProps {
  team: string;
  all: number;
  found: number;
  /** the rows are narrowed by a search or a filter */
  narrowed: boolean;
  filter: JobQuery['filter'];
  counts: { mine: number; due: number };
  typed: string;
  onType(text: string): void;
  onFilter(filter: JobQuery['filter']): void;
}

const jobs = (count: number) => `${count} ${count === 1 ? 'job' : 'jobs'}`;

/** Title, search and filter of the register. */
export function RegisterHead(props: RegisterHeadProps) {
  const { team, all, found, narrowed, filter, counts, typed, onType, onFilter } = props;
  const search = useRef<HTMLInputElement>(null);
  useEffect(() => {
    // Typed before the page came alive: the browser has it, the register does not know yet.
    const early = search.current?.value ?? '';
    if (early !== typed) onType(early);
    // Once, when the page comes alive.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, []);
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
      <div className="shrink-0">
        <h1 className="text-title font-bold">Register of drawings</h1>
        <p className="mt-1 text-grey" role="status">
          {team}, {jobs(all)}
          {narrowed && `, ${found} found`}
        </p>
      </div>
      <label className="flex h-8 min-w-56 flex-1 basis-64 items-center gap-2 border-b-2 border-ink focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-blue lap:max-w-[352px] pointer-coarse:h-11">
        <Key>/</Key>
        <span className="sr-only">Find a job by number, place or client</span>
        <input
          ref={search}
          data-find
          type="search"
          value={typed}
          placeholder="number, place, client"
          className="h-full min-w-0 flex-1 bg-transparent px-1 outline-none placeholder:text-grey"
          onChange={(event) => onType(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'ArrowDown') document.querySelector<HTMLElement>('[data-job][tabindex="0"]')?.focus();
          }}
        />
      </label>
      <Segmented
        label="Which jobs"
        value={filter}
        segments={[
          { value: 'all', label: 'All' },
          { value: 'mine', label: `Waits for me ${counts.mine}` },
          { value: 'due', label: `Due this week ${counts.due}` },
          { value: 'archived', label: 'Archived' },
        ]}
        onChange={onFilter}
      />
    </header>
  );
}
