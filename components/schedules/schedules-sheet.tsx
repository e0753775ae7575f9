'use client';

import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useState } from 'react';
import { useStore } from 'zustand';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { useSingleKeys } from '@/components/frame/single-keys';
import { jobTabs } from '@/components/frame/tabs';
import type { KeyHelp } from '@/components/frame/types';
import { focusCell } from '@/components/grid/focus';
import { SaveStateView } from '@/components/sheet/save-state-view';
import { TroubleStrip } from '@/components/sheet/trouble-strip';
import { useDrawing, useSheet, type Me } from '@/components/sheet/use-drawing';
import { Button } from '@/components/ui/button';
import { TABLES_OF, type ScheduleId } from '@/diagram/schedules/types';
import { findingsOf } from '@/diagram/schedules/row-findings';
import type { DrawingView } from '@/lib/shared/drawings';
import { HEAD, createDesk, rowKey } from './desk';
import { SCHEDULE_NAMES, SchedulesBody } from './schedules-body';
import { SchedulesFoot } from './schedules-foot';
import { SchedulesMargin } from './schedules-margin';
import { useWorked } from './use-worked';

interface SchedulesSheetProps {
  view: DrawingView;
  me: Me;
  schedule: ScheduleId;
  /** id of the way that the address asks for */
  way: string | null;
}

const keys: readonly KeyHelp[] = [
  { keys: ['Tab'], does: 'next cell' },
  { keys: ['Enter', 'Shift Enter'], does: 'the same cell of the next row, of the row before' },
  { keys: ['↑', '↓'], does: 'row by row' },
  { keys: ['Shift ↑', 'Shift ↓'], does: 'several rows: what is typed goes to all of them' },
  { keys: ['Ctrl D'], does: 'same as above; of several rows, all as the first' },
  { keys: ['Esc'], does: 'take back what is typed in this cell; again, leave the cell for its row' },
  { keys: ['F8', 'n'], does: 'next row that is not in order' },
  { keys: ['g'], does: 'what is in hand, on sheet 2' },
  { keys: ['Ctrl Z', 'Ctrl Shift Z'], does: 'take back, do again' },
];

/** All ways, cables and loads at once, with the drawing behind them: what is typed here is drawn. */
export function SchedulesSheet({ view, me, schedule, way }: SchedulesSheetProps) {
  const router = useRouter();
  const drawing = useDrawing(view, me);
  const { store } = drawing;
  const document = useSheet(store, (state) => state.document);
  const rights = useSheet(store, (state) => state.rights);
  const titleBlock = useSheet(store, (state) => state.titleBlock);
  const [desk] = useState(() => createDesk(store, schedule, way));
  const open = useStore(desk, (state) => state.schedule);
  const state = useWorked(document);
  const { worked } = state;
  useEffect(() => {
    desk.setState({ worked });
    if (!worked || desk.getState().hand) return;
    // What is in hand on the drawing is in hand here too.
    desk.getState().turnTo(desk.getState().schedule);
  }, [desk, worked]);
  const ready = worked !== null;
  useEffect(() => {
    const { hand } = desk.getState();
    if (ready && way !== null && hand?.row === way) focusCell(rowKey('ways', way), HEAD);
  }, [desk, ready, way]);

  const turn = useCallback(
    (next: ScheduleId) => {
      desk.getState().turnTo(next);
      window.history.replaceState(null, '', `?table=${next}`);
    },
    [desk],
  );
  const nextWrong = useCallback(() => {
    const { worked: now, hand, schedule: shown, refused } = desk.getState();
    if (!now) return;
    const rows = TABLES_OF[shown].flatMap((table) => now.tables[table].rows.map((row) => ({ table, row })));
    const wrong = rows.filter(
      ({ table, row }) =>
        [...refused.values()].some((entry) => entry.table === table && entry.row === row.id) ||
        findingsOf(row, now.findings).some(({ severity }) => severity !== 'advice'),
    );
    const at = rows.findIndex(({ table, row }) => table === hand?.table && row.id === hand.row);
    const next = wrong.find((each) => rows.indexOf(each) > at) ?? wrong[0];
    if (!next) return store.getState().say('Every row is in order.');
    const entry = [...refused.values()].find((each) => each.table === next.table && each.row === next.row.id);
    focusCell(rowKey(next.table, next.row.id), entry?.column ?? HEAD);
  }, [desk, store]);
  useSingleKeys({ g: () => router.push(`/jobs/${view.jobId}/overview`), n: nextWrong });

  useEffect(() => {
    // On the window, as a remedy that has done its work takes the focus with it.
    const onKey = (event: KeyboardEvent) => {
      const typing = event.target instanceof HTMLElement && event.target.dataset.typing !== undefined;
      const undoes = (event.ctrlKey || event.metaKey) && event.key.toLowerCase() === 'z' && !typing;
      if (event.defaultPrevented || (event.key !== 'F8' && !undoes)) return;
      event.preventDefault();
      if (event.key === 'F8') return nextWrong();
      desk.setState({ since: null });
      const { undo, redo } = store.getState();
      (event.shiftKey ? redo : undo)();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [desk, store, nextWrong]);

  const findings = worked?.findings.length ?? 0;
  return (
    <>
      <style>{'@page { size: A4 landscape; margin: 8mm; }'}</style>
      <SheetFrame
        tabs={jobTabs(view.jobId)}
        current="schedules"
        who={me.initials}
        kind={`Schedules, ${open}`}
        saveState={<SaveStateView drawing={drawing} />}
        strip={<TroubleStrip drawing={drawing} />}
        titleBlock={titleBlock}
        practice={{ id: document.practice, supply: document.supply }}
        keys={keys}
        marginLabel={findings === 1 ? '1 finding' : `${findings} findings`}
        margin={
          <SchedulesMargin
            desk={desk}
            drawing={drawing}
            state={state}
            document={document}
            me={me}
            jobId={view.jobId}
            mayEdit={rights.edit}
          />
        }
        tools={
          rights.edit && (
            <Button className="min-h-11" onClick={() => store.getState().undo()}>
              Undo
            </Button>
          )
        }
        foot={<SchedulesFoot desk={desk} drawing={drawing} state={state} mayEdit={rights.edit} />}
      >
        {state.failure ? (
          <h1 className="p-4 text-title font-bold">{SCHEDULE_NAMES[open]}</h1>
        ) : (
          <SchedulesBody
            desk={desk}
            worked={worked}
            drawing={store}
            document={document}
            jobId={view.jobId}
            mayEdit={rights.edit}
            onTurn={turn}
          />
        )}
      </SheetFrame>
    </>
  );
}
