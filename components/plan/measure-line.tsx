import { metresAlong, type Place } from '@/diagram/document/plan-scale';
import type { FloorPlan } from '@/diagram/document/schema';
import { LETTERS } from './plan-part';
import type { Tool } from './use-tool';

const pathOf = (line: readonly Place[]): string => line.map(({ x, y }, i) => `${i === 0 ? 'M' : 'L'}${x} ${y}`).join('');

/** What is being measured, over the plan: the places put down, the stretch to the pointer, and the metres so far. */
export function MeasureLine({ tool, plan }: { tool: Tool; plan: FloorPlan }) {
  const { kind, line, at } = tool;
  if (!kind) return null;
  const open = kind === 'run' || line.length < 2;
  const whole = open && line.length > 0 ? [...line, at] : line;
  const metres = kind === 'run' && whole.length > 1 ? metresAlong(plan, whole) : null;
  const last = whole.at(-1) ?? at;
  return (
    <g pointerEvents="none" data-measure={kind} fill="none" className="stroke-blue" strokeWidth={2}>
      <path d={pathOf(line)} vectorEffect="non-scaling-stroke" />
      {open && line.length > 0 && (
        <path d={pathOf([line.at(-1)!, at])} strokeDasharray="6 4" vectorEffect="non-scaling-stroke" />
      )}
      {line.map(({ x, y }, i) => (
        <circle key={i} cx={x} cy={y} r={120} className="fill-paper" vectorEffect="non-scaling-stroke" />
      ))}
      {open && (
        <path
          d={`M${at.x - 300} ${at.y}H${at.x + 300}M${at.x} ${at.y - 300}V${at.y + 300}`}
          vectorEffect="non-scaling-stroke"
        />
      )}
      {metres !== null && (
        <text
          x={last.x + 250}
          y={last.y - 250}
          fontSize={LETTERS}
          className="fill-ink stroke-paper font-bold"
          strokeWidth={160}
          strokeLinejoin="round"
          paintOrder="stroke"
        >
          {metres.toFixed(1)} m
        </text>
      )}
    </g>
  );
}

/** The plan's own scale, where it was measured: a thin line between the two places. */
export function ScaleMark({ plan: { scale } }: { plan: FloorPlan }) {
  if (!scale) return null;
  const { a, b, metres } = scale;
  return (
    <g pointerEvents="none" data-scale="" className="stroke-blue" fill="none" strokeWidth={1}>
      <path d={pathOf([a, b])} strokeDasharray="3 3" vectorEffect="non-scaling-stroke" />
      {[a, b].map(({ x, y }) => (
        <circle key={`${x} ${y}`} cx={x} cy={y} r={70} vectorEffect="non-scaling-stroke" />
      ))}
      <text
        x={(a.x + b.x) / 2}
        y={(a.y + b.y) / 2 - 150}
        fontSize={LETTERS * 0.8}
        textAnchor="middle"
        className="fill-blue stroke-paper"
        strokeWidth={140}
        strokeLinejoin="round"
        paintOrder="stroke"
      >
        {metres} m
      </text>
    </g>
  );
}
