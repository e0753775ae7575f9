'use client';

import { useEffect, useLayoutEffect, useId, useRef, type KeyboardEvent } from 'react';
import { Button } from '@/components/ui/button';
import type { SlipLine, Slip } from './use-slip';

/** The piece of a line that begins as typed is underlined. */
function Marked({ text, typed }: { text: string; typed: string }) {
  const piece = typed.trim().split(/\s+/)[0]?.toLowerCase() ?? '';
  const at =
    piece === ''
      ? -1
      : text.toLowerCase().search(new RegExp(`(^|[\\s,])${piece.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')}`));
  if (at < 0) return <b>{text}</b>;
  const start = at === 0 ? 0 : at + 1;
  return (
    <b>
      {text.slice(0, start)}
      <span className="underline decoration-2 underline-offset-2">{text.slice(start, start + piece.length)}</span>
      {text.slice(start + piece.length)}
    </b>
  );
}

function Line({
  line,
  number,
  chosen,
  typed,
  id,
  onChoose,
  onPlace,
}: {
  line: SlipLine;
  number: number;
  chosen: boolean;
  typed: string;
  id: string;
  onChoose(): void;
  onPlace(): void;
}) {
  return (
    <li
      id={id}
      role="option"
      aria-selected={chosen}
      className={`grid cursor-pointer grid-cols-[28px_1fr] border-b border-hair px-2 py-[6px] pointer-coarse:min-h-12 ${chosen ? 'bg-ink text-paper' : ''}`}
      onClick={() => (chosen ? onPlace() : onChoose())}
    >
      <span className="text-small leading-4">{line.assembly ? '+' : number}</span>
      <span>
        <Marked text={line.what} typed={typed} /> <span className="ml-2">{line.detail}</span>
        <span className={`block text-small ${chosen ? '' : line.danger ? 'text-red' : 'text-grey'}`}>
          {line.danger ? `would bring a danger: ${line.danger}` : line.reason}
        </span>
      </span>
    </li>
  );
}

function Numbers({ slip, line }: { slip: Slip; line: SlipLine }) {
  const row = 'flex items-center gap-2';
  const step = (id: string, by: number, least: number, most: number) =>
    slip.setValue(id, Math.max(least, Math.min(most, (slip.choice[id] ?? 0) + by)));
  return (
    <div className="grid grid-cols-[repeat(auto-fill,minmax(216px,1fr))] gap-x-6 gap-y-2 border-b border-hair px-2 py-2">
      {line.values.map((value) => (
        <label key={value.id} className={row}>
          <span className="w-24 shrink-0 text-grey">{value.label}</span>
          <input
            type="number"
            inputMode="decimal"
            min={value.least}
            max={value.most}
            value={slip.choice[value.id] ?? value.value}
            onChange={(event) =>
              slip.setValue(
                value.id,
                Math.max(value.least, Math.min(value.most, Number(event.target.value) || value.least)),
              )
            }
            className="w-20 border-b border-ink bg-transparent px-1 pointer-coarse:min-h-11"
          />
          <span className="text-grey">{value.unit}</span>
        </label>
      ))}
      {line.counts.map((count) => (
        <div key={count.id} className={row} role="group" aria-label={count.label}>
          <span className="w-24 shrink-0">{count.label}</span>
          <Button aria-label={`one ${count.label} less`} onClick={() => step(count.id, -1, 0, count.most)}>
            -
          </Button>
          <output className="w-6 text-center">{slip.choice[count.id] ?? count.count}</output>
          <Button aria-label={`one ${count.label} more`} onClick={() => step(count.id, 1, 0, count.most)}>
            +
          </Button>
        </div>
      ))}
    </div>
  );
}

interface SlipProps {
  slip: Slip;
  /** "Q17:2" */
  name: string;
  /** back to the sheet when the slip closes */
  onLeave(): void;
}

