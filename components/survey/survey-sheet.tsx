'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useMemo, useState, type KeyboardEvent } from 'react';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { jobTabs } from '@/components/frame/tabs';
import type { KeyHelp } from '@/components/frame/types';
import { SaveStateView } from '@/components/sheet/save-state-view';
import { TroubleStrip } from '@/components/sheet/trouble-strip';
import type { Me } from '@/components/sheet/use-drawing';
import { isEmptyPatch } from '@/diagram/document/patch';
import { draftPatch } from '@/diagram/survey/draft';
import type { DrawingView } from '@/lib/shared/drawings';
import { DraftNote } from './draft-note';
import { SurveyBody } from './survey-body';
import { SurveyFoot } from './survey-foot';
import { SurveyMargin } from './survey-margin';
import { useSurvey } from './use-survey';
import { useSurveyDocument } from './use-survey-document';
import { roomsWords } from './words';

interface SurveySheetProps {
  view: DrawingView;
  me: Me;
  /** h of backup that the job asks for */
  hoursWanted: number;
}

const keys: readonly KeyHelp[] = [
  { keys: ['Tab'], does: 'next cell' },
  { keys: ['Enter'], does: 'the same cell of the next room' },
  { keys: ['Shift Enter'], does: 'new room after this one' },
  { keys: ['Ctrl D'], does: 'same as above' },
  { keys: ['F8'], does: 'next cell to put right' },
  { keys: ['Ctrl Enter'], does: 'draft the sheet' },
  { keys: ['Ctrl Z', 'Ctrl Shift Z'], does: 'take back, do again' },
  { keys: ['Ctrl V'], does: 'rows from a spreadsheet become rooms' },
  { keys: ['Esc'], does: 'take back what is typed in this cell' },
];

/** What each room holds and must keep in an outage; the whole sheet is drafted from it. */
export function SurveySheet({ view, me, hoursWanted }: SurveySheetProps) {
  const router = useRouter();
  const opened = useSurveyDocument(view, me);
  const { document, rights, titleBlock, drawing } = opened;
  const survey = useSurvey(opened, hoursWanted);
  const [pasting, setPasting] = useState(false);
  const boards = useMemo(() => new Map(document.parts.flatMap((part) => (part.place && part.board ? [[part.place, part.board]] : []))), [document.parts]);

  const begins = survey.mayEdit && survey.rooms.length === 0;
  const { toBlank } = survey;
  useEffect(() => {
    if (begins) toBlank('name');
    // Once, as the sheet opens: an empty survey has its caret in Name.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, []);

  const draft = () => {
    // A cell left by this very key is in the store already, not yet in this render.
    const now = drawing.store.getState().document;
    const patch = draftPatch(now, hoursWanted);
    if (isEmptyPatch(patch) || survey.toDraw.length === 0) return;
    opened.run(`Draft ${roomsWords(survey.toDraw.length)}`, patch);
    router.push(`/jobs/${view.jobId}/overview`);
  };

  const onKeyDown = (event: KeyboardEvent) => {
    const ctrl = event.ctrlKey || event.metaKey;
    const typing = (event.target as HTMLElement).dataset.typing !== undefined;
    const key = event.key.toLowerCase();
    const action =
      event.key === 'F8'
        ? survey.nextProblem
        : ctrl && event.key === 'Enter'
          ? draft
          : ctrl && key === 'z' && !typing
            ? event.shiftKey
              ? opened.redo
              : opened.undo
            : undefined;
    if (!action) return;
    event.preventDefault();
    action();
  };

  const { totals, problems } = survey;
  return (
    <div onKeyDown={onKeyDown}>
      <SheetFrame
        tabs={jobTabs(view.jobId)}
        current="survey"
        who={me.initials}
        kind="Survey"
        saveState={<SaveStateView drawing={drawing} />}
        titleBlock={titleBlock}
        practice={{ id: document.practice, supply: document.supply }}
        keys={keys}
        strip={<TroubleStrip drawing={drawing} />}
        marginLabel={problems.length > 0 ? `${problems.length} to put right` : 'Totals and draft'}
        margin={<SurveyMargin survey={survey} draft={<DraftNote jobId={view.jobId} survey={survey} document={document} hoursWanted={hoursWanted} onDraft={draft} />} />}
        foot={<SurveyFoot survey={survey} title={titleBlock.number} mayEdit={rights.edit} pasting={pasting} onPasting={setPasting} />}
      >
        <SurveyBody survey={survey} document={document} boards={boards} totals={totals} pasting={pasting} onPasting={setPasting} />
      </SheetFrame>
    </div>
  );
}
