import { runPath } from '@/diagram/paper/draw-scene';
import type { Point, SceneRun } from '@/diagram/layout/scene';

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

export const pathOf = (run: SceneRun): string => runPath(run);

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
