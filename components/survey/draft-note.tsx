'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { Note } from '@/components/ui/note';
import type { Installation } from '@/diagram/document/schema';
import { draftPatch } from '@/diagram/survey/draft';
import { draftWords } from './draft-words';
import type { Survey } from './use-survey';
import { roomsWords } from './words';

interface DraftNoteProps {
  survey: Survey;
  document: Installation;
  hoursWanted: number;
  onDraft(): void;
}

const MOVED = 'What you moved by hand stays where it is; one undo takes it back.';

/** The draft: first the whole sheet, then only what changed. */
export function DraftNote({ survey, document, hoursWanted, onDraft }: DraftNoteProps) {
  const [previewed, setPreviewed] = useState<Installation | null>(null);
  const { toDraw, steps } = survey;
  const isFirst = document.parts.length === 0;
  const waiting = steps.filter((step) => step.state === 'waits');
  const others = steps.filter((step) => step.state === 'not-in-survey' || step.state === 'differs');

  const notDrawn = others.length > 0 && survey.mayEdit && (
    <ul className="mt-4 flex flex-col gap-3">
      {others.map((step) => (
        <li key={step.room}>
          <Note
            heading={`${step.name}: ${step.words}`}
            actions={<Button onClick={() => survey.takeIntoSurvey(step.room, step.name)}>Take into the survey</Button>}
          />
        </li>
      ))}
    </ul>
  );

  if (survey.rooms.length === 0) return notDrawn || null;
  if (toDraw.length === 0)
    return (
      <div>
        <Note heading={waiting.length > 0 ? 'Nothing to draft until the cells are right' : 'Sheet 2 is in step'}>
          {waiting.length === 0 && 'All that the survey has is drawn.'}
        </Note>
        {notDrawn}
      </div>
    );

  const what = isFirst ? `Draft the sheet: ${roomsWords(toDraw.length)}` : `Draft the sheet: ${roomsWords(toDraw.length)} changed`;
  return (
    <div>
      <Note
        heading={what}
        actions={
          survey.mayEdit && (
            <>
              <Button solid onClick={onDraft}>
                Draft {roomsWords(toDraw.length)}
              </Button>
              <Button aria-expanded={previewed === document} onClick={() => setPreviewed(previewed === document ? null : document)}>
                Preview
              </Button>
            </>
          )
        }
        meta={
          survey.mayEdit && (
            <>
              <Key>Ctrl Enter</Key> drafts from any cell
            </>
          )
        }
      >
        {isFirst ? (
          <p>Board, ways, switchboards and every core, sized. {MOVED}</p>
        ) : (
          <>
            <ul>
              {toDraw.slice(0, 6).map((step) => (
                <li key={step.room}>
                  {step.name}: {step.words}
                </li>
              ))}
            </ul>
            {toDraw.length > 6 && <p className="text-grey">and {roomsWords(toDraw.length - 6)} more</p>}
            <p className="mt-1">{MOVED}</p>
          </>
        )}
        {waiting.length > 0 && (
          <p className="mt-1">
            {waiting.map((step) => step.name || 'a room without a name').join(', ')} {isFirst ? 'is left out until its cell is right.' : 'stays as drawn.'}
          </p>
        )}
        {previewed === document && (
          <p role="status" className="mt-2 bg-row px-2 py-1">
            {draftWords(document, draftPatch(document, hoursWanted)) || 'Nothing would change.'}
          </p>
        )}
      </Note>
      {notDrawn}
    </div>
  );
}
