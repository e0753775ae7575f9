'use client';

import Link from 'next/link';
import { useMemo, useState } from 'react';
import { useStore } from 'zustand';
import { Button, ButtonLink, buttonClass } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import { keyOf } from '@/components/sheet/margin/notes';
import { withPlaces } from '@/diagram/commands/place-new';
import type { Installation } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import { fieldText } from '@/diagram/schedules/edit';
import { amps } from '@/diagram/schedules/figure';
import type { Outcome } from '@/diagram/schedules/outcomes';
import { findingsOf } from '@/diagram/schedules/row-findings';
import { isTyped, type Row } from '@/diagram/schedules/types';
import type { Worked } from '@/diagram/schedules/work-out';
import { tableIn, type Desk } from './desk';
import { useRemedies } from './use-worked';

interface RowNotesProps {
  desk: Desk;
  worked: Worked;
  document: Installation;
  jobId: string;
  mayEdit: boolean;
}

const or = (value: number | null | undefined, digits: number): string =>
  value === null || value === undefined ? '-' : value.toFixed(digits);

/** What the way comes to as it is drawn and with each remedy: the figures that decide between them. */
function Outcomes({ now, remedies }: { now: Outcome; remedies: readonly { label: string; gives: Outcome | null }[] }) {
  const rows = [{ label: 'as drawn', gives: now }, ...remedies];
  return (
    <section className="border-t border-rule pt-4">
      <h3 className="text-head font-bold">What each remedy gives</h3>
      <table className="mt-1 w-full border-collapse [&_td]:py-1 [&_th]:py-1">
        <thead>
          <tr className="text-small text-grey">
            <th className="text-left font-normal">
              <span className="sr-only">Remedy</span>
            </th>
            {['In', 'Iz', 'drop', 'Zs'].map((name) => (
              <th key={name} scope="col" className="pl-2 text-right font-normal">
                {name}
              </th>
            ))}
          </tr>
        </thead>
        <tbody className="tabular-nums">
          {rows.map(({ label, gives }) => (
            <tr key={label}>
              <th scope="row" className="text-left align-top font-normal">
                {label}
              </th>
              <td className="pl-2 text-right align-top">{or(gives?.in, 0)}</td>
              <td
                className={`pl-2 text-right align-top ${gives?.iz && gives.in && gives.iz < gives.in ? 'font-bold text-red' : ''}`}
              >
                {gives?.iz ? amps(gives.iz) : '-'}
              </td>
              <td className="pl-2 text-right align-top">{or(gives?.dropPercent, 2)}</td>
              <td className="pl-2 text-right align-top">{or(gives?.zs, 2)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

const outcomeNow = (worked: Worked, way: string): Outcome => {
  const plot = worked.plots[way];
  const cells = worked.tables.ways.rows.find(({ id }) => id === way)?.cells ?? {};
  const value = (id: string) => {
    const cell = cells[id];
    return cell && !isTyped(cell) ? (cell.value ?? null) : null;
  };
  return { ib: value('ib'), in: plot?.inA ?? null, iz: value('iz'), dropPercent: value('drop'), zs: value('zs') };
};

/** Why a figure of the row is missing, each once. */
const lacksOf = (row: Row): string[] => [
  ...new Set(Object.values(row.cells).flatMap((cell) => (!isTyped(cell) && cell.lacks ? [cell.lacks] : []))),
];

/** The row in hand in the margin: its findings with their remedies and what each gives, and what it waits for. */
export function RowNotes({ desk, worked, document, jobId, mayEdit }: RowNotesProps) {
  const hand = useStore(desk, (state) => state.hand);
  const [chosen, setChosen] = useState<string | null>(null);
  const table = hand ? tableIn({ worked }, hand.table) : undefined;
  const row = table?.rows.find(({ id }) => id === hand?.row);
  const findings = useMemo(() => (row ? findingsOf(row, worked.findings) : []), [row, worked.findings]);
  const inHand: Finding | null = findings.find((finding) => keyOf(finding) === chosen) ?? findings[0] ?? null;
  const remedies = useRemedies(document, mayEdit ? inHand : null, row?.way ?? null);
  if (!row) return null;
  const lacks = lacksOf(row);
  const given = remedies?.filter(({ gives }) => gives !== null) ?? [];
  const named = row.cells.label && isTyped(row.cells.label) ? fieldText(document, row.cells.label.field) : '';
  return (
    <div className="flex flex-col gap-5">
      <h2 className="text-head font-bold">
        {row.name}
        {named && `: ${named}`}
        {findings.length === 0 && <span className="block font-normal text-grey">Nothing is found here.</span>}
      </h2>
      {findings.map((finding) => {
        const key = keyOf(finding);
        const held = finding === inHand;
        return (
          <Note
            key={key}
            tone="finding"
            inHand={held}
            heading={finding.heading}
            meta={
              <>
                <span className="mr-4">{finding.severity}</span>
                <span className="mr-4">{finding.conditions.join(', ')}</span>
                {finding.clause && finding.clause.length > 0 && (
                  <span className="block">leans on {finding.clause.join('; ')}</span>
                )}
              </>
            }
            actions={
              <>
                {held &&
                  remedies?.map((remedy) => (
                    <Button
                      key={remedy.label}
                      tone="red"
                      onClick={() => desk.getState().run(remedy.label, withPlaces(document, remedy.patch))}
                    >
                      {remedy.label}
                    </Button>
                  ))}
                {!held && <Button onClick={() => setChosen(key)}>Remedies</Button>}
                <ButtonLink href={`/jobs/${jobId}/overview`}>Show on sheet 2</ButtonLink>
                <Link href={`/rules/${finding.rule}`} className={buttonClass()}>
                  Read the lesson
                </Link>
              </>
            }
          >
            {finding.message}
          </Note>
        );
      })}
      {row.way !== null && given.length > 0 && <Outcomes now={outcomeNow(worked, row.way)} remedies={given} />}
      {lacks.length > 0 && (
        <Note heading={`${row.name}: a value is missing`}>
          {lacks.map((words) => (
            <span key={words} className="block">
              {words}.
            </span>
          ))}
        </Note>
      )}
    </div>
  );
}
