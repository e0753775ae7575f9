'use client';

import Link from 'next/link';
import { useEffect, useId, useRef, useState } from 'react';
import { TabWords, tabName } from './tab-words';
import type { Tab } from './types';

/** On a narrow screen the open sheet's name opens the set. */
export function SheetPicker({ tabs, current, sheet }: { tabs: readonly Tab[]; current: string; sheet: string }) {
  const [open, setOpen] = useState(false);
  const id = useId();
  const box = useRef<HTMLDivElement>(null);
  const here = tabs.find((tab) => tab.id === current);

  useEffect(() => {
    if (!open) return;
    const close = (event: Event) => {
      if (event instanceof KeyboardEvent ? event.key === 'Escape' : !box.current?.contains(event.target as Node)) setOpen(false);
    };
    window.addEventListener('keydown', close);
    window.addEventListener('pointerdown', close);
    return () => {
      window.removeEventListener('keydown', close);
      window.removeEventListener('pointerdown', close);
    };
  }, [open]);

  return (
    <div ref={box} className="relative lap:hidden">
      <button
        type="button"
        aria-expanded={open}
        aria-controls={id}
        className="flex min-h-11 cursor-pointer items-center gap-2 border border-ink bg-paper px-3 text-ink"
        onClick={() => setOpen(!open)}
      >
        <b className="whitespace-nowrap">{here ? tabName(here) : 'Sheets'}</b>
        {here?.number !== undefined && <span className="whitespace-nowrap text-grey max-sm:hidden">sheet {sheet}</span>}
        <span aria-hidden="true">↓</span>
      </button>
      <ul id={id} hidden={!open} className="absolute top-full left-0 z-30 min-w-52 border border-ink bg-paper py-1">
        {tabs.map((tab) => (
          <li key={tab.id} className={tab.apart ? 'border-b border-hair' : ''}>
            <Link
              href={tab.href}
              prefetch={false}
              aria-current={tab.id === current ? 'page' : undefined}
              className={`flex min-h-11 items-center px-3 text-ink no-underline ${tab.id === current ? 'bg-row font-bold' : ''}`}
              onClick={() => tab.id === current && setOpen(false)}
            >
              <TabWords tab={tab} />
            </Link>
          </li>
        ))}
      </ul>
    </div>
  );
}
