import { memo } from 'react';
import type { NodeProps } from 'reactflow';
import type { ScenePart } from '@/diagram/layout/scene';
import { symbolById } from '@/diagram/symbols';
import { turnTransform } from '@/diagram/symbols/turn';
import { STROKE, type Stroke } from '@/diagram/symbols/types';
import type { PartNode } from './flow-items';
import { joinedStrokes } from './symbol-strokes';
import { INK } from './units';

const FILL = { ink: 'currentColor', paper: 'var(--paper)', none: 'none' } as const;
const DASH = { short: '90 70', long: '220 120' } as const;

const inkOf = (part: ScenePart): string =>
  part.kind === 'neutral-bar' ? 'var(--core-BU)' : part.kind === 'earth-bar' ? 'var(--core-GNYE)' : 'var(--ink)';

function Line({ stroke }: { stroke: Stroke }) {
  return (
    <path
      d={stroke.d}
      fill={FILL[stroke.fill ?? 'none']}
      strokeWidth={STROKE[stroke.weight ?? 'normal'] * INK}
      strokeDasharray={stroke.dash && DASH[stroke.dash]}
    />
  );
}

/** The picture of a part: its own strokes in one svg, in 1/100 mm. */
export function PartPicture({ part, ink = inkOf(part) }: { part: ScenePart; ink?: string }) {
  const symbol = symbolById(part.symbol, part.turn % 2 === 1 ? part.height : part.width);
  return (
    <g
      transform={turnTransform(0, 0, symbol, part.turn) || undefined}
      color={ink}
      stroke="currentColor"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      {joinedStrokes(symbol).map((stroke, i) => (
        <Line key={i} stroke={stroke} />
      ))}
    </g>
  );
}

/** One part on the canvas. Selection, terminals and lettering are layers of their own. */
export const PartNodeView = memo(function PartNodeView({ data: { part } }: NodeProps<PartNode>) {
  return (
    <svg
      data-part={part.id}
      viewBox={`0 0 ${part.width} ${part.height}`}
      className="block h-full w-full overflow-visible"
      aria-hidden="true"
    >
      <PartPicture part={part} />
    </svg>
  );
});
