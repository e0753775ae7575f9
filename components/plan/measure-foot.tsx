'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { cablesFor, measureCable, measurePlan } from '@/diagram/commands/measure-plan';
import { metresAlong, metresIn } from '@/diagram/document/plan-scale';
import type { Plan } from './use-plan';

const FIELD = 'border-b border-ink bg-transparent px-1 pointer-coarse:min-h-11';

/** What is asked while something is measured: how long the known length is, or to which cable the measured one goes. */
export function MeasureFoot({ state }: { state: Plan }) {
  const { tool } = state;
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-1" role="group" aria-label="Measuring">
      {tool.kind === 'scale' ? <ScaleForm state={state} /> : <RunForm state={state} />}
      {tool.line.length > 0 && <Button onClick={tool.back}>One place back</Button>}
      <Button onClick={tool.leave}>Leave</Button>
    </div>
  );
}

function ScaleForm({ state: { tool, plan, document, run, say } }: { state: Plan }) {
  const [typed, setTyped] = useState('');
  const [a, b] = tool.line;
  if (!plan) return null;
  if (!a || !b)
    return <span>{a ? 'Now the other end of it.' : 'A length that you know: click its one end, or arrows and Enter.'}</span>;
  const keep = () => {
    const metres = metresIn(typed);
    if (metres === null) say('Metres as a number. For instance 4.2.');
    else if (run(measurePlan(document, plan.id, a, b, metres))) tool.leave();
  };
  return (
    <form
      className="flex items-center gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        keep();
      }}
    >
      <label className="flex items-center gap-2">
        It is, in metres
        <input
          autoFocus
          inputMode="decimal"
          value={typed}
          placeholder="4.2"
          className={`${FIELD} w-16`}
          onChange={(event) => setTyped(event.target.value)}
        />
      </label>
      <Button type="submit" solid>
        Keep the scale
      </Button>
    </form>
  );
}

function RunForm({ state: { tool, plan, document, inHand, run, say } }: { state: Plan }) {
  const cables = cablesFor(document, inHand);
  const own = cables.filter((each) => each.own);
  const [chosen, setChosen] = useState('');
  const [rise, setRise] = useState('');
  if (!plan) return null;
  const flat = metresAlong(plan, tool.line) ?? 0;
  if (tool.line.length < 2)
    return <span>Click along the way of the run, corner by corner, or arrows and Enter.</span>;
  const up = rise.trim() === '' ? 0 : metresIn(rise);
  const cable = chosen || (own.length === 1 ? own[0]!.cable.id : '');
  const write = () => {
    if (up === null) say('Metres up and down as a number. For instance 2.4.');
    else if (run(measureCable(document, cable, flat + up))) tool.leave();
  };
  return (
    <form
      className="flex flex-wrap items-center gap-x-3 gap-y-1"
      onSubmit={(event) => {
        event.preventDefault();
        write();
      }}
    >
      <b>{(flat + (up ?? 0)).toFixed(1)} m</b>
      <label className="flex items-center gap-2" title="A plan shows no heights: what goes up and down the walls is added">
        with up and down, m
        <input
          inputMode="decimal"
          value={rise}
          placeholder="0"
          className={`${FIELD} w-12`}
          onChange={(event) => setRise(event.target.value)}
        />
      </label>
      <label className="flex min-w-0 items-center gap-2">
        for
        <select value={cable} className={`${FIELD} max-w-56 bg-paper`} onChange={(event) => setChosen(event.target.value)}>
          <option value="">which cable?</option>
          {cables.map(({ cable: { id, length }, name }) => (
            <option key={id} value={id}>
              {name}, {length} m now
            </option>
          ))}
        </select>
      </label>
      <Button type="submit" solid disabled={cable === ''}>
        Write it
      </Button>
    </form>
  );
}
