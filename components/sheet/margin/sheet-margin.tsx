'use client';

import type { ConnectionPage } from '@/diagram/layout/connections-scene';
import type { Examination } from '@/diagram/rules/examination';
import type { DrawingRights } from '@/lib/shared/drawings';
import { ConflictPanel } from '../conflict-panel';
import { IfPlaced } from '../extend/if-placed';
import type { Hands } from '../hands';
import { TerminalList } from '../terminal-list';
import { useSheet, type Me, type OpenDrawing } from '../use-drawing';
import { useView } from '../view';
import { Findings } from './findings';
import type { MarkedNote } from './notes';
import type { ExaminationState } from './use-examination';

interface SheetMarginProps {
  drawing: OpenDrawing;
  hands: Hands;
  examined: ExaminationState;
  /** of the ghost; undefined while there is none, null while it is being examined */
  ghostExamined: Examination | null | undefined;
  notes: readonly MarkedNote[];
  me: Me;
  rights: DrawingRights;
  /** the page whose terminals are listed, on the connections face */
  terminals: ConnectionPage | null;
  onTake(note: MarkedNote): void;
}

/** What is to be answered here: somebody's change, the ghost's consequences, the findings. */
export function SheetMargin({
  drawing,
  hands,
  examined,
  ghostExamined,
  notes,
  me,
  rights,
  terminals,
  onTake,
}: SheetMarginProps) {
  const mode = useView((state) => state.mode.kind);
  const editing = useView((state) => state.editing);
  const news = useSheet(drawing.store, (state) => state.news);
  if (mode === 'extend' && ghostExamined !== undefined)
    return <IfPlaced before={examined.examination} after={ghostExamined} />;
  return (
    <div className="flex flex-col gap-6 max-lap:clear-both">
      <ConflictPanel drawing={drawing} me={me} />
      {news && (
        <p className="border-l-2 border-blue pl-3 text-blue">
          {news.person.initials} a moment ago: {news.label}{' '}
          <button
            type="button"
            className="cursor-pointer text-ink underline underline-offset-[3px]"
            onClick={() => drawing.store.setState({ news: null })}
          >
            Seen
          </button>
        </p>
      )}
      <Findings
        state={examined}
        notes={notes}
        hands={hands}
        by={me.initials}
        mayEdit={rights.edit && editing}
        maySilenceDanger={rights.record}
        onTake={onTake}
      />
      {terminals && <TerminalList hands={hands} place={terminals.place} title={terminals.name} />}
      {!rights.edit && <p className="text-grey">You may read this drawing.</p>}
    </div>
  );
}
