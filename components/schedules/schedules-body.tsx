'use client';

import { useStore } from 'zustand';
import type { DrawingStore } from '@/components/sheet/store';
import { ButtonLink } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { Segmented } from '@/components/ui/segmented';
import type { Installation } from '@/diagram/document/schema';
import { SCHEDULES, TABLES_OF, type ScheduleId } from '@/diagram/schedules/types';
import type { Worked } from '@/diagram/schedules/work-out';
import type { Desk } from './desk';
import { Plots } from './plots';
import { ScheduleTable } from './schedule-table';

export const SCHEDULE_NAMES: Record<ScheduleId, string> = {
  ways: 'Schedule of ways',
  cables: 'Schedule of cables',
  loads: 'Schedule of loads',
  backup: 'Schedule of the backup',
  designations: 'Designations',
};

interface SchedulesBodyProps {
  desk: Desk;
  worked: Worked | null;
  drawing: DrawingStore;
  document: Installation;
  jobId: string;
  mayEdit: boolean;
  onTurn(schedule: ScheduleId): void;
}

/** The schedule lying open: its tables, and the pictures that its row in hand feeds. */
export function SchedulesBody({ desk, worked, drawing, document, jobId, mayEdit, onTurn }: SchedulesBodyProps) {
  const schedule = useStore(desk, (state) => state.schedule);
  const tables = worked ? TABLES_OF[schedule].map((id) => worked.tables[id]) : [];
  const empty = tables.every(({ rows }) => rows.length === 0);
  return (
    <div className="flex flex-col gap-4 px-2 pt-4 pb-8 sm:px-4 print:pb-40">
      <header className="flex flex-wrap items-center gap-x-6 gap-y-2">
        <h1 className="text-title font-bold">{SCHEDULE_NAMES[schedule]}</h1>
        <Segmented
          label="Schedule"
          segments={SCHEDULES.map((id) => ({ value: id, label: id }))}
          value={schedule}
          onChange={onTurn}
        />
        {mayEdit && !empty && (
          <p className="text-grey max-lap:hidden">
            <span className="underline decoration-dotted underline-offset-4">underlined</span>: type to change the
            drawing <Key>Enter</Key> next <Key>Ctrl D</Key> same as above
          </p>
        )}
      </header>
      {worked && (
        <>
          {tables.map((table, i) =>
            empty && i > 0 ? null : (
              <section key={table.id} className="min-w-0">
                {tables.length > 1 && !empty && <h2 className="mb-1 text-head font-bold">{table.title}</h2>}
                <ScheduleTable
                  desk={desk}
                  table={table}
                  document={document}
                  findings={worked.findings}
                  mayEdit={mayEdit}
                />
              </section>
            ),
          )}
          {empty && (
            <p>
              <ButtonLink href={`/jobs/${jobId}/overview`}>To sheet 2</ButtonLink>
            </p>
          )}
          {!empty && <Plots desk={desk} worked={worked} drawing={drawing} document={document} mayEdit={mayEdit} />}
        </>
      )}
    </div>
  );
}
