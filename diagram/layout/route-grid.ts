import { MODULE, type Side } from '../symbols/types';
import type { Point } from './scene';

/** The ground the router walks on: lines of the module near parts and terminals, none where nothing is. */

export interface Box extends Point {
  width: number;
  height: number;
}

/** A part that no run may pass. */
export interface Obstacle extends Box {
  id: string;
  /** a bar: runs of others may cross it squarely, between its terminals, as conductors cross */
  crossable?: boolean;
}

/** Where a run ends: the terminal, and the sides on which it may be left, the best first. */
export interface RouteEnd extends Point {
  part: string;
  sides: readonly Side[];
  /** every side is as good: a joint */
  even?: boolean;
  /** how many modules beyond its part the way out may be shared with others that end here; 1 where left out */
  reach?: number;
}

/** A line that a run goes along for a stretch: upright at x or level at y. */
export type Line = { x: number; y?: undefined } | { y: number; x?: undefined };

export interface RouteRequest {
  id: string;
  /** runs of one strand may share a stretch, and it is cheap to do so */
  strand: string;
  /** strands of one family end at the same terminals: they may share a stretch too, but gain nothing by it */
  family: string;
  /** strands of one net may touch where they end; those of different nets never touch */
  net: string;
  from: RouteEnd;
  to: RouteEnd;
  /** routed after the others: a side branch leaves the straight way to what matters more */
  late?: boolean;
  /** fed by the backup: it keeps to ground of its own where there is a choice */
  backup?: boolean;
  /** lines on which the run goes a stretch, as a person set them, in order from its first end */
  lines?: readonly Line[];
  /** the way it had before: it keeps it where that is still free */
  given?: readonly Point[];
}

/** Ground that costs extra to walk on: where lettering is to stand. */
export interface Soft extends Box {
  /** added per unit of length */
  cost: number;
  /** only for runs of this feed; for all where left out */
  feed?: 'mains' | 'backup';
}

/** Lines this many modules beyond a part or terminal belong to the grid. */
const REACH = 8;
/** More nodes than this are not searched: the runs are drawn as plain elbows. */
const MOST_NODES = 6_000_000;

/** Covered by a bar that may be crossed. */
export const CROSSABLE = -2;

export interface Grid {
  xs: Int32Array;
  ys: Int32Array;
  /** node number of a column and row: `row * columns + column` */
  columns: number;
  rows: number;
  /** per node, the part that covers it: 0 none, -1 several, {@link CROSSABLE} a bar, else its number in `parts` */
  covered: Int32Array;
  parts: ReadonlyMap<string, number>;
  /** per node, extra cost per unit of length, for runs of the mains and of the backup */
  soft: { mains: Float32Array; backup: Float32Array };
}

function lines(spans: readonly (readonly [number, number])[], extra: readonly number[]): Int32Array {
  const found = new Set<number>(extra);
  for (const [from, to] of spans)
    for (let at = Math.ceil(from / MODULE) * MODULE - REACH * MODULE; at <= to + REACH * MODULE; at += MODULE) found.add(at);
  return Int32Array.from(found).sort();
}

/** Index of the first line at or after a coordinate. */
export function lineAt(list: Int32Array, value: number): number {
  let low = 0;
  let high = list.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (list[middle]! < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Joins spans that touch, so that a long part gives its lines once. */
function merged(spans: [number, number][]): [number, number][] {
  const sorted = [...spans].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const out: [number, number][] = [];
  for (const [from, to] of sorted) {
    const last = out.at(-1);
    if (last && from <= last[1]) last[1] = Math.max(last[1], to);
    else out.push([from, to]);
  }
  return out;
}

/** The grid for these parts and runs, or null where it would be too large to search. */
export function buildGrid(
  obstacles: readonly Obstacle[],
  requests: readonly RouteRequest[],
  softs: readonly Soft[],
): Grid | null {
  const ends = requests.flatMap((request) => [request.from, request.to]);
  const wanted = requests.flatMap(({ lines = [], given = [] }) => [...lines, ...given]);
  const xs = lines(
    merged([
      ...obstacles.map((o): [number, number] => [o.x, o.x + o.width]),
      ...ends.map((e): [number, number] => [e.x, e.x]),
    ]),
    [...ends.map((e) => e.x), ...wanted.flatMap(({ x }) => x ?? [])],
  );
  const ys = lines(
    merged([
      ...obstacles.map((o): [number, number] => [o.y, o.y + o.height]),
      ...ends.map((e): [number, number] => [e.y, e.y]),
    ]),
    [...ends.map((e) => e.y), ...wanted.flatMap(({ y }) => y ?? [])],
  );
  const columns = xs.length;
  const rows = ys.length;
  if (columns * rows > MOST_NODES) return null;
  const grid: Grid = {
    xs,
    ys,
    columns,
    rows,
    covered: new Int32Array(columns * rows),
    parts: new Map(obstacles.map((obstacle, i) => [obstacle.id, i + 1])),
    soft: { mains: new Float32Array(columns * rows), backup: new Float32Array(columns * rows) },
  };
  const within = (box: Box, tell: (node: number) => void) => {
    const [left, right] = [lineAt(xs, box.x), lineAt(xs, box.x + box.width + 1) - 1];
    const [top, bottom] = [lineAt(ys, box.y), lineAt(ys, box.y + box.height + 1) - 1];
    for (let row = top; row <= bottom; row++)
      for (let column = left; column <= right; column++) tell(row * columns + column);
  };
  obstacles.forEach((box, i) =>
    within(box, (node) => {
      grid.covered[node] = grid.covered[node] !== 0 ? -1 : box.crossable ? CROSSABLE : i + 1;
    }),
  );
  for (const box of softs)
    within(box, (node) => {
      if (box.feed !== 'backup') grid.soft.mains[node]! += box.cost;
      if (box.feed !== 'mains') grid.soft.backup[node]! += box.cost;
    });
  return grid;
}
