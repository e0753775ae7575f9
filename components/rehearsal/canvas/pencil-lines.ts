import type { Point } from '@/diagram/layout/scene';

/** Polylines of right angles. Lengths are 1/100 mm. */

/** Right-angled way between two points: straight, or with one bend. */
export const elbow = (a: Point, b: Point): Point[] =>
  a.x === b.x || a.y === b.y ? [a, b] : [a, { x: a.x, y: b.y }, b];

/** The longest straight stretch of a polyline; null where it has none. */
export function longest(points: readonly Point[]): { a: Point; b: Point } | null {
  let best: { a: Point; b: Point } | null = null;
  let least = 0;
  points.slice(1).forEach((b, i) => {
    const a = points[i]!;
    const length = Math.abs(a.x - b.x) + Math.abs(a.y - b.y);
    if (length <= least) return;
    least = length;
    best = { a, b };
  });
  return best;
}

/** Without points in the middle of a straight stretch, and without going there and back: the pencil does not retrace itself. */
export function cleaned(points: readonly Point[]): Point[] {
  const clean: Point[] = [];
  for (const point of points) {
    clean.push(point);
    for (;;) {
      const [a, b, c] = clean.slice(-3);
      const last = clean.at(-1)!;
      const before = clean.at(-2);
      if (before && before.x === last.x && before.y === last.y) clean.pop();
      else if (a && b && c && ((a.x === b.x && b.x === c.x) || (a.y === b.y && b.y === c.y))) clean.splice(-2, 1);
      else break;
    }
  }
  return clean;
}

/** Several polylines one after the other as one, right angles between them. */
export function merged(lines: readonly (readonly Point[])[]): Point[] {
  const all: Point[] = [];
  for (const line of lines) {
    const last = all.at(-1);
    if (last) all.push(...elbow(last, line[0]!).slice(1));
    all.push(...line);
  }
  return cleaned(all);
}

/** A polyline moved aside: to the right of its direction for a positive distance. */
export function aside(points: readonly Point[], distance: number): Point[] {
  const line = cleaned(points);
  if (line.length < 2) return line;
  const normal = (i: number): Point => {
    const [a, b] = [line[i]!, line[i + 1]!];
    return { x: -Math.sign(b.y - a.y) * distance, y: Math.sign(b.x - a.x) * distance };
  };
  return line.map((p, i) => {
    const before = normal(Math.max(0, i - 1));
    const after = i < line.length - 1 ? normal(i) : before;
    // At a right angle the two normals lie across each other: their sum is the corner. At an end there is one.
    const end = i === 0 || i === line.length - 1;
    return { x: p.x + before.x + (end ? 0 : after.x), y: p.y + before.y + (end ? 0 : after.y) };
  });
}
