import type { Point } from './scene';

/** Hops and dots, worked out from the nets and never from the order of painting. */

export interface NetPath {
  id: string;
  net: string;
  points: readonly Point[];
}

interface Segment {
  path: number;
  net: string;
  a: Point;
  b: Point;
}

const key = (x: number, y: number): string => `${x} ${y}`;

function segmentsOf(paths: readonly NetPath[]): { level: Segment[]; upright: Segment[] } {
  const level: Segment[] = [];
  const upright: Segment[] = [];
  paths.forEach(({ net, points }, path) => {
    for (let i = 0; i + 1 < points.length; i++) {
      const [a, b] = [points[i]!, points[i + 1]!];
      if (a.y === b.y && a.x !== b.x) level.push({ path, net, a: a.x < b.x ? a : b, b: a.x < b.x ? b : a });
      else if (a.x === b.x && a.y !== b.y) upright.push({ path, net, a: a.y < b.y ? a : b, b: a.y < b.y ? b : a });
    }
  });
  upright.sort((p, q) => p.a.x - q.a.x);
  return { level, upright };
}

/** Crossings of different nets, by id of the level run, which hops; in order along x. */
export function findHops(paths: readonly NetPath[]): Map<string, Point[]> {
  const { level, upright } = segmentsOf(paths);
  const hops = new Map<string, Map<string, Point>>();
  for (const segment of level) {
    let low = 0;
    let high = upright.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (upright[middle]!.a.x <= segment.a.x) low = middle + 1;
      else high = middle;
    }
    for (let i = low; i < upright.length && upright[i]!.a.x < segment.b.x; i++) {
      const other = upright[i]!;
      if (other.net === segment.net || other.a.y >= segment.a.y || other.b.y <= segment.a.y) continue;
      const { id } = paths[segment.path]!;
      const list = hops.get(id) ?? new Map<string, Point>();
      list.set(key(other.a.x, segment.a.y), { x: other.a.x, y: segment.a.y });
      hops.set(id, list);
    }
  }
  return new Map([...hops].map(([id, list]) => [id, [...list.values()].sort((p, q) => p.y - q.y || p.x - q.x)]));
}

/** What is drawn of one net. */
interface Group {
  points: Map<string, Point>;
  level: Segment[];
  upright: Segment[];
}

/** Points where three or more stretches of one net meet, apart from `skip` (joints and bars show themselves). */
export function findDots(paths: readonly NetPath[], skip: (point: Point) => boolean): (Point & { net: string })[] {
  const { level, upright } = segmentsOf(paths);
  const nets = new Map<string, Group>();
  const of = (net: string): Group => {
    const found: Group = nets.get(net) ?? { points: new Map(), level: [], upright: [] };
    nets.set(net, found);
    return found;
  };
  for (const { net, points } of paths) for (const point of points) of(net).points.set(key(point.x, point.y), point);
  for (const segment of level) of(segment.net).level.push(segment);
  for (const segment of upright) of(segment.net).upright.push(segment);
  const dots: (Point & { net: string })[] = [];
  for (const [net, group] of nets) {
    if (group.level.length + group.upright.length < 2) continue;
    // crossings of one net with itself join as well
    for (const l of group.level)
      for (const u of group.upright)
        if (l.a.x <= u.a.x && u.a.x <= l.b.x && u.a.y <= l.a.y && l.a.y <= u.b.y)
          group.points.set(key(u.a.x, l.a.y), { x: u.a.x, y: l.a.y });
    for (const point of group.points.values()) {
      if (skip(point)) continue;
      const arms =
        Number(group.level.some((s) => s.a.y === point.y && s.a.x < point.x && s.b.x >= point.x)) +
        Number(group.level.some((s) => s.a.y === point.y && s.b.x > point.x && s.a.x <= point.x)) +
        Number(group.upright.some((s) => s.a.x === point.x && s.a.y < point.y && s.b.y >= point.y)) +
        Number(group.upright.some((s) => s.a.x === point.x && s.b.y > point.y && s.a.y <= point.y));
      if (arms >= 3) dots.push({ ...point, net });
    }
  }
  return dots.sort((p, q) => p.y - q.y || p.x - q.x);
}
