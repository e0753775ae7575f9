'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useEffect, useState, type ReactNode } from 'react';
import type { PracticeId, Supply } from '@/diagram/document/schema';
import type { TitleBlock } from '@/lib/shared/drawings';
import { Button } from '@/components/ui/button';
import { KeysHelp } from './keys-help';
import { rememberSheet } from './last-sheet';
import { Margin } from './margin';
import { Paper } from './paper';
import { SheetPicker } from './sheet-picker';
import { SheetTabs } from './sheet-tabs';
import { useSingleKeys } from './single-keys';
import { TitleBlockPanel } from './title-block';
import type { KeyHelp, Tab } from './types';

export interface SheetFrameProps {
  tabs: readonly Tab[];
  /** id of the open tab */
  current: string;
  /** "Saved 14:02" */
  saveState?: ReactNode;
  /** initials of the person at work */
  who: string;
  /** what kind of sheet this is: "Overview, single line" */
  kind: string;
  titleBlock: TitleBlock;
  practice?: { id: PracticeId; supply: Supply };
  stillLive?: string;
  foot?: ReactNode;
  /** what it holds; a function is given what shuts it where it is a drawer */
  margin?: ReactNode | ((shut: () => void) => ReactNode);
  /** what the margin holds, in words: "3 findings, 1 remark"; on a narrow screen it is the button that opens it */
  marginLabel?: string;
  narrowMargin?: 'above' | 'drawer';
  /** actions in the bar of a narrow screen: undo, redo */
  tools?: ReactNode;
  /** a strip over the whole width below the head: offline, reading only */
  strip?: ReactNode;
  keys?: readonly KeyHelp[];
  /** the list behind `?`, where the sheet opens it by a command as well; else the frame keeps it */
  help?: { open: boolean; set(open: boolean): void };
  /** the first stop of the keyboard: a shorter way into the sheet; `word` names it in the head, with its key */
  skip?: { label: string; word: string; go(): void };
  /** the sheet has a field marked `data-find`, which `/` goes to */
  find?: boolean;
  /** screen: the sheet never grows beyond the window, as a canvas wants it; page: it may, on a narrow screen */
  fit?: 'screen' | 'page';
  children: ReactNode;
}

const JOB_SHEET = /^\/jobs\/([^/]+)\/(?:survey|overview|connections|schedules|rehearsal)$/;

const find = () => document.querySelector<HTMLElement>('[data-find]')?.focus();

/** One sheet of the set: desk, tabs, paper with grid and border, margin, foot and title block. */
export function SheetFrame(props: SheetFrameProps) {
  const { tabs, current, who, margin, marginLabel = 'In the margin', narrowMargin = 'drawer', fit = 'page' } = props;
  const [marginOpen, setMarginOpen] = useState(false);
  const [ownHelp, setOwnHelp] = useState(false);
  const { open: helpOpen, set: setHelpOpen } = props.help ?? { open: ownHelp, set: setOwnHelp };
  const router = useRouter();
  const numbered = tabs.filter((tab) => tab.number !== undefined);
  const here = tabs.find((tab) => tab.id === current);
  const sheet = here?.number === undefined ? '-' : `${here.number} / ${numbered.length}`;

  const jobId = here?.href.match(JOB_SHEET)?.[1];
  useEffect(() => {
    if (jobId) rememberSheet(jobId, current);
  }, [jobId, current]);

  useSingleKeys({
    ...Object.fromEntries(numbered.map((tab) => [String(tab.number), () => router.push(tab.href)])),
    ...(props.find && { '/': find }),
    '?': () => setHelpOpen(true),
  });

  const common: KeyHelp[] = [
    ...(numbered.length > 0 ? [{ keys: numbered.map((tab) => String(tab.number)), does: 'turn to that sheet of the set' }] : []),
    ...(props.find ? [{ keys: ['/'], does: 'find' }] : []),
    { keys: ['?'], does: 'this list' },
  ];

  const height = fit === 'screen' ? 'h-dvh' : 'min-h-dvh lap:h-dvh print:h-auto!';
  return (
    <div className={`flex flex-col p-1 sm:px-2 sm:pb-2 ${height}`}>
      {props.skip && (
        <button
          type="button"
          className="sr-only z-40 border-2 border-ink bg-paper px-3 py-2 focus:not-sr-only focus:absolute focus:top-1 focus:left-1"
          onClick={props.skip.go}
        >
          {props.skip.label}
        </button>
      )}
      <header className="flex min-h-12 print:hidden items-center gap-2 max-lap:pr-1 lap:h-8 lap:min-h-0 lap:items-end lap:px-4">
        <SheetPicker tabs={tabs} current={current} sheet={sheet} />
        <SheetTabs tabs={tabs} current={current} />
        {props.tools && <div className="flex gap-2 lap:hidden">{props.tools}</div>}
        {margin && narrowMargin === 'drawer' && (
          <Button className="min-h-11 lap:hidden" aria-expanded={marginOpen} onClick={() => setMarginOpen(true)}>
            {marginLabel}
          </Button>
        )}
        <div className="ml-auto flex flex-wrap items-center justify-end gap-x-4 text-small lap:mb-1">
          {props.saveState}
          <Link href="/account" prefetch={false} aria-label={`${who}, your account`} className="text-ink no-underline hover:underline">
            {who}
          </Link>
          {props.find && (
            <button type="button" className="cursor-pointer hover:underline max-sm:hidden" onClick={find}>
              find /
            </button>
          )}
          {props.skip && (
            <button type="button" className="cursor-pointer hover:underline max-lap:hidden" onClick={props.skip.go}>
              {props.skip.word}
            </button>
          )}
          <button type="button" className="cursor-pointer hover:underline max-sm:hidden" onClick={() => setHelpOpen(true)}>
            keys ?
          </button>
        </div>
      </header>
      <Paper>
        {props.strip}
        <div className="flex min-h-0 flex-1 flex-col lap:flex-row">
          <main className={`relative min-h-0 min-w-0 flex-1 ${fit === 'screen' ? 'overflow-hidden' : 'lap:overflow-auto print:overflow-visible!'}`}>{props.children}</main>
          {margin && (
            <Margin label={marginLabel} narrow={narrowMargin} open={marginOpen} onClose={() => setMarginOpen(false)}>
              {typeof margin === 'function' ? margin(() => setMarginOpen(false)) : margin}
            </Margin>
          )}
        </div>
        <footer className="flex flex-col border-t-[1.6px] border-ink wide:min-h-[72px] wide:flex-row">
          <div className="min-w-0 flex-1 px-4 py-2 max-wide:border-b max-wide:border-ink max-wide:empty:hidden">{props.foot}</div>
          <TitleBlockPanel kind={props.kind} block={props.titleBlock} sheet={sheet} practice={props.practice} stillLive={props.stillLive} />
        </footer>
      </Paper>
      {helpOpen && <KeysHelp keys={[...(props.keys ?? []), ...common]} onClose={() => setHelpOpen(false)} />}
    </div>
  );
}
