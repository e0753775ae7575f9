import type { PointerEvent } from 'react';
import { SymbolGlyph } from '@/components/frame/symbol-glyph';
import type { Part, PlanPosition } from '@/diagram/document/schema';
import { Padlock } from '@/components/frame/padlock';
import { symbolFor } from '@/diagram/symbols';
import { turnedSize } from '@/diagram/symbols/turn';

/** 1/100 mm, height of a designation */
export const LETTERS = 380;
const ROOM = 150;

interface PlanPartProps {
  part: Part;
  at: Pick<PlanPosition, 'x' | 'y' | 'turn'>;
  held?: boolean;
  /** held where it hangs */
  locked?: boolean;
  /** on its way to a place */
  ghost?: boolean;
  label?: string;
  onPointerDown?(event: PointerEvent): void;
}

/** A part on a floor plan: its symbol of the overview on a ground that keeps it readable over any picture. */
export function PlanPart({ part, at, held = false, locked = false, ghost = false, label, onPointerDown }: PlanPartProps) {
  const symbol = symbolFor(part, 'overview');
  const turn = at.turn ?? 0;
  const { width, height } = turnedSize(symbol, turn);
  // The glyph turns about its own middle: it is put so that the turned box begins at the part's corner.
  const x = (width - symbol.width) / 2;
  const y = (height - symbol.height) / 2;
  return (
    <g
      transform={`translate(${at.x} ${at.y})`}
      data-part={part.id}
      data-held={held || undefined}
      className={onPointerDown ? 'cursor-grab touch-none' : undefined}
      onPointerDown={onPointerDown}
      opacity={ghost ? 0.7 : undefined}
    >
      {label && <title>{label}</title>}
      <rect
        x={-ROOM}
        y={-ROOM}
        width={width + 2 * ROOM}
        height={height + 2 * ROOM}
        className={held ? 'fill-marker stroke-ink' : 'fill-paper stroke-none'}
        fillOpacity={held ? 1 : 0.86}
        strokeWidth={1}
        strokeDasharray="3 2"
        vectorEffect="non-scaling-stroke"
      />
      <SymbolGlyph symbol={symbol} x={x} y={y} turn={(turn * 90) as 0 | 90 | 180 | 270} />
      {locked && <Padlock x={-ROOM - 220} y={0} />}
      {part.ref && (
        <text
          x={width + 2 * ROOM}
          y={LETTERS}
          fontSize={LETTERS}
          className="fill-ink stroke-paper font-bold"
          strokeWidth={160}
          strokeLinejoin="round"
          paintOrder="stroke"
        >
          {part.ref}
        </text>
      )}
    </g>
  );
}
