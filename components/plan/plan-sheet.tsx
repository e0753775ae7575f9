'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState, type KeyboardEvent } from 'react';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { useSingleKeysOn } from '@/components/frame/single-keys';
import { jobTabs } from '@/components/frame/tabs';
import type { KeyHelp } from '@/components/frame/types';
import { newUuid } from '@/components/sheet/identity';
import { SaveStateView } from '@/components/sheet/save-state-view';
import { TroubleStrip } from '@/components/sheet/trouble-strip';
import { useDrawing, useSheet, type Me } from '@/components/sheet/use-drawing';
import { Button } from '@/components/ui/button';
import { addPlan, freeStorey, planSize } from '@/diagram/commands/floor-plan';
import type { DrawingView } from '@/lib/shared/drawings';
import type { UploadList, UploadView } from '@/lib/shared/uploads';
import { ChoosePicture } from './choose-picture';
import { PlanCanvas } from './plan-canvas';
import { PlanFoot } from './plan-foot';
import { Tray } from './tray';
import { usePlan } from './use-plan';

interface PlanSheetProps {
  view: DrawingView;
  me: Me;
  list: UploadList;
  /** the storey that the address asks for */
  storey: string | null;
}

const KEYS: readonly KeyHelp[] = [
  { keys: ['←', '→', '↑', '↓'], does: 'move what is in hand by the module; with Shift farther' },
  { keys: ['Page Down', 'Page Up'], does: 'next part on the plan, the one before' },
  { keys: ['r'], does: 'turn it by a quarter' },
  { keys: ['Shift', 'L'], does: 'lock it where it hangs, or unlock it' },
  { keys: ['s'], does: 'measure the scale: two places, and how far they are apart' },
  { keys: ['m'], does: 'measure the way of a run and write it at its cable' },
  { keys: ['Alt'], does: 'held while a part is moved: not drawn to what it nearly stands in line with' },
  { keys: ['Delete'], does: 'take it off the plan' },
  { keys: ['Enter'], does: 'put down what is carried, or a place to measure from' },
  { keys: ['g'], does: 'the same part on the overview' },
  { keys: ['+', '-'], does: 'larger, smaller' },
  { keys: ['Ctrl Z', 'Ctrl Shift Z'], does: 'take back, do again' },
  { keys: ['Esc'], does: 'nothing measured, nothing carried, nothing in hand' },
];

/** A storey's plan with the parts of the drawing where they hang in the home: a second arrangement of the same parts. */
export function PlanSheet({ view, me, list, storey }: PlanSheetProps) {
  const router = useRouter();
  const drawing = useDrawing(view, me);
  const { store } = drawing;
  const titleBlock = useSheet(store, (state) => state.titleBlock);
  const state = usePlan(drawing, storey);
  const letters = useSingleKeysOn();
  const [another, setAnother] = useState(false);
  const box = useRef<HTMLDivElement>(null);
  const { document, plan, plans, rights } = state;
  const free = list.uploads.filter(({ id }) => !plans.some(({ picture }) => picture === id));

  const begin = ({ id, width, height }: UploadView) => {
    const fresh = { id: newUuid(), name: freeStorey(document), picture: id, ...planSize(width, height) };
    if (!state.run(addPlan(document, fresh))) return;
    state.choose(fresh.id);
    setAnother(false);
  };
  const carry = (id: string) => {
    if (!plan) return;
    state.carry(id, { x: plan.width / 2, y: plan.height / 2 });
    box.current?.focus({ preventScroll: true });
  };

  const onKey = (event: KeyboardEvent) => {
    if (event.key === 'Shift' || event.key === 'Control' || event.key === 'Tab') return;
    state.endNudge();
    const ctrl = event.ctrlKey || event.metaKey;
    const key = event.key.length === 1 && event.key > '~' ? event.code.slice(3).toLowerCase() : event.key.toLowerCase();
    if (ctrl && key === 'z') store.getState()[event.shiftKey ? 'redo' : 'undo']();
    else if (ctrl || event.altKey) return;
    else if (key === 'pagedown') state.step(1);
    else if (key === 'pageup') state.step(-1);
    else if (letters && key === 'l' && event.shiftKey) state.lock();
    else if (letters && key === 's') state.measure('scale');
    else if (letters && key === 'm') state.measure('run');
    else if (letters && key === 'r') state.turn();
    else if (key === 'delete' || key === 'backspace') state.takeOff();
    else if (letters && key === 'g') router.push(`/jobs/${view.jobId}/overview`);
    else if (key === 'escape') {
      if (state.tool.kind) state.tool.leave();
      else if (state.placing) state.drop();
      else state.take([]);
    } else return;
    event.preventDefault();
    event.stopPropagation();
  };

  const waits = state.waiting.reduce((sum, { parts }) => sum + parts.length, 0);
  const showsPlan = plan !== null && !another;
  return (
    <SheetFrame
      tabs={jobTabs(view.jobId)}
      current="plan"
      who={me.initials}
      kind={plan ? `Plan, ${plan.name}` : 'Plan'}
      saveState={<SaveStateView drawing={drawing} />}
      titleBlock={titleBlock}
      practice={{ id: document.practice, supply: document.supply }}
      fit={showsPlan ? 'screen' : 'page'}
      keys={KEYS}
      strip={<TroubleStrip drawing={drawing} />}
      marginLabel={waits === 0 ? 'All placed' : `${waits} to place`}
      margin={(shut) => (
        <Tray
          state={state}
          onCarry={(id) => {
            shut();
            carry(id);
          }}
        />
      )}
      tools={
        rights.edit &&
        showsPlan && (
          <Button className="min-h-11" onClick={store.getState().undo}>
            Undo
          </Button>
        )
      }
      foot={<PlanFoot drawing={drawing} state={state} onAnother={() => setAnother(!another)} />}
    >
      <h1 className="sr-only">
        {plan ? `Plan of the ${plan.name}` : 'Plan'}: {titleBlock.title}
      </h1>
      {showsPlan ? (
        <PlanCanvas key={plan.id} state={state} box={box} onKey={onKey} />
      ) : (
        <>
          {another && (
            <div className="px-4 pt-4 lap:px-6">
              <Button onClick={() => setAnother(false)}>Back to the plan</Button>
            </div>
          )}
          <ChoosePicture
            jobId={view.jobId}
            uploads={free}
            mayEdit={rights.edit}
            heading={another ? 'Another storey' : 'No plan yet'}
            onChoose={begin}
          />
        </>
      )}
    </SheetFrame>
  );
}
