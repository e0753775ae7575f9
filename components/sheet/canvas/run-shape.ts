import type { SVGAttributes } from 'react';
import { CORE_DASH, HOP_RADIUS, runPath } from '@/diagram/paper/draw-scene';
import type { Point, SceneRun } from '@/diagram/layout/scene';
import { STROKE } from '@/diagram/symbols/types';
import { INK } from './units';

/** Widths of a cased core on the connections face, 1/100 mm. */
export const CASED_CORE = { outer: 190, inner: 140 } as const;

/** While an end is dragged a run is a plain elbow; its route is worked out again on the drop. */
export function elbow(run: SceneRun, start: Point, end: Point): string {
  const first = run.points[0]!;
  const second = run.points[1] ?? first;
  const upright = first.x === second.x;
  const middle = upright ? (start.y + end.y) / 2 : (start.x + end.x) / 2;
  return upright
    ? `M${start.x} ${start.y}V${middle}H${end.x}V${end.y}`
    : `M${start.x} ${start.y}H${middle}V${end.y}H${end.x}`;
}

/** Paths of runs, worked out once: a run of a scene never changes. */
const paths = new WeakMap<SceneRun, string>();
export function pathOf(run: SceneRun): string {
  let d = paths.get(run);
  if (d === undefined) paths.set(run, (d = runPath(run)));
  return d;
}

/** The arc by which a level run hops over another. */
export const hopPath = ({ x, y }: Point): string =>
  `M${x - HOP_RADIUS} ${y}A${HOP_RADIUS} ${HOP_RADIUS} 0 0 1 ${x + HOP_RADIUS} ${y}`;

export type Core = 'L' | 'N' | 'E';
export const coreOf = (run: SceneRun): Core => (run.role === 'neutral' ? 'N' : run.role === 'earth' ? 'E' : 'L');

const FALLBACK: Record<Core, string> = { L: 'BN', N: 'BU', E: 'GNYE' };
const KNOWN = new Set(['BN', 'BU', 'BK', 'GY', 'RD', 'YE', 'GNYE', 'WH']);

/** Ink of a core on the connections face, as a colour of the theme. */
export const coreInk = (run: SceneRun): string => {
  const code = run.colour && KNOWN.has(run.colour) ? run.colour : run.colour === 'GN' ? 'GNYE' : FALLBACK[coreOf(run)];
  return `var(--core-${code})`;
};

export const isCased = (run: SceneRun): boolean => run.feed === 'backup' && run.role !== 'earth';

/** How a run is stroked: by its core on the connections face, by its weight on the overview; dashed by its core on both. */
export function runStroke(run: SceneRun, cores: boolean): SVGAttributes<SVGPathElement> {
  const core = coreOf(run);
  return {
    fill: 'none',
    stroke: cores ? coreInk(run) : 'var(--ink)',
    strokeWidth: (cores ? 50 : STROKE[run.weight]) * INK,
    strokeDasharray: core === 'L' ? undefined : CORE_DASH[core].join(' '),
    strokeLinecap: core === 'L' ? 'round' : 'butt',
    strokeLinejoin: 'round',
  };
}
