import { MODULE } from '../symbols/types';

/** What a part that is moved comes to stand in line with, and how it is drawn there. All lengths in 1/100 mm. */

export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** A line through parts that stand in line: upright at x, from y to y, or level at y, from x to x. */
export interface Guide {
  upright: boolean;
  at: number;
  from: number;
  to: number;
}

export interface Guided {
  /** how far the part goes, to the module */
  dx: number;
  dy: number;
  /** through what it then stands in line with */
  lines: readonly Guide[];
  /** spans of one length between it and its neighbours, level or upright */
  gaps: readonly Guide[];
}

/** a part is drawn to a line that is this near */
const PULL = 1.5 * MODULE;
/** of the lines of a part the middle one first: along that one, runs go straight */
const LINES = [0.5, 0, 1] as const;

const snap = (value: number): number => Math.round(value / MODULE) * MODULE;

/** A box along one axis: where it begins and how long it is, and the same across. */
interface Along {
  start: number;
  size: number;
  across: number;
  depth: number;
}
const along = ({ x, y, width, height }: Box, upright: boolean): Along =>
  upright ? { start: y, size: height, across: x, depth: width } : { start: x, size: width, across: y, depth: height };
const endOf = ({ start, size }: Along): number => start + size;

/** What stands in one row with a part, on either side, the nearest first. */
function neighbours(still: readonly Along[], part: Along): { before: Along[]; after: Along[] } {
  const row = still.filter((each) => each.across < part.across + part.depth && part.across < each.across + each.depth);
  return {
    before: row.filter((each) => endOf(each) <= part.start).sort((a, b) => endOf(b) - endOf(a)),
    after: row.filter((each) => each.start >= endOf(part)).sort((a, b) => a.start - b.start),
  };
}

/** Where a part would begin if it stood midway between two, or as far from the next as that from the one after. */
function evenStarts(still: readonly Along[], part: Along): number[] {
  const { before, after } = neighbours(still, part);
  const [left, beforeLeft] = before;
  const [right, afterRight] = after;
  return [
    ...(left && right ? [(endOf(left) + right.start - part.size) / 2] : []),
    ...(left && beforeLeft ? [endOf(left) + left.start - endOf(beforeLeft)] : []),
    ...(right && afterRight ? [right.start - (afterRight.start - endOf(right)) - part.size] : []),
  ];
}

/** How far a part goes along one axis when a hand has brought it so far: to a line that is near, else to the module. */
function drawnTo(still: readonly Along[], part: Along, by: number): number {
  const here = { ...part, start: part.start + by };
  const starts = [
    ...still.flatMap((each) => LINES.map((line) => each.start + line * (each.size - part.size))),
    ...evenStarts(still, here),
  ];
  let best = snap(here.start);
  let least = PULL + 1;
  for (const start of starts) {
    const off = Math.abs(start - here.start);
    if (off >= least || start % MODULE !== 0) continue;
    best = start;
    least = off;
  }
  return best - part.start;
}

/** The first of the lines of a part on which others stand with one of their own. */
function lineOf(still: readonly Along[], part: Along, upright: boolean): Guide[] {
  for (const line of LINES) {
    const at = part.start + line * part.size;
    const inLine = still.filter((each) => each.start + line * each.size === at);
    if (inLine.length === 0) continue;
    const all = [...inLine, part];
    const from = Math.min(...all.map(({ across }) => across));
    return [{ upright, at, from, to: Math.max(...all.map(({ across, depth }) => across + depth)) }];
  }
  return [];
}

/** The gaps beside a part that are one as wide as the other. */
function evenGaps(still: readonly Along[], part: Along, upright: boolean): Guide[] {
  const { before, after } = neighbours(still, part);
  const row = [...before.slice(0, 2).reverse(), part, ...after.slice(0, 2)];
  const at = part.across + part.depth / 2;
  const spans = row.slice(1).map((each, i): Guide => ({ upright, at, from: endOf(row[i]!), to: each.start }));
  const long = ({ from, to }: Guide): number => to - from;
  return spans.filter(
    (span, i) => long(span) > 0 && [spans[i - 1], spans[i + 1]].some((next) => next && long(next) === long(span)),
  );
}

/** 1/100 mm: what stands farther off is no guide */
const NEAR = 8000;
const isNear = (a: Box, b: Box): boolean =>
  a.x < b.x + b.width + NEAR && b.x < a.x + a.width + NEAR && a.y < b.y + b.height + NEAR && b.y < a.y + a.height + NEAR;

/**
 * Guides for a part that a hand has brought so far: with `pull` it is drawn to what it nearly stands in line with or
 * evenly spaced to, else it goes to the module; and the lines and gaps that are true of where it then stands.
 * @param still what it may stand in line with
 */
export function guide(still: readonly Box[], part: Box, dx: number, dy: number, pull: boolean): Guided {
  const near = still.filter((box) => isNear(box, { ...part, x: part.x + dx, y: part.y + dy }));
  const [level, upright] = [near.map((box) => along(box, false)), near.map((box) => along(box, true))];
  // the row that a part stands in decides of its spacing: first across, with where the hand has brought it the other way
  const goes = pull
    ? {
        dx: drawnTo(level, along({ ...part, y: part.y + dy }, false), dx),
        dy: drawnTo(upright, along({ ...part, x: part.x + dx }, true), dy),
      }
    : { dx: snap(part.x + dx) - part.x, dy: snap(part.y + dy) - part.y };
  const there = { ...part, x: part.x + goes.dx, y: part.y + goes.dy };
  const [acrossThere, downThere] = [along(there, false), along(there, true)];
  return {
    ...goes,
    lines: [...lineOf(level, acrossThere, true), ...lineOf(upright, downThere, false)],
    gaps: [...evenGaps(level, acrossThere, false), ...evenGaps(upright, downThere, true)],
  };
}
