import { MODULE, type Side } from '../symbols/types';
import { CROSSABLE, lineAt, type Grid, type RouteEnd } from './route-grid';
import type { Point } from './scene';

/** What stands on the grid while runs are laid, and the ways out of a terminal that are still free. */

export const COST = {
  /** 1/100 mm of length that a bend is worth */
  bend: 900,
  /** that a crossing is worth */
  crossing: 2600,
  /** that leaving by a less good side is worth, a place down the list */
  side: 600,
  /** share of its length that a stretch along the same net costs */
  shared: 0.35,
  /** share of its length that a stretch beside another run costs more */
  close: 0.5,
  /** share of its length that a stretch on a line chosen by hand costs */
  onLine: 0.9,
  /** that walking over another run is worth, where there is no free way: that run is then moved away */
  pushing: 12_000,
} as const;

/** What stands on the grid: 0 is free, else the number of a strand. */
export interface Occupancy {
  /** the net and the family of each strand, at the strand's number plus one; -1 belongs to none */
  nets: Int32Array;
  families: Int32Array;
  /** how often a strand was moved away for others, at the same place: pushing it again costs more */
  pushed: Int32Array;
  /** per node, the edge to the right and the edge down */
  right: Int32Array;
  down: Int32Array;
  /** per node, the net that runs through it level and upright */
  level: Int32Array;
  upright: Int32Array;
  /** per node, the net that bends or ends there */
  corner: Int32Array;
}

export const emptyOccupancy = (grid: Grid, netOf: readonly number[], familyOf: readonly number[]): Occupancy => {
  const size = grid.columns * grid.rows;
  return {
    nets: Int32Array.from([-1, ...netOf]),
    families: Int32Array.from([-1, ...familyOf]),
    pushed: new Int32Array(netOf.length + 1),
    right: new Int32Array(size),
    down: new Int32Array(size),
    level: new Int32Array(size),
    upright: new Int32Array(size),
    corner: new Int32Array(size),
  };
};

export const DIRECTIONS: readonly Side[] = ['up', 'right', 'down', 'left'];

/** The straight way from a terminal out of its own part: nodes from the terminal to the first free one. */
export interface Stub {
  nodes: number[];
  /** 0 up, 1 right, 2 down, 3 left */
  direction: number;
  penalty: number;
  /** the first of them, within the part */
  inside: number[];
}

export const nodeAt = (grid: Grid, point: Point): number =>
  lineAt(grid.ys, point.y) * grid.columns + lineAt(grid.xs, point.x);

/** Edge of a node in a direction: the array it is kept in and its index; -1 outside the grid. */
export function edgeFrom(grid: Grid, node: number, direction: number): number {
  const column = node % grid.columns;
  const row = (node - column) / grid.columns;
  switch (direction) {
    case 0:
      return row > 0 ? node - grid.columns : -1;
    case 1:
      return column < grid.columns - 1 ? node : -1;
    case 2:
      return row < grid.rows - 1 ? node : -1;
    default:
      return column > 0 ? node - 1 : -1;
  }
}

export const nextNode = (grid: Grid, node: number, direction: number): number =>
  direction === 0 ? node - grid.columns : direction === 1 ? node + 1 : direction === 2 ? node + grid.columns : node - 1;

export const isLevel = (direction: number): boolean => direction % 2 === 1;

/** True when `net` may walk along an edge. */
export const free = (occupancy: Occupancy, edge: number, level: boolean, net: number): boolean => {
  const on = level ? occupancy.right[edge]! : occupancy.down[edge]!;
  return same(occupancy, on, net);
};
/** True when a place is free for a strand or taken by one of its family. */
export const same = (occupancy: Occupancy, on: number, net: number): boolean =>
  on === 0 || occupancy.families[on + 1] === occupancy.families[net + 1];
/** True when two strands are of one net, or one of them is none. */
export const joined = (occupancy: Occupancy, on: number, net: number): boolean =>
  on === 0 || occupancy.nets[on + 1] === occupancy.nets[net + 1];
