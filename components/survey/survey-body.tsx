'use client';

import { Key } from '@/components/ui/key';
import type { Installation } from '@/diagram/document/schema';
import type { SurveyTotals } from '@/diagram/survey/totals';
import { HoursCurve } from './hours-curve';
import { PasteBox } from './paste-box';
import { RoomForms } from './room-forms';
import { RoomsInSmall } from './rooms-in-small';
import { SurveyTable } from './survey-table';
import type { Survey } from './use-survey';
import { hoursWords } from './words';

interface SurveyBodyProps {
  survey: Survey;
  document: Installation;
  boards: ReadonlyMap<string, string>;
  totals: SurveyTotals;
  pasting: boolean;
  onPasting(pasting: boolean): void;
}

function Pictures({ survey, document, totals }: Pick<SurveyBodyProps, 'survey' | 'document' | 'totals'>) {
  return (
    <div className="grid gap-8 lg:grid-cols-[minmax(0,5fr)_minmax(0,4fr)]">
      <RoomsInSmall survey={survey} document={document} />
      {totals.backup && <HoursCurve backup={totals.backup} rooms={survey.rooms.filter((room) => !survey.problems.some((problem) => problem.room === room.id))} />}
    </div>
  );
}

/** Table, rooms in small and curve; on a phone forms, with the totals at the foot and the pictures behind "More". */
export function SurveyBody({ survey, document, boards, totals, pasting, onPasting }: SurveyBodyProps) {
  return (
    <div className="flex min-h-full flex-col px-2 pt-4 pb-6 sm:px-4">
      <header className="flex flex-wrap items-baseline justify-between gap-x-8 gap-y-1 px-2">
        <h1 className="text-title font-bold">Survey, room by room</h1>
        {survey.mayEdit && (
          <p className="text-grey max-[700px]:hidden">
            {survey.rooms.length === 0 ? (
              'Type a room, or paste rows from a spreadsheet.'
            ) : (
              <>
                <Key>Tab</Key> next cell <span className="ml-2" />
                <Key>Enter</Key> next room <span className="ml-2" />
                <Key>Shift Enter</Key> new room <span className="ml-2" />
                or paste rows from a spreadsheet
              </>
            )}
          </p>
        )}
      </header>
      {pasting && (
        <PasteBox
          onPaste={(text) => {
            survey.paste(text);
            onPasting(false);
          }}
          onClose={() => onPasting(false)}
        />
      )}
      <div className="mt-4 overflow-x-auto max-[700px]:hidden">
        <SurveyTable survey={survey} boards={boards} />
      </div>
      <div className="mt-2 px-2 min-[700px]:hidden">
        <RoomForms survey={survey} />
        <details className="mt-4">
          <summary className="flex min-h-11 cursor-pointer items-center">More: sheet 2 in small, hours of backup</summary>
          <Pictures survey={survey} document={document} totals={totals} />
        </details>
      </div>
      <div className="mt-6 px-2 max-[700px]:hidden">
        <Pictures survey={survey} document={document} totals={totals} />
      </div>
      <p className="sticky bottom-0 mt-auto flex flex-wrap gap-x-4 border-t border-ink bg-paper px-2 py-2 min-[700px]:hidden">
        <span>{Math.round(totals.watts)} W</span>
        <span>
          {totals.demandAmps.toFixed(1)} A of {totals.serviceA}
        </span>
        {totals.backup && (
          <span>
            backup {Math.round(totals.backup.watts)} W, {hoursWords(totals.backup.hours)}
          </span>
        )}
      </p>
    </div>
  );
}
