'use client';

import { useState } from 'react';
import { Button, WordButton } from '@/components/ui/button';
import { Segmented } from '@/components/ui/segmented';
import { useSheet, type OpenDrawing } from '@/components/sheet/use-drawing';
import { changePlan, removePlan } from '@/diagram/commands/floor-plan';
import { scaleText } from '@/diagram/document/plan-scale';
import { MeasureFoot } from './measure-foot';
import type { Plan } from './use-plan';

/** Words of 24 px, so that one is hit beside the other however they wrap. */
const WORD = 'min-h-6 pointer-coarse:min-h-11';
const PAPERS = ['A4', 'A3'] as const;

interface PlanFootProps {
  drawing: OpenDrawing;
  state: Plan;
  onAnother(): void;
}

/** The foot of the plan: which storey, its name, and one line about what just happened. */
export function PlanFoot({ drawing, state, onAnother }: PlanFootProps) {
  const notice = useSheet(drawing.store, (current) => current.notice);
  const [name, setName] = useState<string | null>(null);
  const { plans, plan, rights, document } = state;
  const { undo, redo } = drawing.store.getState();
  if (!plan) return null;
  const rename = () => {
    const typed = name?.trim();
    setName(null);
    if (typed && typed !== plan.name) state.run(changePlan(document, plan.id, { name: typed.slice(0, 60) }));
  };
  return (
    <div className="flex flex-col gap-1">
      {state.tool.kind && <MeasureFoot state={state} />}
      <div className={`flex flex-wrap items-center gap-x-4 ${state.tool.kind ? 'hidden' : ''}`}>
        {plans.length > 1 && (
          <Segmented
            label="Storey"
            segments={plans.map(({ id, name: called }) => ({ value: id, label: called }))}
            value={plan.id}
            onChange={state.choose}
          />
        )}
        {name === null ? (
          plans.length === 1 && <b>{plan.name}</b>
        ) : (
          <span className="flex gap-2">
            <input
              autoFocus
              dir="auto"
              aria-label="Name of the storey"
              value={name}
              maxLength={60}
              className="w-40 border-b border-ink bg-transparent px-1"
              onChange={(event) => setName(event.target.value)}
              onBlur={rename}
              onKeyDown={(event) => {
                if (event.key === 'Enter') rename();
                if (event.key === 'Escape') setName(null);
              }}
            />
            <Button onClick={rename}>Keep</Button>
          </span>
        )}
        {rights.edit && name === null && (
          <>
            {(
              [
                ['rename', () => setName(plan.name)],
                ['another storey', onAnother],
                ['take away', () => state.run(removePlan(document, plan.id))],
                [plan.scale ? 'scale anew' : 'measure the scale', () => state.measure('scale')],
                ['measure a run', () => state.measure('run')],
                ['undo', undo],
                ['redo', redo],
              ] as const
            ).map(([words, does]) => (
              <WordButton key={words} className={WORD} onClick={does}>
                {words}
              </WordButton>
            ))}
          </>
        )}
        {name === null &&
          PAPERS.map((paper) => (
            <a
              key={paper}
              className={`inline-flex items-center text-ink underline underline-offset-[3px] ${WORD}`}
              href={`/api/drawings/${drawing.store.getState().drawingId}/pdf?face=plan&storey=${encodeURIComponent(plan.id)}&paper=${paper}`}
              target="_blank"
              rel="noreferrer"
            >
              print {paper}
            </a>
          ))}
        <span className="text-grey">{scaleText(plan) ?? 'not measured'}</span>
      </div>
      <p role="status" className="min-h-4 truncate text-grey">
        {notice}
      </p>
    </div>
  );
}
