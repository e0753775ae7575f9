'use client';

import dynamic from 'next/dynamic';
import Link from 'next/link';
import { useEffect, useRef, useState } from 'react';
import { Button, buttonClass } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import { withPlaces } from '@/diagram/commands/place-new';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import type { Hands } from '../hands';
import { useView } from '../view';
import type { Proof } from './examiner';
import type { MarkedNote } from './notes';
import { answerShow, askToShow } from './showing';
import { SilenceForm } from './silence-form';

const WalkSteps = dynamic(() => import('@/components/rehearsal/on-sheet/walk-steps'), { ssr: false });

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

/** One finding: what is so, why it matters, what puts it right. */
export function FindingNote({ note, inHand, proof, by, maySilence, hands, onTake }: FindingNoteProps) {
  const { finding } = note;
  const box = useRef<HTMLDivElement>(null);
  const [silencing, setSilencing] = useState(false);
  const walk = useView((state) => (state.walk?.finding === note.key ? state.walk : null));
  const wanted = useView((state) => state.wantsWalk === note.key);
  const preview = (patch: Patch | null) => {
    hands.view.getState().set({ ghost: patch && applyPatch(hands.doc, patch) });
  };
  useEffect(() => {
    if (inHand) box.current?.scrollIntoView({ block: 'nearest' });
  }, [inHand]);
  useEffect(() => {
    if (wanted && proof) answerShow(hands, note.key, proof);
  }, [wanted, proof, hands, note.key]);
  const conditions = finding.conditions.map((name) => name.replace('main-off', 'main off')).join(', ');
  const meta = [finding.severity, conditions, note.grid ?? 'not on this face'].filter(Boolean);
  // Two edits that are called the same do the same for whoever reads them: the first is offered.
  const remedies = (proof?.remedies ?? []).filter(
    ({ label }, i, all) => all.findIndex((other) => other.label === label) === i,
  );
  return (
    <div ref={box} data-note={note.key} data-in-hand={inHand || undefined}>
      <Note
        tone="finding"
        letter={note.letter}
        inHand={inHand}
        heading={finding.heading}
        meta={meta.map((word, i) => (
          <span key={i} className="mr-4 inline-block">
            {word}
          </span>
        ))}
        actions={
          <>
            {hands.mayEdit &&
              remedies.map((remedy) => (
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
              <Button aria-pressed={walk !== null} onClick={() => askToShow(hands)}>
                {walk ? 'Back to the drawing' : 'Show me'}
              </Button>
            )}
            <Button onClick={onTake} aria-pressed={inHand}>
              Go there
            </Button>
            <Link href={`/rules/${finding.rule}`} prefetch={false} className={buttonClass()}>
              Read the lesson
            </Link>
            {maySilence && !silencing && <Button onClick={() => setSilencing(true)}>Let it stand</Button>}
          </>
        }
      >
        {finding.message}
        {inHand && walk && <WalkSteps walk={walk} jobId={hands.store.getState().jobId} />}
        {inHand && proof?.cannot && <span className="mt-1 block text-grey">The fault {proof.cannot}.</span>}
        {finding.clause && finding.clause.length > 0 && (
          <span className="mt-1 block text-small text-grey">leans on {finding.clause.join('; ')}</span>
        )}
      </Note>
      {silencing && <SilenceForm finding={finding} by={by} hands={hands} onDone={() => setSilencing(false)} />}
    </div>
  );
}
