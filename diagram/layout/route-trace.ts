import { CROSSABLE, lineAt, type Grid, type RouteEnd } from './route-grid';
import { edgeFrom, free, isLevel, joined, nextNode, nodeAt, type Occupancy } from './route-occupancy';
import type { Point } from './scene';

/** A way a run had before, laid on the grid again. */

const onGrid = (grid: Grid, { x, y }: Point): boolean =>
  grid.xs[lineAt(grid.xs, x)] === x && grid.ys[lineAt(grid.ys, y)] === y;

/**
 * The nodes of a way that a run had before, or null where it cannot stay: its ends have moved, or something stands in it.
 * @param net number of the run's strand
 */
export function traceWay(
  grid: Grid,
  occupancy: Occupancy,
  ends: readonly [RouteEnd, RouteEnd],
  points: readonly Point[],
  net: number,
): number[] | null {
  const [first, last] = [points[0], points.at(-1)];
  const [from, to] = ends;
  if (!first || !last || first.x !== from.x || first.y !== from.y || last.x !== to.x || last.y !== to.y) return null;
  if (!points.every((point) => onGrid(grid, point))) return null;
  const allowed = new Set([0, ...ends.map(({ part }) => grid.parts.get(part) ?? 0)]);
  const nodes = [nodeAt(grid, first)];
  for (let i = 1; i < points.length; i++) {
    const goal = nodeAt(grid, points[i]!);
    const [a, b] = [points[i - 1]!, points[i]!];
    if (a.x !== b.x && a.y !== b.y) return null;
    const direction = a.x === b.x ? (b.y > a.y ? 2 : 0) : b.x > a.x ? 1 : 3;
    while (nodes.at(-1) !== goal) {
      const node = nodes.at(-1)!;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0 || !free(occupancy, edge, isLevel(direction), net)) return null;
      const next = nextNode(grid, node, direction);
      const over = grid.covered[next]!;
      // several nets may end at one terminal, and two boxes may touch there
      const arrives = next === goal && i === points.length - 1;
      const mayCover = allowed.has(over) || (over === CROSSABLE && !isLevel(direction));
      if (!arrives && !(mayCover && joined(occupancy, occupancy.corner[next]!, net))) return null;
      nodes.push(next);
    }
    // a bend on another conductor would look like a joint
    const turned = i < points.length - 1;
    if (turned && !(joined(occupancy, occupancy.level[goal]!, net) && joined(occupancy, occupancy.upright[goal]!, net)))
      return null;
  }
  return nodes.length > 1 ? nodes : null;
}
