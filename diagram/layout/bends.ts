import type { Bend, Face, Installation } from '../document/schema';
import type { Line } from './route-grid';
import type { Point, Scene, SceneRun } from './scene';

/** Stretches that somebody led by hand: the document keeps the line of each, the layout works out the rest of the way. */

/** Under which the bends of a run are kept: its face and its first wire. */
export const bendKey = (face: Face, wires: readonly string[]): string => `${face}:${wires[0] ?? ''}`;

/** The lines set by hand for a run, in order from its first end; none is undefined. */
export function linesOf(doc: Installation, face: Face, wires: readonly string[]): Line[] | undefined {
  const bends = doc.sheet?.bends?.[bendKey(face, wires)];
  return bends?.map((bend): Line => ('x' in bend ? { x: bend.x } : { y: bend.y }));
}

/** The ways runs had in a scene before, for the same drawing of the same page. */
export class WaysBefore {
  private readonly runs: ReadonlyMap<string, SceneRun>;

  constructor(before: Scene | undefined, face: Face, place?: string) {
    const same = before?.face === face && before.place === place;
    this.runs = new Map(same ? before.runs.map((run) => [run.id, run]) : []);
  }

  /** The way of a run, unless it is led by other lines now. */
  of(id: string, lines: readonly Line[] | undefined): readonly Point[] | undefined {
    const run = this.runs.get(id);
    return run && JSON.stringify(run.lines) === JSON.stringify(lines) ? run.points : undefined;
  }
}

/** The stretch of a way that each bend leads, by number of the stretch, for those that lead one. */
export function stretchesOf(points: readonly Point[], bends: readonly Bend[]): Map<number, number> {
  const led = new Map<number, number>();
  let next = 0;
  for (let i = 0; i + 1 < points.length; i++) {
    const [a, b] = [points[i]!, points[i + 1]!];
    const found = bends.findIndex((bend, k) =>
      k < next ? false : 'x' in bend ? a.x === b.x && a.x === bend.x : a.y === b.y && a.y === bend.y,
    );
    if (found < 0) continue;
    led.set(i, found);
    next = found + 1;
  }
  return led;
}

/** The bends of runs that move with both their ends, shifted along with them. Lengths in 1/100 mm. */
export function bendsMoved(
  doc: Installation,
  face: Face,
  ids: ReadonlySet<string>,
  dx: number,
  dy: number,
): Record<string, Bend[]> {
  const bends = doc.sheet?.bends;
  if (!bends) return {};
  const within = doc.wires.filter(({ id, from, to }) => bends[bendKey(face, [id])] && ids.has(from[0]) && ids.has(to[0]));
  return Object.fromEntries(
    within.map(({ id }) => {
      const key = bendKey(face, [id]);
      return [key, bends[key]!.map((bend): Bend => ('x' in bend ? { x: bend.x + dx } : { y: bend.y + dy }))];
    }),
  );
}
