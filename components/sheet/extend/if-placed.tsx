'use client';

import { Note } from '@/components/ui/note';
import type { Examination, WayResult } from '@/diagram/rules/examination';
import type { Finding } from '@/diagram/rules/types';
import { keyOf } from '../margin/notes';

const amps = (value: number | null): string => (value === null ? '-' : `${Number(value.toFixed(2))} A`);

/** The way that the ghost adds or changes most: the one whose figures are new. */
function wayOf(before: Examination | null, after: Examination): WayResult | undefined {
  const known = new Map((before?.ways ?? []).map((way) => [way.part, JSON.stringify(way)]));
  return (
    after.ways.find((way) => !known.has(way.part)) ??
    after.ways.find((way) => known.get(way.part) !== JSON.stringify(way))
  );
}

function Figures({ way, findings }: { way: WayResult; findings: readonly Finding[] }) {
  // Without a value that the drawing lacks, nobody can say; where it can be said, it is a danger.
  const judged = findings.some((finding) => finding.severity === 'danger' && finding.parts.includes(way.part));
  const rows: [string, string][] = [
    ['way', way.label || 'without a name'],
    [
      'Ib',
      `${amps(way.ib)} ${way.in !== null && way.ib !== null ? `${way.ib <= way.in ? '≤' : '>'} In ${amps(way.in)}` : ''}`,
    ],
    ['Iz', amps(way.iz)],
    ['drop', way.dropPercent === null ? '-' : `${way.dropPercent.toFixed(2)} %`],
    [
      'fault',
      way.disconnects === null
        ? judged
          ? 'nothing clears it'
          : 'not known'
        : `cleared in ${Number(way.disconnects.toPrecision(2))} s${way.rcd ? ', rcd' : ''}`,
    ],
  ];
  return (
    <dl className="grid grid-cols-[56px_1fr] gap-y-1">
      {rows.map(([name, value]) => (
        <div key={name} className="contents">
          <dt className="text-grey">{name}</dt>
          <dd className={name === 'way' ? 'font-bold' : ''}>{value}</dd>
        </div>
      ))}
    </dl>
  );
}

/** The same finding, though it may speak of one part more or less than before. */
const isSame = (a: Finding, b: Finding): boolean =>
  a.rule === b.rule && [...a.parts, ...a.wires].some((id) => b.parts.includes(id) || b.wires.includes(id));

/** What the ghost would change: the way's figures, and findings that come or go. */
export function IfPlaced({ before, after }: { before: Examination | null; after: Examination | null }) {
  if (!after) return <p className="text-grey">Being examined.</p>;
  const old = before?.findings ?? [];
  const comes = after.findings.filter((finding) => !old.some((other) => isSame(finding, other)));
  const goes = old.filter((finding) => !after.findings.some((other) => isSame(finding, other)));
  const way = wayOf(before, after);
  return (
    <div className="flex flex-col gap-4">
      <h2 className="text-head font-bold">
        If placed <span className="font-normal text-grey">before you press Enter</span>
      </h2>
      {way && <Figures way={way} findings={after.findings} />}
      {comes.length === 0 && (
        <Note heading="No new finding">{goes.length > 0 ? undefined : 'As the drawing stands.'}</Note>
      )}
      {comes.map((finding) => (
        <Note
          key={keyOf(finding)}
          tone="finding"
          heading={finding.heading}
          meta={[finding.severity, finding.conditions.join(', ')].filter(Boolean).join('   ')}
        >
          {finding.message}
        </Note>
      ))}
      {goes.map((finding) => (
        <Note key={keyOf(finding)} heading={`Goes: ${finding.heading}`} />
      ))}
    </div>
  );
}
