'use client';

import { Button } from '@/components/ui/button';
import { Note } from '@/components/ui/note';
import type { Hands } from '../hands';
import { useSheet } from '../use-drawing';
import { useView } from '../view';
import { Filter } from './filter';
import { FindingNote } from './finding-note';
import { keyOf, type MarkedNote } from './notes';
import type { ExaminationState } from './use-examination';
import { useProof } from './use-proof';

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
  const backup = examination.backup.length > 0;
  return (
    <div className="flex flex-col gap-5" aria-busy={state.stale}>
      <div className="flex flex-col gap-2">
        <h2 className="text-head font-bold">
          {words(open.length)} {notes.length > 0 && <span className="ml-2 font-normal text-grey">n next</span>}
        </h2>
        <Filter open={open} document={document} backup={backup} />
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
