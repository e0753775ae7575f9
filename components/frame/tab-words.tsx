'use client';

import { useLinkStatus } from 'next/link';
import type { Tab } from './types';

export const tabName = (tab: Tab): string => (tab.number === undefined ? tab.label : `${tab.number} ${tab.label}`);

/** The name of a sheet inside its link: a line below it grows while the sheet is fetched, where that takes a moment. */
export function TabWords({ tab }: { tab: Tab }) {
  const { pending } = useLinkStatus();
  return (
    <span className="relative">
      {tabName(tab)}
      {pending && <span aria-hidden="true" className="absolute inset-x-0 -bottom-1 h-[2px] origin-left animate-opening bg-ink" />}
      <span role="status" className="sr-only">
        {pending && 'opening'}
      </span>
    </span>
  );
}
