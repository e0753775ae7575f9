import type { Installation } from '../document/schema';
import type { OverviewGraph, OverviewRun } from './overview-graph';
import { BAR } from './overview-metrics';
import { leavesPlace } from './overview-routes';
import type { Label } from './labels';
import { BODY, SMALL } from './lettering';
import type { Box } from './route-grid';
import type { Feed, Point, SceneRing, SceneRun } from './scene';
import { cableSize, lengthText } from './wording';
import type { Way } from '../terminals/ways';

/** Way numbers in their rings and the tick marks of cables, on the stretch of run that has room for them. */

const TICK_PITCH = 200;
/** 1/100 mm from a run's axis to the end of its ticks, and to what is written beside them. */
const TICK_REACH = 270;
const BESIDE = 360;
const RING_OFFSET = 500;

interface Stretch {
  a: Point;
  b: Point;
  length: number;
  upright: boolean;
}

const stretches = (points: readonly Point[]): Stretch[] =>
  points.slice(1).map((b, i) => {
    const a = points[i]!;
    return { a, b, length: Math.abs(a.x - b.x) + Math.abs(a.y - b.y), upright: a.x === b.x };
  });

const along = ({ a, b, length }: Stretch, distance: number): Point => ({
  x: Math.round(a.x + ((b.x - a.x) * distance) / (length || 1)),
  y: Math.round(a.y + ((b.y - a.y) * distance) / (length || 1)),
});

/** The ring of a way on the first stretch of the run that leaves its device. */
export function ringOf(way: Way, points: readonly Point[], feed: Feed): SceneRing | null {
  const first = stretches(points)[0];
  if (!first) return null;
  // where the next part is close the ring stands on the run all the same, as far out as it can
  const at = along(first, Math.min(RING_OFFSET, Math.max(0, first.length - BAR.ringRadius)));
  return { ...at, radius: BAR.ringRadius, text: String(way.number), part: way.device, feed };
}

export interface Ticks {
  ticks: NonNullable<SceneRun['ticks']>;
  /** what the marks cover */
  box: Box;
}

/** Tick marks on the first stretch that is long enough, beginning at the source; null where none is. */
export function ticksOf(
  run: OverviewRun,
  points: readonly Point[],
  ringed: boolean,
  taken: (box: Box) => boolean,
): Ticks | null {
  if (run.cores.length === 0) return null;
  const span = TICK_PITCH * (run.cores.length - 1);
  for (const [i, stretch] of stretches(points).entries()) {
    const start = i === 0 && ringed ? RING_OFFSET + BAR.ringRadius + 230 : 330;
    for (let from = start; from + span + 250 <= stretch.length; from += 250) {
      const p = along(stretch, from);
      const q = along(stretch, from + span);
      const box = {
        x: Math.min(p.x, q.x) - (stretch.upright ? TICK_REACH : 150),
        y: Math.min(p.y, q.y) - (stretch.upright ? 150 : TICK_REACH),
        width: Math.abs(p.x - q.x) + 2 * (stretch.upright ? TICK_REACH : 150),
        height: Math.abs(p.y - q.y) + 2 * (stretch.upright ? 150 : TICK_REACH),
      };
      if (taken(box)) continue;
      // marks are listed down an upright run and from right to left along a level one
      const at = stretch.upright ? (p.y < q.y ? p : q) : p.x > q.x ? p : q;
      return { ticks: { at, vertical: stretch.upright, cores: run.cores }, box };
    }
  }
  return null;
}

/** Size and length of a run's cable, beside its ticks. */
export function cableLabel(
  doc: Installation,
  graph: OverviewGraph,
  run: OverviewRun,
  { ticks, box }: Ticks,
  ringed: boolean,
): Label | null {
  const cable = doc.cables.find((c) => c.id === run.cable);
  if (!cable || !leavesPlace(graph, run)) return null;
  const size = cableSize(cable, run.cores.length);
  const length = lengthText(cable.length);
  const middle = { x: box.x + box.width / 2, y: box.y + box.height / 2 };
  const upright = ticks.vertical;
  const loop = !ringed;
  return {
    owner: run.id,
    // a loop from room to room is named in small, and only where there is room for it
    size: loop && !upright ? SMALL : BODY,
    ...(loop && { optional: true }),
    lines: upright ? [[{ text: size }], [{ text: length }]] : [[{ text: size }, { text: length }]],
    places: upright
      ? [
          { x: ticks.at.x + BESIDE, y: middle.y, horizontal: 'start', vertical: 'middle' },
          { x: ticks.at.x - BESIDE, y: middle.y, horizontal: 'end', vertical: 'middle' },
        ]
      : [
          { x: middle.x, y: box.y + box.height + 100, horizontal: 'middle', vertical: 'top' },
          { x: middle.x, y: box.y - 100, horizontal: 'middle', vertical: 'bottom' },
        ],
  };
}
