'use client';

import { useLayoutEffect, useMemo, useRef, type ReactNode } from 'react';
import { SymbolGlyph } from '@/components/frame/symbol-glyph';
import { Button } from '@/components/ui/button';
import type { PracticeId } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import type { SymbolData } from '@/diagram/symbols/types';
import { coreLines } from './core-legend';
import { symbolsOn } from './legend-lines';

const BOX = { width: 56, height: 40 } as const;
const ink = { stroke: 'var(--ink)', strokeWidth: 1.6, fill: 'none' } as const;

function Glyph({ symbol }: { symbol: SymbolData }) {
  const edge = 100;
  return (
    <svg
      viewBox={`${-edge} ${-edge} ${symbol.width + 2 * edge} ${symbol.height + 2 * edge}`}
      {...BOX}
      aria-hidden="true"
      className="shrink-0"
    >
      <SymbolGlyph symbol={symbol} x={0} y={0} />
    </svg>
  );
}

/** Marks of the drawing that are no symbols of parts. */
const MARKS: readonly { words: string; draw: ReactNode; face?: Scene['face'] }[] = [
  { words: 'joint of conductors', draw: <><path d="M4 20H52M28 20V36" {...ink} /><circle cx="28" cy="20" r="4" fill="var(--ink)" /></> },
  { words: 'crossing, not joined', draw: <path d="M4 20H20A8 8 0 0 1 36 20H52M28 36V4" {...ink} /> },
  {
    words: 'cores of a run: plain L, dotted N, barred PE',
    face: 'overview',
    draw: (
      <>
        <path d="M4 20H52M14 28L22 12M26 28L34 12M38 28L46 12M42 9L50 15" {...ink} />
        <circle cx="34" cy="12" r="2.6" fill="var(--ink)" />
      </>
    ),
  },
  { words: 'number of a way', face: 'overview', draw: <><path d="M28 2V10M28 30V38" {...ink} /><circle cx="28" cy="20" r="10" {...ink} /><text x="28" y="24" fontSize="11" fontWeight="700" textAnchor="middle" fill="var(--ink)">4</text></> },
  { words: 'terminal', face: 'connections', draw: <circle cx="28" cy="20" r="6" {...ink} /> },
  { words: 'terminal in hand', draw: <><circle cx="28" cy="20" r="14" {...ink} strokeWidth={1} strokeDasharray="4 3" /><circle cx="28" cy="20" r="5" {...ink} strokeWidth={3} /></> },
  { words: 'room', draw: <rect x="4" y="6" width="48" height="28" stroke="var(--rule)" fill="none" strokeWidth={1.6} strokeDasharray="6 4" /> },
  { words: 'switchboard or box', draw: <rect x="4" y="6" width="48" height="28" {...ink} /> },
  { words: 'not placed yet', draw: <path d="M4 20H52" stroke="var(--ghost)" strokeWidth={2.4} strokeDasharray="7 5" fill="none" /> },
  { words: 'finding of this letter', draw: <><rect x="20" y="12" width="16" height="16" fill="var(--red)" /><text x="28" y="24" fontSize="12" fontWeight="700" textAnchor="middle" fill="var(--paper)">a</text></> },
];

function Line({ picture, children }: { picture: ReactNode; children: ReactNode }) {
  return (
    <li className="flex items-center gap-3">
      {picture}
      <span>{children}</span>
    </li>
  );
}

interface LegendPanelProps {
  scene: Scene;
  practice: PracticeId;
  onLeave(): void;
}

/** What every symbol and line on this face is called. */
export function LegendPanel({ scene, practice, onLeave }: LegendPanelProps) {
  const close = useRef<HTMLButtonElement>(null);
  useLayoutEffect(() => close.current?.focus(), []);
  const symbols = useMemo(() => symbolsOn(scene), [scene]);
  const columns = 'mt-2 grid grid-cols-[repeat(auto-fill,minmax(196px,1fr))] gap-x-4 gap-y-1';
  return (
    <div
      role="dialog"
      aria-label="Legend"
      className="max-h-[min(78dvh,640px)] overflow-y-auto border-y-2 border-ink bg-paper p-3"
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape' || event.key === 'k') onLeave();
      }}
    >
      <div className="flex items-start justify-between gap-4">
        <h2 className="text-head font-bold">Legend</h2>
        <Button ref={close} onClick={onLeave}>
          Close
        </Button>
      </div>
      <ul aria-label="Lines" className={columns}>
        {coreLines(practice, scene.face).map(({ words, line }) => (
          <Line key={words} picture={<span className="flex w-14 shrink-0 justify-center">{line}</span>}>
            {words}
          </Line>
        ))}
      </ul>
      <ul aria-label="Symbols on this sheet" className={`${columns} border-t border-hair pt-2`}>
        {symbols.map((symbol) => (
          <Line key={symbol.name} picture={<Glyph symbol={symbol} />}>
            {symbol.name}
          </Line>
        ))}
      </ul>
      <ul aria-label="Marks" className={`${columns} border-t border-hair pt-2`}>
        {MARKS.filter(({ face }) => face === undefined || face === scene.face).map(({ words, draw }) => (
          <Line
            key={words}
            picture={
              <svg viewBox="0 0 56 40" {...BOX} aria-hidden="true" className="shrink-0">
                {draw}
              </svg>
            }
          >
            {words}
          </Line>
        ))}
      </ul>
      <p className="mt-3 border-t border-hair pt-2 text-small text-grey">
        Symbols after IEC 60617, drawn for Ohmstead. The canvas is React Flow (xyflow, MIT), tidying for short wires is ELK
        (Eclipse, EPL-2.0), the lettering is JetBrains Mono (OFL 1.1).
      </p>
    </div>
  );
}
