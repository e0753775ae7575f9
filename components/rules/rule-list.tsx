'use client';

import Link from 'next/link';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { Segmented } from '@/components/ui/segmented';
import { Stamp } from '@/components/ui/stamp';
import type { RuleMeta, Severity } from '@/diagram/rules/types';
import { GROUPS, GROUP_ORDER, GROUP_WORD, SEVERITIES, SEVERITY, opening, practiceWords } from './words';

const has = (meta: RuleMeta, search: string): boolean =>
  [meta.id, meta.title, meta.lesson, meta.remedy, GROUPS[meta.group], ...meta.clauses.map(({ document, clause }) => `${document} ${clause}`)]
    .join(' ')
    .toLowerCase()
    .includes(search.trim().toLowerCase());

function RuleRow({ meta }: { meta: RuleMeta }) {
  return (
    <li className="border-b border-hair">
      <Link
        href={`/rules/${meta.id}`}
        className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 gap-y-1 px-2 py-2 text-ink no-underline hover:bg-lane min-[900px]:grid-cols-[260px_minmax(0,1fr)_104px_80px]"
      >
        <span>
          <b>{meta.title}</b>
          <span className="block text-small text-grey">{meta.id}</span>
        </span>
        <span className="max-[900px]:col-span-2 max-[900px]:row-start-2">{opening(meta.lesson)}</span>
        <span className="text-small text-grey max-[900px]:hidden">{practiceWords(meta)}</span>
        <span className="text-right">
          <Stamp shape={SEVERITY[meta.severity].shape}>{meta.severity}</Stamp>
        </span>
      </Link>
    </li>
  );
}

/** All rules by group, to be searched and narrowed by severity. */
export function RuleList({ metas }: { metas: readonly RuleMeta[] }) {
  const [search, setSearch] = useState('');
  const [severity, setSeverity] = useState<Severity | 'all'>('all');
  const [group, setGroup] = useState<RuleMeta['group'] | 'all'>('all');
  const found = metas.filter(
    (meta) => (severity === 'all' || meta.severity === severity) && (group === 'all' || meta.group === group) && has(meta, search),
  );
  const count = (of: Severity) => metas.filter((meta) => meta.severity === of).length;

  return (
    <div className="px-4 pt-4 pb-6 lap:px-6">
      <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <div>
          <h1 className="text-title font-bold">Rules</h1>
          <p className="mt-1 text-grey" role="status">
            {metas.length} rules{found.length < metas.length && `, ${found.length} found`}
          </p>
        </div>
        <label className="flex h-8 min-w-56 flex-1 basis-64 items-center gap-2 border-b-2 border-ink focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-blue lap:max-w-[352px] pointer-coarse:h-11">
          <Key>/</Key>
          <span className="sr-only">Find a rule by its words or clause</span>
          <input
            data-find
            type="search"
            value={search}
            placeholder="words, clause"
            className="h-full min-w-0 flex-1 bg-transparent px-1 outline-none placeholder:text-grey"
            onChange={(event) => setSearch(event.target.value)}
          />
        </label>
        <Segmented<Severity | 'all'>
          label="Severity"
          value={severity}
          segments={[{ value: 'all', label: 'All' }, ...SEVERITIES.map((value) => ({ value, label: `${value} ${count(value)}` }))]}
          onChange={setSeverity}
        />
      </header>
      <div className="mt-3">
        <Segmented<RuleMeta['group'] | 'all'>
          label="Group"
          value={group}
          segments={[{ value: 'all', label: 'All groups' }, ...GROUP_ORDER.map((value) => ({ value, label: GROUP_WORD[value] }))]}
          onChange={setGroup}
        />
      </div>
      {GROUP_ORDER.map((id) => {
        const rows = found.filter((meta) => meta.group === id);
        if (rows.length === 0) return null;
        return (
          <section key={id} aria-labelledby={`group-${id}`} className="mt-6">
            <h2 id={`group-${id}`} className="border-b-2 border-ink px-2 pb-1 text-head font-bold">
              {GROUPS[id]}
            </h2>
            <ul>
              {rows.map((meta) => (
                <RuleRow key={meta.id} meta={meta} />
              ))}
            </ul>
          </section>
        );
      })}
      {found.length === 0 && (
        <div className="mt-10 flex flex-wrap items-center gap-4">
          <p className="text-[14px]">
            {search ? `No rule has "${search}" here.` : 'No rule of this group has that severity.'} {metas.length} rules in all.
          </p>
          <Button
            onClick={() => {
              setSearch('');
              setSeverity('all');
              setGroup('all');
            }}
          >
            Show all
          </Button>
        </div>
      )}
    </div>
  );
}
