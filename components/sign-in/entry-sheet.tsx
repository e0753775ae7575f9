import type { ReactNode } from 'react';
import { Paper } from '@/components/frame/paper';
import { Cautions } from './cautions';
import { TwoSources } from './two-sources';

interface EntrySheetProps {
  /** "0 Sign in" */
  sheet: string;
  state: string;
  children: ReactNode;
}

const cell = 'min-w-0 border-r border-ink px-4 py-2 last:border-r-0';

function Head({ name, children }: { name: string; children: string }) {
  return (
    <div className={cell}>
      <dt className="text-small text-grey">{name}</dt>
      <dd className="truncate text-[14px] leading-5">{children}</dd>
    </div>
  );
}

/** The sheet before one is signed in: a home with two sources, and the title block grown to a form. */
export function EntrySheet({ sheet, state, children }: EntrySheetProps) {
  return (
    <div className="flex min-h-dvh flex-col p-1 sm:p-4">
      <Paper>
        <main className="flex min-h-0 flex-1 flex-col lap:flex-row">
          <div className="border-b border-ink lap:flex lap:min-w-0 lap:flex-1 lap:items-center lap:justify-center lap:border-b-0 lap:p-6">
            <TwoSources className="h-40 w-full lap:h-auto lap:max-h-[calc(100dvh-112px)] lap:w-full lap:max-w-[800px]" />
          </div>
          <div className="flex flex-col lap:w-[562px] lap:shrink-0">
            <div className="flex-1 px-4 py-6 lap:px-0 lap:pt-10">
              <h1 className="text-[32px] leading-10 tracking-[-0.02em] lap:text-[48px] lap:leading-[56px]">Ohmstead</h1>
              <p className="mt-3 max-w-[480px] text-[14px] leading-[22px] lap:mt-4 lap:text-[16px] lap:leading-6">
                Draw a home from the service line to the last lamp, both sources. Have it read, prove it by test, leave the file with the
                house.
              </p>
            </div>
            <div className="border-t-[1.6px] border-ink lap:border-l-[1.6px]">
              <dl className="grid grid-cols-[minmax(0,1fr)_96px_120px] border-b border-ink sm:grid-cols-[minmax(0,1fr)_160px_160px]">
                <Head name="Sheet">{sheet}</Head>
                <Head name="Revision">-</Head>
                <Head name="State">{state}</Head>
              </dl>
              {children}
              <Cautions />
            </div>
          </div>
        </main>
      </Paper>
    </div>
  );
}
