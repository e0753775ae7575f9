import { memo } from 'react';
import { Handle, Position, type Node, type NodeProps } from 'reactflow';
import { INK, px } from '@/components/sheet/canvas/units';
import type { ScenePart } from '@/diagram/layout/scene';
import { strokesIn } from '@/diagram/rehearsal/position-strokes';
import { symbolById } from '@/diagram/symbols';
import { turnTransform } from '@/diagram/symbols/turn';
import { STROKE, type Stroke } from '@/diagram/symbols/types';
import type { PartLook } from '../looks';

export type LookNode = Node<{ part: ScenePart; look: PartLook; operable: boolean }, 'look'>;

const FILL = { ink: 'currentColor', paper: 'var(--paper)', none: 'none' } as const;
const DASH = { short: '90 70', long: '220 120' } as const;
/** what is dead is dotted */
export const DOTTED = '10 95';

const inkOf = ({ kind }: ScenePart, { state }: PartLook): string => {
  if (state === 'dead') return 'var(--grey)';
  return kind === 'neutral-bar' ? 'var(--core-BU)' : kind === 'earth-bar' ? 'var(--core-GNYE)' : 'var(--ink)';
};

function Line({ stroke, dead }: { stroke: Stroke; dead: boolean }) {
  const dash = dead ? DOTTED : stroke.dash && DASH[stroke.dash];
  return (
    <path
      d={stroke.d}
      fill={dead && stroke.fill === 'ink' ? 'none' : FILL[stroke.fill ?? 'none']}
      stroke="currentColor"
      strokeWidth={STROKE[stroke.weight ?? 'normal'] * INK * (dead ? 1.2 : 1)}
      strokeDasharray={dash}
      strokeLinecap="round"
      strokeLinejoin="round"
    />
  );
}

const AROUND = 125;

/** 1/100 mm: radius of the ring about a part that draws current */
const ringOf = ({ width, height }: Pick<ScenePart, 'width' | 'height'>): number => Math.max(width, height) / 2 + 95;

/** A part as it stands, from its own corner: dotted when dead, ringed when at work, its contact closed or apart. */
export const LookPicture = memo(function LookPicture({ part, look }: { part: ScenePart; look: PartLook }) {
  const symbol = symbolById(part.symbol, part.turn % 2 === 1 ? part.height : part.width);
  return (
    <>
      <g transform={turnTransform(0, 0, symbol, part.turn)} style={{ color: inkOf(part, look) }}>
        {strokesIn(symbol, look.setting).map((stroke, i) => (
          <Line key={i} stroke={stroke} dead={look.state === 'dead'} />
        ))}
      </g>
      {look.works && (
        <circle
          cx={part.width / 2}
          cy={part.height / 2}
          r={ringOf(part)}
          fill="none"
          stroke="var(--ink)"
          strokeWidth={STROKE.normal * INK}
        />
      )}
    </>
  );
});

/** One part of the rehearsal as it stands, with room about it for a pointer where it can be turned. */
export const LookNodeView = memo(function LookNodeView({ data: { part, look, operable } }: NodeProps<LookNode>) {
  return (
    <>
      <svg
        data-part={part.id}
        data-state={look.state}
        viewBox={`0 0 ${part.width} ${part.height}`}
        className={`block h-full w-full overflow-visible ${operable ? 'cursor-pointer' : ''}`}
        aria-hidden="true"
      >
        <rect
          x={-AROUND}
          y={-AROUND}
          width={part.width + 2 * AROUND}
          height={part.height + 2 * AROUND}
          fill="transparent"
        />
        {/* A finger gets its 44 px about a switch, whatever the size of the symbol. */}
        {operable && (
          <circle
            cx={part.width / 2}
            cy={part.height / 2}
            r={Math.max(ringOf(part), 22 / px(1))}
            fill="transparent"
            className="hidden pointer-coarse:block"
          />
        )}
        <LookPicture part={part} look={look} />
      </svg>
      <Handle type="source" position={Position.Top} isConnectable={false} className="invisible" />
    </>
  );
});

/** A part as a node of the canvas; its size is the symbol's, never measured. */
export function lookNode(part: ScenePart, look: PartLook, operable: boolean): LookNode {
  const size = { width: Math.round(px(part.width)), height: Math.round(px(part.height)) };
  return {
    id: part.id,
    type: 'look',
    position: { x: px(part.x), y: px(part.y) },
    ...size,
    measured: size,
    handles: [{ type: 'source', position: Position.Top, x: 0, y: 0, width: 1, height: 1 }],
    data: { part, look, operable },
  };
}
