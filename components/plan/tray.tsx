'use client';

import { SymbolGlyph } from '@/components/frame/symbol-glyph';
import { nameOf } from '@/diagram/document/names';
import { symbolFor } from '@/diagram/symbols';
import type { Plan } from './use-plan';

/** Parts that stand on no plan yet, by room: each is carried to its place from here. */
export function Tray({ state, onCarry }: { state: Plan; onCarry(id: string): void }) {
  const { waiting, placing, document, rights } = state;
  const count = waiting.reduce((sum, { parts }) => sum + parts.length, 0);
  return (
    <section aria-label="Not placed yet">
      <h2 className="text-head font-bold">{count === 0 ? 'Everything is placed' : `Not placed yet: ${count}`}</h2>
      {count > 0 && rights.edit && (
        <p className="mt-1 text-small text-grey">
          Choose a part, then click where it stands. The next of its room follows by itself; Esc ends.
        </p>
      )}
      {waiting.map(({ place, name, parts }) => (
        <div key={place ?? ''} className="mt-4">
          <h3 className="border-b border-hair pb-1 font-semibold">{name}</h3>
          <ul className="mt-1 grid grid-cols-2 gap-x-2">
            {parts.map((part) => {
              const symbol = symbolFor(part, 'overview');
              return (
                <li key={part.id}>
                  <button
                    type="button"
                    disabled={!rights.edit || !state.plan}
                    aria-pressed={placing === part.id}
                    className="flex min-h-8 w-full cursor-pointer items-center gap-2 px-1 text-left hover:bg-lane disabled:cursor-default aria-pressed:bg-marker aria-pressed:font-bold pointer-coarse:min-h-11"
                    onClick={() => onCarry(part.id)}
                  >
                    <svg
                      viewBox={`-100 -100 ${symbol.width + 200} ${symbol.height + 200}`}
                      className="size-6 shrink-0"
                      aria-hidden="true"
                    >
                      <SymbolGlyph symbol={symbol} x={0} y={0} />
                    </svg>
                    <span className="min-w-0 truncate">{nameOf(document, part)}</span>
                  </button>
                </li>
              );
            })}
          </ul>
        </div>
      ))}
    </section>
  );
}
