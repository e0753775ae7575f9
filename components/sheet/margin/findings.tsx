'use client';

import Link from 'next/link';
import { useEffect, useRef, useState } from 'react';
import { Button, buttonClass } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { Note } from '@/components/ui/note';
import { Segmented } from '@/components/ui/segmented';
import { withPlaces } from '@/diagram/commands/place-new';
import type { Patch } from '@/diagram/document/patch';
import type { Silence } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import type { Hands } from '../hands';
import { useSheet } from '../use-drawing';
import { useView, useViewStore, type Condition } from '../view';
import type { ExaminationState } from './use-examination';
import { keyOf, type MarkedNote } from './notes';
import { ProofView } from './proof-view';
import { useProof } from './use-proof';
import type { Proof } from './examiner';
import { applyPatch } from '@/diagram/document/patch';

const CONDITIONS: readonly { value: Condition; label: string }[] = [
  { value: 'all', label: 'all' },
  { value: 'mains', label: 'mains' },
  { value: 'outage', label: 'outage' },
  { value: 'main-off', label: 'off' },
];
const SEVERITIES = ['danger', 'defect', 'advice'] as const;

/** Rules whose finding may be silenced by everybody who draws; a danger needs an electrician or trainer. */
function SilenceForm({ finding, by, hands, onDone }: { finding: Finding; by: string; hands: Hands; onDone(): void }) {
  const [reason, setReason] = useState('');
  const silence = () => {
    const at = finding.parts[0] ?? finding.wires[0];
    if (!at || reason.trim() === '') return;
    const silenced: Silence[] = [...(hands.doc.silenced ?? []), { rule: finding.rule, at, reason: reason.trim(), by }];
    hands.do({ label: `Answer for: ${finding.heading}`, patch: { set: { silenced } } });
    onDone();
  };
  return (
    <form
      className="mt-2 flex flex-col gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        silence();
      }}
    >
      <TextField
        label="Why it may stand"
        hint={`Printed with the name ${by}.`}
        value={reason}
        maxLength={500}
        autoFocus
        onChange={(event) => setReason(event.target.value)}
      />
      <div className="flex gap-2">
        <Button type="submit" disabled={reason.trim() === ''}>
          Let it stand
        </Button>
        <Button onClick={onDone}>Leave</Button>
      </div>
    </form>
  );
}

interface FindingNoteProps {
  note: MarkedNote;
  inHand: boolean;
  /** remedies and proof, of the note in hand */
  proof: Proof | null;
  by: string;
  maySilence: boolean;
  hands: Hands;
  onTake(): void;
}

function FindingNote({ note, inHand, proof, by, maySilence, hands, onTake }: FindingNoteProps) {
  const { finding } = note;
  const box = useRef<HTMLDivElement>(null);
  const [silencing, setSilencing] = useState(false);
  const [shown, setShown] = useState(false);
  const preview = (patch: Patch | null) => {
    hands.view.getState().set({ ghost: patch && applyPatch(hands.doc, patch) });
  };
  useEffect(() => {
    if (inHand) box.current?.scrollIntoView({ block: 'nearest' });
  }, [inHand]);
  const meta = [finding.severity, finding.conditions.join(', '), note.grid ?? 'not on this face'].filter(Boolean);
  return (
    <div ref={box} data-note={note.key} data-in-hand={inHand || undefined}>
      <Note
        tone="finding"
        letter={note.letter}
        inHand={inHand}
        heading={finding.heading}
        meta={meta.map((word, i) => (
          <span key={i} className="mr-4">
            {word}
          </span>
        ))}
        actions={
          <>
            {hands.mayEdit &&
              proof?.remedies.map((remedy) => (
                <Button
                  key={remedy.label}
                  tone="red"
                  onMouseEnter={() => preview(remedy.patch)}
                  onMouseLeave={() => preview(null)}
                  onFocus={() => preview(remedy.patch)}
                  onBlur={() => preview(null)}
                  onClick={() => {
                    preview(null);
                    hands.do({ label: remedy.label, patch: withPlaces(hands.doc, remedy.patch) });
                  }}
                >
                  {remedy.label}
                </Button>
              ))}
            {proof?.walk && (
              <Button aria-expanded={shown} onClick={() => setShown(!shown)}>
                Show me
              </Button>
            )}
            <Button onClick={onTake} aria-pressed={inHand}>
              Go there
            </Button>
            <Link href={`/rules/${finding.rule}`} className={buttonClass()}>
              Read the lesson
            </Link>
            {maySilence && !silencing && <Button onClick={() => setSilencing(true)}>Let it stand</Button>}
          </>
        }
      >
        {finding.message}
        {inHand && shown && proof?.walk && <ProofView walk={proof.walk} document={hands.doc} />}
        {inHand && proof?.cannot && <span className="mt-1 block text-grey">The fault {proof.cannot}.</span>}
        {finding.clause && finding.clause.length > 0 && (
          <span className="mt-1 block text-small text-grey">leans on {finding.clause.join('; ')}</span>
        )}
      </Note>
      {silencing && <SilenceForm finding={finding} by={by} hands={hands} onDone={() => setSilencing(false)} />}
    </div>
  );
}