/** The way out of a terminal may be shared by all that ends there. */
const freeStub = (occupancy: Occupancy, edge: number, level: boolean, net: number): boolean =>
  joined(occupancy, level ? occupancy.right[edge]! : occupancy.down[edge]!, net);

/**
 * The ways out of a terminal that nothing else has taken: straight through its own part to the first free node.
 * @param fixed nodes of terminals; where given, only those are in the way: runs are moved away afterwards
 */
export function stubs(
  grid: Grid,
  occupancy: Occupancy,
  end: RouteEnd,
  net: number,
  fixed?: ReadonlyMap<number, number>,
): Stub[] {
  const own = grid.parts.get(end.part) ?? 0;
  const found: Stub[] = [];
  const barred = (edge: number, direction: number, next: number): boolean =>
    fixed
      ? fixed.has(next) && !joined(occupancy, fixed.get(next)!, net)
      : !freeStub(occupancy, edge, isLevel(direction), net) || !joined(occupancy, occupancy.corner[next]!, net);
  end.sides.forEach((side, place) => {
    const direction = DIRECTIONS.indexOf(side);
    const nodes = [nodeAt(grid, end)];
    do {
      const node = nodes.at(-1)!;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0) return;
      const next = nextNode(grid, node, direction);
      if (barred(edge, direction, next)) return;
      if (
        grid.covered[next] !== 0 &&
        grid.covered[next] !== own &&
        !(grid.covered[next] === CROSSABLE && !isLevel(direction))
      )
        return;
      nodes.push(next);
    } while (grid.covered[nodes.at(-1)!] !== 0);
    const penalty = end.even ? 0 : place * COST.side;
    const inside = nodes.slice(0, -1);
    found.push({ nodes: [...nodes], direction, penalty, inside });
    for (let more = 1; more < (end.reach ?? 1); more++) {
      const node = nodes.at(-1)!;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0) return;
      const next = nextNode(grid, node, direction);
      if (grid.covered[next] !== 0 || barred(edge, direction, next)) return;
      if (crosses(occupancy, next, isLevel(direction), net)) return;
      nodes.push(next);
      found.push({ nodes: [...nodes], direction, penalty: penalty + more * MODULE * COST.shared, inside });
    }
  });
  return found;
}

/** The straight way between two terminals that face each other, however close their parts stand. */
export function straight(grid: Grid, occupancy: Occupancy, from: RouteEnd, to: RouteEnd, net: number): number[] | null {
  const goal = nodeAt(grid, to);
  const allowed = new Set([0, grid.parts.get(from.part) ?? 0, grid.parts.get(to.part) ?? 0]);
  for (const side of from.sides) {
    const direction = DIRECTIONS.indexOf(side);
    if (!to.sides.includes(DIRECTIONS[(direction + 2) % 4]!)) continue;
    const aligned = isLevel(direction)
      ? from.y === to.y && to.x > from.x === (direction === 1)
      : from.x === to.x && to.y > from.y === (direction === 2);
    if (!aligned) continue;
    const nodes = [nodeAt(grid, from)];
    while (nodes.at(-1) !== goal) {
      const node = nodes.at(-1)!;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0 || !free(occupancy, edge, isLevel(direction), net)) break;
      const next = nextNode(grid, node, direction);
      if (
        next !== goal &&
        (!joined(occupancy, occupancy.corner[next]!, net) || crosses(occupancy, next, isLevel(direction), net))
      )
        break;
      // two boxes may touch: a node that both cover lies between the terminals
      const bar = grid.covered[next] === CROSSABLE && !isLevel(direction);
      if (!allowed.has(grid.covered[next]!) && !bar && !(grid.covered[next] === -1 && next === goal)) break;
      nodes.push(next);
    }
    if (nodes.at(-1) === goal) return nodes;
  }
  return null;
}

export const crosses = (occupancy: Occupancy, node: number, level: boolean, net: number): boolean => {
  const across = level ? occupancy.upright[node]! : occupancy.level[node]!;
  return !same(occupancy, across, net);
};
