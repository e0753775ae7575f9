import Link from 'next/link';
import { TabWords } from './tab-words';
import type { Tab } from './types';

/** The sheets of the set, as tabs on the paper's upper edge. */
export function SheetTabs({ tabs, current }: { tabs: readonly Tab[]; current: string }) {
  return (
    <nav aria-label="Sheets of the set" className="hidden self-end lap:block">
      <ul className="flex items-end gap-1">
        {tabs.map((tab) => {
          const open = tab.id === current;
          return (
            <li key={tab.id} className={tab.apart ? 'mr-2' : ''}>
              <Link
                href={tab.href}
                prefetch={false}
                aria-current={open ? 'page' : undefined}
                className={`relative block border border-b-0 border-rule px-2 pt-[3px] pb-1 text-small text-ink no-underline ${
                  open ? 'z-10 -mb-px bg-paper pb-[5px] font-bold' : 'bg-behind hover:bg-paper'
                }`}
              >
                <TabWords tab={tab} />
              </Link>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
