'use client';

import { useDeferredValue, useMemo } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { Note } from '@/components/ui/note';
import type { Installation } from '@/diagram/document/schema';
import { draftPatch } from '@/diagram/survey/draft';
import { draftWords } from './draft-words';
import type { Survey } from './use-survey';
import { roomsWords } from './words';

interface DraftNoteProps {
  jobId: string;
  survey: Survey;
  document: Installation;
  hoursWanted: number;
  onDraft(): void;
}

const MOVED = 'What you moved by hand stays where it is; one undo takes it back.';

/** The draft: first the whole sheet, then only what changed. */
export function DraftNote({ jobId, survey, document, hoursWanted, onDraft }: DraftNoteProps) {
  const { toDraw, steps } = survey;
  const isFirst = document.parts.length === 0;
  // What it would draw may be said a moment after the cell is typed.
  const drawn = useDeferredValue(document);
  const words = useMemo(
    () => (toDraw.length > 0 ? draftWords(drawn, draftPatch(drawn, hoursWanted)) : ''),
    [drawn, toDraw.length, hoursWanted],
  );
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
              <ButtonLink href={`/jobs/${jobId}/overview?preview=draft`}>Preview</ButtonLink>
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
        <p className="mt-1 text-grey">{words}</p>
      </Note>
      {notDrawn}
    </div>
  );
}
