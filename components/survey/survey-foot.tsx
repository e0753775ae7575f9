'use client';

import { WordButton } from '@/components/ui/button';
import { saveFile } from '@/components/ui/save-file';
import { surveyCsv } from '@/diagram/survey/parse';
import type { Survey } from './use-survey';

interface SurveyFootProps {
  survey: Survey;
  /** the job's number, for the name of the file */
  title: string;
  mayEdit: boolean;
  pasting: boolean;
  onPasting(pasting: boolean): void;
}

const cells = (count: number) => `${count} ${count === 1 ? 'cell' : 'cells'} to put right`;

/** The survey's own strip: rows in and out, the row in hand, what is left to put right. */
export function SurveyFoot({ survey, title, mayEdit, pasting, onPasting }: SurveyFootProps) {
  const row = survey.rooms.find((room) => room.id === survey.inHand?.room);
  const wrong = survey.problems.filter((problem) => problem.column !== null).length;
  if (!mayEdit)
    return (
      <div className="flex flex-col gap-2">
        <p>You may read this survey. An electrician of your team may give you the job to draw in.</p>
        <WordButton onClick={() => saveFile(`${title}-survey.csv`, surveyCsv(survey.rooms))}>Survey as CSV</WordButton>
      </div>
    );
  return (
    <div className="flex flex-col gap-2">
      <p className="flex flex-wrap gap-x-6 gap-y-1">
        <WordButton aria-expanded={pasting} onClick={() => onPasting(!pasting)}>
          Paste rows
        </WordButton>
        <WordButton onClick={() => saveFile(`${title}-survey.csv`, surveyCsv(survey.rooms))}>Survey as CSV</WordButton>
        {row && (
          <>
            <WordButton onClick={() => survey.newRoom(row.id)}>New room after {row.name || 'this one'}</WordButton>
            <WordButton onClick={() => survey.remove(row.id)}>Take {row.name || 'this row'} out</WordButton>
          </>
        )}
      </p>
      {wrong > 0 && (
        <p>
          <button type="button" className="cursor-pointer font-bold text-red hover:underline" onClick={survey.nextProblem}>
            {cells(wrong)}, F8 goes there
          </button>
        </p>
      )}
    </div>
  );
}
