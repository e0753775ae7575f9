'use client';

import { useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import type { Slip, SlipLine } from './use-slip';

/** lines offered before the rest is asked for */
const FIRST = 4;
const TALL = 'min-h-12 px-4';

/** A figure of the ghost with a step down and a step up beside it. */
function Stepper({ label, value, unit, onStep }: { label: string; value: number; unit: string; onStep(by: 1 | -1): void }) {
  return (
    <div role="group" aria-label={label} className="flex items-center">
      <output className="flex min-h-12 items-center border border-ink px-3">
        {label} {value}
        {unit && ` ${unit}`}
      </output>
      <Button className="-ml-px min-h-12 min-w-12 justify-center" aria-label={`${label} less`} onClick={() => onStep(-1)}>
        -
      </Button>
      <Button className="-ml-px min-h-12 min-w-12 justify-center" aria-label={`${label} more`} onClick={() => onStep(1)}>
        +
      </Button>
    </div>
  );
}

function Steppers({ slip, line }: { slip: Slip; line: SlipLine }) {
  const set = (id: string, value: number, least: number, most: number) =>
    slip.setValue(id, Math.max(least, Math.min(most, value)));
  return (
    <>
      {line.values.map(({ id, label, unit, value, least, most }) => {
        const now = slip.choice[id] ?? value;
        return (
          <Stepper key={id} label={label} value={now} unit={unit} onStep={(by) => set(id, now + by, least, most)} />
        );
      })}
      {line.counts.map(({ id, label, count, most }) => {
        const now = slip.choice[id] ?? count;
        return <Stepper key={id} label={label} value={now} unit="" onStep={(by) => set(id, now + by, 0, most)} />;
      })}
    </>
  );
}

interface SlipFootProps {
  slip: Slip;
  /** "Q17:2" */
  name: string;
  onLeave(): void;
}

/** The slip as the foot of the screen, for fingers: what comes next as tall buttons, its figures with steps beside them. */
export function SlipFoot({ slip, name, onLeave }: SlipFootProps) {
  const [all, setAll] = useState(false);
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => {
    if (all) field.current?.focus({ preventScroll: true });
  }, [all]);
  const line = slip.lines[slip.index];
  const shown = all ? slip.lines : slip.lines.slice(0, FIRST);
  const rest = slip.lines.length - shown.length;
  const leave = () => {
    slip.leave();
    onLeave();
  };
  return (
    <div
      role="dialog"
      aria-label={`What comes next after ${name}`}
      className="flex flex-col gap-2 border-t-2 border-ink bg-paper px-4 py-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') leave();
      }}
    >
      <h2 className="text-head font-bold">
        {name} in hand. <span className="font-normal">Tap where its cable goes, or take what comes next:</span>
      </h2>
      {all && (
        <input
          ref={field}
          aria-label={`What comes next after ${name}: type to narrow`}
          placeholder="A room, or what it is to have"
          value={slip.typed}
          onChange={(event) => slip.type(event.target.value)}
          className="min-h-11 border-b border-ink bg-transparent px-1 text-head"
          autoComplete="off"
          spellCheck={false}
        />
      )}
      <div role="group" aria-label="What comes next" className="flex max-h-[38dvh] flex-wrap gap-2 overflow-y-auto">
        {shown.map((each, i) => (
          <Button
            key={each.id}
            className={`${TALL} max-w-full flex-col !items-start !gap-0`}
            solid={i === slip.index}
            aria-pressed={i === slip.index}
            onClick={() => slip.choose(i)}
          >
            <span>
              {each.assembly && '+ '}
              {each.what}
            </span>
            {each.danger && <span className="text-small">would bring a danger: {each.danger}</span>}
          </Button>
        ))}
        {!all && (
          <Button className={TALL} onClick={() => setAll(true)}>
            {rest > 0 ? `${rest} more` : 'Type a room'}
          </Button>
        )}
      </div>
      {slip.lines.length === 0 && (
        <p>{slip.typed ? `Nothing that begins so fits ${name}.` : `Nothing comes after ${name}: tap where its wire goes.`}</p>
      )}
      {line && <p className="text-grey">{[line.detail, line.reason].filter(Boolean).join('; ')}</p>}
      <div className="flex flex-wrap items-center gap-2">
        {line && <Steppers slip={slip} line={line} />}
        <span className="flex-1" />
        <Button className={TALL} onClick={leave}>
          Leave
        </Button>
        <Button
          className={TALL}
          solid
          disabled={!line}
          onClick={() => {
            slip.place(false);
            onLeave();
          }}
        >
          Place
        </Button>
      </div>
    </div>
  );
}