const words = (count: number): string => (count === 0 ? 'No finding' : count === 1 ? '1 finding' : `${count} findings`);

interface FindingsProps {
  state: ExaminationState;
  notes: readonly MarkedNote[];
  hands: Hands;
  /** initials of the person, printed with what they let stand */
  by: string;
  mayEdit: boolean;
  maySilenceDanger: boolean;
  onTake(note: MarkedNote): void;
}

/** The findings of the drawing, in red pencil, each tied to its place. */
export function Findings({ state, notes, hands, by, mayEdit, maySilenceDanger, onTake }: FindingsProps) {
  const view = useViewStore();
  const condition = useView((current) => current.condition);
  const severities = useView((current) => current.severities);
  const inHand = useView((current) => current.finding);
  const { examination, failure } = state;
  const document = useSheet(hands.store, (current) => current.document);
  const proof = useProof(document, notes.find((note) => note.key === inHand)?.finding ?? null);
  if (failure)
    return (
      <Note tone="finding" heading="The drawing could not be examined">
        {failure} What is drawn is safe.
      </Note>
    );
  if (!examination) return <p className="text-grey">Being examined.</p>;
  const open = examination.findings.filter((finding) => !finding.silenced);
  const silenced = examination.findings.filter((finding) => finding.silenced);
  const toggle = (severity: Finding['severity']) => {
    const next = new Set(severities);
    if (!next.delete(severity)) next.add(severity);
    view.getState().set({ severities: next });
  };
  const backup = examination.backup.length > 0;
  return (
    <div className="flex flex-col gap-5" aria-busy={state.stale}>
      <div className="flex flex-col gap-2">
        <h2 className="text-head font-bold">
          {words(open.length)} {notes.length > 0 && <span className="ml-2 font-normal text-grey">n next</span>}
        </h2>
        {backup && (
          <Segmented
            label="True in"
            showLabel
            segments={CONDITIONS}
            value={condition}
            onChange={(value) => view.getState().set({ condition: value })}
          />
        )}
        {open.length > 0 && (
          <div className="flex flex-wrap gap-x-4" role="group" aria-label="Severities shown">
            {SEVERITIES.map((severity) => {
              const count = open.filter((finding) => finding.severity === severity).length;
              return (
                <label key={severity} className="flex items-center gap-2 pointer-coarse:min-h-11">
                  <input
                    type="checkbox"
                    className="accent-ink"
                    checked={severities.has(severity)}
                    onChange={() => toggle(severity)}
                  />
                  {severity} {count}
                </label>
              );
            })}
          </div>
        )}
      </div>
      {notes.map((note) => (
        <FindingNote
          key={note.key}
          note={note}
          by={by}
          hands={hands}
          inHand={inHand === note.key}
          proof={inHand === note.key ? proof : null}
          maySilence={mayEdit && (note.finding.severity !== 'danger' || maySilenceDanger)}
          onTake={() => onTake(note)}
        />
      ))}
      {open.length > notes.length && <p className="text-grey">{open.length - notes.length} more outside the filter.</p>}
      {silenced.length > 0 && (
        <details>
          <summary className="cursor-pointer text-grey">{silenced.length} that somebody answers for</summary>
          <ul className="mt-2 flex flex-col gap-3">
            {silenced.map((finding) => (
              <li key={keyOf(finding)} className="border-l-2 border-rule pl-3">
                <b>{finding.heading}</b>
                <span className="block">{finding.silenced?.reason}</span>
                <span className="block text-small text-grey">{finding.silenced?.by}</span>
                {mayEdit && (
                  <Button
                    className="mt-1"
                    onClick={() => {
                      const rest = (hands.doc.silenced ?? []).filter(
                        (silence) =>
                          silence.rule !== finding.rule || ![...finding.parts, ...finding.wires].includes(silence.at),
                      );
                      hands.do({
                        label: `Raise again: ${finding.heading}`,
                        patch: rest.length > 0 ? { set: { silenced: rest } } : { remove: { silenced: true } },
                      });
                    }}
                  >
                    Raise it again
                  </Button>
                )}
              </li>
            ))}
          </ul>
        </details>
      )}
    </div>
  );
}
