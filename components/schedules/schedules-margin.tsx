'use client';

import Link from 'next/link';
import { useStore } from 'zustand';
import { ConflictPanel } from '@/components/sheet/conflict-panel';
import { keyOf } from '@/components/sheet/margin/notes';
import { keepAsFile } from '@/components/sheet/save-state-view';
import { useSheet, type Me, type OpenDrawing } from '@/components/sheet/use-drawing';
import { Button, WordButton } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import { focusCell } from '@/components/grid/focus';
import type { Installation } from '@/diagram/document/schema';
import { findingsOf } from '@/diagram/schedules/row-findings';
import { TABLES_OF } from '@/diagram/schedules/types';
import type { Worked } from '@/diagram/schedules/work-out';
import { HEAD, rowKey, type Desk } from './desk';
import { RowNotes } from './row-notes';
import type { WorkedState } from './use-worked';

interface SchedulesMarginProps {
  desk: Desk;
  drawing: OpenDrawing;
  state: WorkedState;
  document: Installation;
  me: Me;
  jobId: string;
  mayEdit: boolean;
}

const count = (n: number, one: string): string => `${n} ${one}${n === 1 ? '' : 's'}`;

/** What the last change did to the findings: how many are new, how many are gone. */
function SinceChange({ desk, worked }: { desk: Desk; worked: Worked }) {
  const since = useStore(desk, (state) => state.since);
  if (!since) return null;
  const now = new Set(worked.findings.map(keyOf));
  const fresh = [...now].filter((key) => !since.before.has(key)).length;
  const gone = [...since.before].filter((key) => !now.has(key)).length;
  const words = [fresh > 0 && `${count(fresh, 'new finding')}`, gone > 0 && `${count(gone, 'finding')} gone`]
    .filter(Boolean)
    .join(', ');
  return (
    <p role="status">
      <b>{words || 'No finding came or went'}</b> <span className="text-grey">since {since.label}</span>
    </p>
  );
}

/** Texts that could not be read, each with its cell. */
function RefusedNotes({ desk }: { desk: Desk }) {
  const refused = useStore(desk, (state) => state.refused);
  return [...refused.values()].map((entry) => {
    const { table, row, column, text, message } = entry;
    const name = rowKey(table, row);
    return (
      <div key={`${name}:${column}`} id={`refused-${name}-${column}`.replace(/[^\w-]/g, '-')}>
        <Note
          tone="finding"
          heading={message}
          actions={
            <>
              <Button onClick={() => desk.getState().takeBack(entry)}>Take it back</Button>
              <Button onClick={() => focusCell(name, column)}>Go to the cell</Button>
            </>
          }
        >
          &ldquo;{text}&rdquo; stays in its cell, the drawing keeps the value before.
        </Note>
      </div>
    );
  });
}

const GRAVE = { danger: 0, defect: 1, advice: 2 } as const;

/** What else is found, the gravest first: each with the row that it is about, or with the sheet where there is none. */
function Elsewhere({ desk, worked, jobId }: { desk: Desk; worked: Worked; jobId: string }) {
  const schedule = useStore(desk, (state) => state.schedule);
  const hand = useStore(desk, (state) => state.hand);
  const rows = TABLES_OF[schedule].flatMap((id) =>
    worked.tables[id].rows.map((row) => ({
      id,
      row,
      inHand: hand?.table === id && hand.row === row.id,
      found: new Set(findingsOf(row, worked.findings)),
    })),
  );
  const others = worked.findings
    .filter((finding) => !rows.some(({ inHand, found }) => inHand && found.has(finding)))
    .sort((a, b) => GRAVE[a.severity] - GRAVE[b.severity]);
  if (others.length === 0) return null;
  return (
    <section className="border-t border-rule pt-4">
      <h2 className="text-head font-bold">{others.length < worked.findings.length ? 'Elsewhere' : 'Where'}</h2>
      <ul className="mt-1 flex flex-col gap-2">
        {others.slice(0, 12).map((finding) => {
          const at = rows.find(({ found }) => found.has(finding));
          return (
            <li key={keyOf(finding)}>
              {at ? (
                <WordButton onClick={() => focusCell(rowKey(at.id, at.row.id), HEAD)}>{at.row.name}</WordButton>
              ) : (
                <Link className="underline underline-offset-[3px]" href={`/jobs/${jobId}/overview`}>
                  On sheet 2
                </Link>
              )}{' '}
              <span className={finding.severity === 'advice' ? '' : 'text-red'}>{finding.heading}</span>{' '}
              <span className="text-grey">{finding.severity}</span>
            </li>
          );
        })}
      </ul>
      {others.length > 12 && <p className="text-grey">{others.length - 12} more on sheet 2</p>}
    </section>
  );
}

/** What is to be answered on the schedules: what could not be read, the row in hand, what else is found. */
export function SchedulesMargin({ desk, drawing, state, document, me, jobId, mayEdit }: SchedulesMarginProps) {
  const news = useSheet(drawing.store, (current) => current.news);
  const { worked, failure, again } = state;
  if (failure)
    return (
      <Note
        tone="finding"
        heading="This sheet could not be read. Nothing is lost."
        actions={
          <>
            <Button onClick={again}>Try again</Button>
            <Button onClick={() => keepAsFile(drawing)}>Get the file</Button>
          </>
        }
      >
        {failure}
      </Note>
    );
  if (!worked) return <p className="text-grey">Being worked out.</p>;
  return (
    <div className="flex flex-col gap-5" aria-busy={state.stale}>
      <ConflictPanel drawing={drawing} me={me} />
      {news && (
        <p className="border-l-2 border-blue pl-3 text-blue">
          {news.person.initials} a moment ago: {news.label}{' '}
          <WordButton onClick={() => drawing.store.setState({ news: null })}>Seen</WordButton>
        </p>
      )}
      <h2 className="text-head font-bold">
        {worked.findings.length === 0 ? 'No finding' : count(worked.findings.length, 'finding')}
      </h2>
      <SinceChange desk={desk} worked={worked} />
      <RefusedNotes desk={desk} />
      <RowNotes desk={desk} worked={worked} document={document} jobId={jobId} mayEdit={mayEdit} />
      <Elsewhere desk={desk} worked={worked} jobId={jobId} />
    </div>
  );
}
