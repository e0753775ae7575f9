import type { Point } from '@/diagram/layout/scene';

/** px on the screen */
export interface Rect extends Point {
  width: number;
  height: number;
}

/** px from one channel that is tried to the next, and how many either way */
const STEP = 6;
const TRIED = 40;
/** px that a leader keeps from the edge it comes in at */
const EDGE = 14;
/** what crossing a part or its lettering costs, in px of detour */
const CROSSED = 60;

const crosses = (rect: Rect, y: number, left: number, right: number): boolean =>
  y > rect.y - 2 && y < rect.y + rect.height + 2 && rect.x < right && rect.x + rect.width > left;

/**
 * The way of a leader from a note at the right to the circle about its place: along a level that is as free of parts and
 * lettering as can be had near it, then to the circle from above, below or beside.
 * @param from at the edge of the sheet, beside the note
 * @param circle the pencil circle about the place
 * @param taken what it should not run through
 */
export function leaderPath(from: Point, circle: Rect, taken: readonly Rect[]): Point[] {
  const middle = { x: circle.x + circle.width / 2, y: circle.y + circle.height / 2 };
  const right = from.x - EDGE;
  let best = middle.y;
  let least = Infinity;
  for (let i = -TRIED; i <= TRIED; i++) {
    const y = middle.y + i * STEP;
    if (y < 4) continue;
    const beside = Math.abs(y - middle.y) < circle.height / 2;
    const left = beside ? circle.x + circle.width : middle.x;
    const cost = taken.filter((rect) => crosses(rect, y, left, right)).length * CROSSED + Math.abs(y - middle.y);
    if (cost < least) {
      least = cost;
      best = y;
    }
  }
  const start = [from, { x: right, y: from.y }, { x: right, y: best }];
  if (Math.abs(best - middle.y) < circle.height / 2) return [...start, { x: circle.x + circle.width, y: best }];
  const touched = best < middle.y ? circle.y : circle.y + circle.height;
  return [...start, { x: middle.x, y: best }, { x: middle.x, y: touched }];
}