/** What comes next at the terminal in hand: typed to narrow, placed whole by Enter. */
export function SlipPanel({ slip, name, onLeave }: SlipProps) {
  const field = useRef<HTMLInputElement>(null);
  const list = useId();
  const line = slip.lines[slip.index];
  useLayoutEffect(() => field.current?.focus({ preventScroll: true }), [name]);
  useEffect(() => {
    document.getElementById(`${list}-${slip.index}`)?.scrollIntoView({ block: 'nearest' });
  }, [list, slip.index]);

  const leave = () => {
    slip.leave();
    onLeave();
  };
  const place = (goOn: boolean) => {
    slip.place(goOn);
    onLeave();
  };
  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    const inField = event.target === field.current;
    const atEnd = inField && field.current?.selectionStart === slip.typed.length;
    const digit = event.altKey && /^Digit[1-9]$/.test(event.code) ? Number(event.code.slice(5)) : 0;
    const act = (): boolean => {
      if (event.key === 'Escape') leave();
      else if (digit > 0 && slip.lines[digit - 1]) slip.choose(digit - 1);
      else if (event.key === 'Enter' && !(event.target instanceof HTMLButtonElement)) place(event.shiftKey);
      else if (event.key === 'ArrowDown' && inField) slip.choose(slip.index + 1);
      else if (event.key === 'ArrowUp' && inField) slip.choose(slip.index - 1);
      else if (event.key === 'ArrowRight' && atEnd && line && !slip.open) slip.setOpen(true);
      else if (event.key === 'ArrowLeft' && atEnd && slip.open) slip.setOpen(false);
      else return false;
      return true;
    };
    event.stopPropagation();
    if (act()) event.preventDefault();
  };

  return (
    <div
      role="dialog"
      aria-label={`What comes next after ${name}`}
      className="border-y-2 border-ink bg-paper"
      onKeyDown={onKeyDown}
    >
      <div className="flex items-baseline gap-3 border-b border-ink px-2 py-1">
        <span className="shrink-0 text-grey">after {name}</span>
        <input
          ref={field}
          role="combobox"
          aria-expanded="true"
          aria-controls={list}
          aria-activedescendant={line ? `${list}-${slip.index}` : undefined}
          aria-label={`What comes next after ${name}: type to narrow`}
          value={slip.typed}
          onChange={(event) => slip.type(event.target.value)}
          className="min-w-0 flex-1 bg-transparent py-1 text-head font-bold outline-none pointer-coarse:min-h-11"
          autoComplete="off"
          spellCheck={false}
        />
        <span className="shrink-0 text-small text-grey">
          {slip.typed ? `${slip.lines.length} of ${slip.all} fit` : `${slip.all} fit`}
        </span>
      </div>
      <ul
        id={list}
        role="listbox"
        aria-label="What comes next"
        className="max-h-[min(46dvh,420px)] overflow-y-auto max-sm:max-h-[26dvh]"
      >
        {slip.lines.map((each, i) => (
          <Line
            key={each.id}
            id={`${list}-${i}`}
            line={each}
            number={i + 1}
            typed={slip.typed}
            chosen={i === slip.index}
            onChoose={() => slip.choose(i)}
            onPlace={() => place(false)}
          />
        ))}
      </ul>
      {slip.lines.length === 0 && (
        <p className="px-2 py-3">
          {slip.typed
            ? `Nothing that begins so fits ${name}.`
            : `Nothing comes after ${name}: draw a wire from it with w.`}{' '}
          {slip.typed && <Button onClick={() => slip.type('')}>All {slip.all}</Button>}
        </p>
      )}
      {line && slip.open && <Numbers slip={slip} line={line} />}
      <div className="flex flex-wrap items-center gap-2 px-2 py-2">
        <Button solid onClick={() => place(false)} disabled={!line}>
          Place
        </Button>
        {line && (line.values.length > 0 || line.counts.length > 0) && (
          <Button aria-expanded={slip.open} onClick={() => slip.setOpen(!slip.open)}>
            {slip.open ? 'Fold' : line.counts.length > 0 ? 'Parts and metres' : 'Metres and watts'}
          </Button>
        )}
        <Button onClick={leave}>Leave</Button>
        <span className="text-small text-grey max-lap:hidden">Shift Enter: place, go on from its end. → opens.</span>
      </div>
    </div>
  );
}
