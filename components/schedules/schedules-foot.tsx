'use client';

import { useStore } from 'zustand';
import { useSheet, type OpenDrawing } from '@/components/sheet/use-drawing';
import { WaitLine } from '@/components/ui/wait-line';
import { findingsOf } from '@/diagram/schedules/row-findings';
import { TABLES_OF, type TableId } from '@/diagram/schedules/types';
import { rowsInHand, type Desk } from './desk';
import type { WorkedState } from './use-worked';

interface SchedulesFootProps {
  desk: Desk;
  drawing: OpenDrawing;
  state: WorkedState;
  mayEdit: boolean;
}

const NAMES: Record<TableId, string> = {
  ways: 'Ways',
  cables: 'Cables',
  loads: 'Loads',
  backup: 'What stays on',
  sources: 'Sources',
  batteries: 'Batteries',
  designations: 'Designations',
};

/** "17 ways, 1 not in order": the sum of what lies open, what is in hand, and the tables as files. */
export function SchedulesFoot({ desk, drawing, state, mayEdit }: SchedulesFootProps) {
  const schedule = useStore(desk, ({ schedule: open }) => open);
  const several = useStore(desk, (current) => rowsInHand(current).length);
  const notice = useSheet(drawing.store, (current) => current.notice);
  const drawnBy = useSheet(drawing.store, (current) => current.titleBlock.drawnBy);
  const drawingId = useSheet(drawing.store, (current) => current.drawingId);
  const unsaved = useSheet(drawing.store, (current) => current.saveState.kind !== 'saved');
  const { worked } = state;
  if (!worked) return state.failure ? null : <WaitLine>{'Working out the schedules'}</WaitLine>;
  const tables = TABLES_OF[schedule];
  const main = worked.tables[schedule === 'backup' ? 'backup' : schedule];
  const wrong = main.rows.filter((row) =>
    findingsOf(row, worked.findings).some(({ severity }) => severity !== 'advice'),
  ).length;
  return (
    <div className="flex h-full flex-col justify-between gap-1">
      <p>
        {main.rows.length} {main.rows.length === 1 ? main.noun.replace(/s$/, '') : main.noun}
        {wrong > 0 ? `, ${wrong} not in order` : main.rows.length > 0 ? ', all in order' : ''}.{' '}
        {several > 1 && <b>{several} in hand: what is typed goes to all of them.</b>}
        {!mayEdit && `You may read this drawing. Ask ${drawnBy} to draw in it.`}
      </p>
      <p role="status" className="truncate text-small text-grey empty:hidden" title={notice}>
        {notice}
      </p>
      <p className="flex flex-wrap gap-x-6">
        {tables.map((id) => (
          <a
            key={id}
            href={`/api/drawings/${drawingId}/csv?table=${id}`}
            download
            className="text-ink underline underline-offset-[3px] pointer-coarse:inline-flex pointer-coarse:min-h-11 pointer-coarse:items-center"
          >
            {NAMES[id]} as CSV
          </a>
        ))}
        {unsaved && <span className="text-red">what is not saved yet is not in the file</span>}
      </p>
    </div>
  );
}
