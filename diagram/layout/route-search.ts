import { MODULE, type Side } from '../symbols/types';
import { CROSSABLE, lineAt, type Grid, type RouteEnd } from './route-grid';
import type { Point } from './scene';

/** Shortest way between two terminals over the grid, by A*: length, bends, crossings, ground that is spoken for. */

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
} as const;

/** By how much the length still to go is overrated where runs keep apart. */
const AHEAD = 1.15;

/** What stands on the grid: 0 is free, else the number of a strand. */
export interface Occupancy {
  /** the net and the family of each strand */
  netOf: readonly number[];
  familyOf: readonly number[];
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
    netOf,
    familyOf,
    right: new Int32Array(size),
    down: new Int32Array(size),
    level: new Int32Array(size),
    upright: new Int32Array(size),
    corner: new Int32Array(size),
  };
};

const DIRECTIONS: readonly Side[] = ['up', 'right', 'down', 'left'];

/** The straight way from a terminal out of its own part: nodes from the terminal to the first free one. */
export interface Stub {
  nodes: number[];
  /** 0 up, 1 right, 2 down, 3 left */
  direction: number;
  penalty: number;
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

const isLevel = (direction: number): boolean => direction % 2 === 1;

/** True when `net` may walk along an edge. */
const free = (occupancy: Occupancy, edge: number, level: boolean, net: number): boolean => {
  const on = level ? occupancy.right[edge]! : occupancy.down[edge]!;
  return same(occupancy, on, net);
};
/** True when a place is free for a strand or taken by one of its family. */
const same = (occupancy: Occupancy, on: number, net: number): boolean =>
  on === 0 || on === net || (on > 0 && occupancy.familyOf[on] === occupancy.familyOf[net]);
/** True when two strands are of one net, or one of them is none. */
const joined = (occupancy: Occupancy, on: number, net: number): boolean =>
  on === 0 || on === net || (on > 0 && occupancy.netOf[on] === occupancy.netOf[net]);
/** The way out of a terminal may be shared by all that ends there. */
const freeStub = (occupancy: Occupancy, edge: number, level: boolean, net: number): boolean =>
  joined(occupancy, level ? occupancy.right[edge]! : occupancy.down[edge]!, net);

/** The ways out of a terminal that nothing else has taken: straight through its own part to the first free node. */
export function stubs(grid: Grid, occupancy: Occupancy, end: RouteEnd, net: number): Stub[] {
  const own = grid.parts.get(end.part) ?? 0;
  const found: Stub[] = [];
  end.sides.forEach((side, place) => {
    const direction = DIRECTIONS.indexOf(side);
    const nodes = [nodeAt(grid, end)];
    do {
      const node = nodes.at(-1)!;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0 || !freeStub(occupancy, edge, isLevel(direction), net)) return;
      const next = nextNode(grid, node, direction);
      if (!joined(occupancy, occupancy.corner[next]!, net)) return;
      if (
        grid.covered[next] !== 0 &&
        grid.covered[next] !== own &&
        !(grid.covered[next] === CROSSABLE && !isLevel(direction))
      )
        return;
      nodes.push(next);
    } while (grid.covered[nodes.at(-1)!] !== 0);
    const penalty = end.even ? 0 : place * COST.side;
    found.push({ nodes: [...nodes], direction, penalty });
    for (let more = 1; more < (end.reach ?? 1); more++) {
      const node = nodes.at(-1)!;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0 || !freeStub(occupancy, edge, isLevel(direction), net)) return;
      const next = nextNode(grid, node, direction);
      if (grid.covered[next] !== 0 || !joined(occupancy, occupancy.corner[next]!, net)) return;
      if (crosses(occupancy, next, isLevel(direction), net)) return;
      nodes.push(next);
      found.push({ nodes: [...nodes], direction, penalty: penalty + more * MODULE * COST.shared });
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

const crosses = (occupancy: Occupancy, node: number, level: boolean, net: number): boolean => {
  const across = level ? occupancy.upright[node]! : occupancy.level[node]!;
  return !same(occupancy, across, net);
};

/** A binary heap of states by cost; equal costs leave in the order they came, so that the result is one. */
class Heap {
  private states = new Int32Array(1024);
  private costs = new Float64Array(1024);
  private turns = new Int32Array(1024);
  private turn = 0;
  size = 0;

  clear(): void {
    this.size = 0;
    this.turn = 0;
  }

  push(state: number, cost: number): void {
    if (this.size === this.states.length) this.grow();
    const turn = this.turn++;
    let at = this.size++;
    while (at > 0) {
      const up = (at - 1) >> 1;
      if (this.costs[up]! <= cost) break;
      this.move(up, at);
      at = up;
    }
    this.set(at, state, cost, turn);
  }

  pop(): number {
    const top = this.states[0]!;
    const last = --this.size;
    const state = this.states[last]!;
    const cost = this.costs[last]!;
    const turn = this.turns[last]!;
    let at = 0;
    for (;;) {
      let child = 2 * at + 1;
      if (child >= last) break;
      if (child + 1 < last && this.before(child + 1, child)) child++;
      if (cost < this.costs[child]! || (cost === this.costs[child] && turn < this.turns[child]!)) break;
      this.move(child, at);
      at = child;
    }
    if (last > 0) this.set(at, state, cost, turn);
    return top;
  }

  private before(a: number, b: number): boolean {
    return this.costs[a]! < this.costs[b]! || (this.costs[a] === this.costs[b] && this.turns[a]! < this.turns[b]!);
  }

  private set(at: number, state: number, cost: number, turn: number): void {
    this.states[at] = state;
    this.costs[at] = cost;
    this.turns[at] = turn;
  }

  private move(from: number, to: number): void {
    this.set(to, this.states[from]!, this.costs[from]!, this.turns[from]!);
  }

  private grow(): void {
    const states = new Int32Array(2 * this.states.length);
    const costs = new Float64Array(2 * this.states.length);
    const turns = new Int32Array(2 * this.states.length);
    states.set(this.states);
    costs.set(this.costs);
    turns.set(this.turns);
    Object.assign(this, { states, costs, turns });
  }
}

/** Reusable memory of the search; a stamp tells old entries from new ones. */
export class Search {
  private readonly best: Float64Array;
  private readonly from: Int32Array;
  private readonly stamp: Int32Array;
  private readonly closed: Int32Array;
  private readonly heap = new Heap();
  private run = 0;

  constructor(
    private readonly grid: Grid,
    private readonly occupancy: Occupancy,
    /** keep a free line between runs where there is room */
    private readonly spread: boolean,
  ) {
    const size = grid.columns * grid.rows * 4;
    this.best = new Float64Array(size);
    this.from = new Int32Array(size);
    this.stamp = new Int32Array(size);
    this.closed = new Int32Array(size);
  }

  /**
   * Nodes from one terminal to the other, or null where there is no way.
   * @param net number of the run's net, not 0
   * @param backup which ground it keeps to
   * @param shares whether others of the net are drawn, whose stretches may be used
   */
  find(
    from: RouteEnd,
    to: RouteEnd,
    net: number,
    shares: boolean,
    backup = false,
  ): { nodes: number[]; cost: number } | null {
    const { grid } = this;
    const direct = straight(grid, this.occupancy, from, to, net);
    if (direct) return { nodes: direct, cost: Math.abs(from.x - to.x) + Math.abs(from.y - to.y) };
    const starts = stubs(grid, this.occupancy, from, net);
    const goals = this.goals(stubs(grid, this.occupancy, to, net), net);
    if (starts.length === 0 || goals.size === 0) return null;
    const goalNodes = [...new Set([...goals.keys()].map((state) => state >> 2))];
    const goalXs = goalNodes.map((node) => grid.xs[node % grid.columns]!);
    const goalYs = goalNodes.map((node) => grid.ys[Math.floor(node / grid.columns)]!);
    // where runs keep apart a way costs more than its length: looking ahead more boldly finds it sooner, and nearly as good
    const rate = (shares ? COST.shared : 1) * (this.spread ? AHEAD : 1);
    // never more than what is left to go: the length, and a bend where the goal lies on neither line through the node
    const estimate = (node: number): number => {
      const column = node % grid.columns;
      const x = grid.xs[column]!;
      const y = grid.ys[(node - column) / grid.columns]!;
      let least = Infinity;
      for (let i = 0; i < goalXs.length; i++) {
        const dx = Math.abs(goalXs[i]! - x);
        const dy = Math.abs(goalYs[i]! - y);
        const cost = (dx + dy) * rate + (dx > 0 && dy > 0 ? COST.bend : 0);
        if (cost < least) least = cost;
      }
      return least;
    };
    this.run++;
    const { heap } = this;
    heap.clear();
    const reach = (state: number, cost: number, previous: number) => {
      if (this.stamp[state] === this.run && this.best[state]! <= cost) return;
      this.stamp[state] = this.run;
      this.best[state] = cost;
      this.from[state] = previous;
      heap.push(state, cost + estimate(state >> 2));
    };
    const startOf = new Map<number, Stub>();
    for (const stub of starts) {
      const state = stub.nodes.at(-1)! * 4 + stub.direction;
      startOf.set(state, stub);
      reach(state, stub.penalty, -1);
    }
    let found = -1;
    let foundCost = Infinity;
    while (heap.size > 0) {
      const state = heap.pop();
      if (this.closed[state] === this.run) continue;
      this.closed[state] = this.run;
      const cost = this.best[state]!;
      if (found >= 0 && cost >= foundCost) break;
      const node = state >> 2;
      const heading = state & 3;
      const goal = goals.get(state);
      if (goal && cost + goal.penalty < foundCost) {
        found = state;
        foundCost = cost + goal.penalty;
      }
      this.expand(node, heading, cost, net, backup ? grid.soft.backup : grid.soft.mains, reach, state);
    }
    if (found < 0) return null;
    const middle: number[] = [];
    let state = found;
    for (; this.from[state]! >= 0; state = this.from[state]!) middle.push(state >> 2);
    const start = startOf.get(state)!;
    const nodes = [...start.nodes, ...middle.reverse(), ...[...goals.get(found)!.stub.nodes].reverse().slice(1)];
    return { nodes, cost: foundCost };
  }

  /** States in which a search may end: at the outer node of a stub, heading into it or, where nothing crosses, bending into it. */
  private goals(ends: readonly Stub[], net: number): Map<number, { stub: Stub; penalty: number }> {
    const goals = new Map<number, { stub: Stub; penalty: number }>();
    for (const stub of ends) {
      const node = stub.nodes.at(-1)!;
      const into = (stub.direction + 2) % 4;
      const bendable =
        joined(this.occupancy, this.occupancy.upright[node]!, net) &&
        joined(this.occupancy, this.occupancy.level[node]!, net);
      for (let heading = 0; heading < 4; heading++) {
        if (heading === stub.direction || (heading !== into && !bendable)) continue;
        const penalty = stub.penalty + (heading === into ? 0 : COST.bend);
        const before = goals.get(node * 4 + heading);
        if (!before || penalty < before.penalty) goals.set(node * 4 + heading, { stub, penalty });
      }
    }
    return goals;
  }

  /** How many of the two neighbouring lines are taken by others along an edge. */
  private beside(edge: number, level: boolean, net: number): number {
    const { right, down } = this.occupancy;
    const [list, step] = level ? [right, this.grid.columns] : [down, 1];
    return (
      Number(!same(this.occupancy, list[edge - step] ?? 0, net)) +
      Number(!same(this.occupancy, list[edge + step] ?? 0, net))
    );
  }

  private expand(
    node: number,
    heading: number,
    cost: number,
    net: number,
    soft: Float32Array,
    reach: (state: number, cost: number, previous: number) => void,
    state: number,
  ): void {
    const { grid, occupancy } = this;
    const here = isLevel(heading) ? occupancy.upright[node]! : occupancy.level[node]!;
    const along = isLevel(heading) ? occupancy.level[node]! : occupancy.upright[node]!;
    // where a run leaves its terminal's way out, what shares that way is no hindrance
    const clear = (on: number): boolean =>
      this.from[state] === -1 ? joined(occupancy, on, net) : same(occupancy, on, net);
    const onOther = !clear(here) || !clear(along);
    for (let direction = 0; direction < 4; direction++) {
      if ((direction + 2) % 4 === heading) continue;
      const bends = direction !== heading;
      // a bend on another conductor would look like a joint
      if (bends && onOther) continue;
      const edge = edgeFrom(grid, node, direction);
      if (edge < 0) continue;
      const level = isLevel(direction);
      if (!free(occupancy, edge, level, net)) continue;
      const next = nextNode(grid, node, direction);
      const over = grid.covered[next]!;
      if (over !== 0 && !(over === CROSSABLE && !level)) continue;
      if (bends && grid.covered[node] === CROSSABLE) continue;
      if (!joined(occupancy, occupancy.corner[next]!, net)) continue;
      const length = level
        ? Math.abs(grid.xs[next % grid.columns]! - grid.xs[node % grid.columns]!)
        : Math.abs(grid.ys[Math.floor(next / grid.columns)]! - grid.ys[Math.floor(node / grid.columns)]!);
      const onOwn = (level ? occupancy.right[edge] : occupancy.down[edge]) === net;
      reach(
        next * 4 + direction,
        cost +
          length * (onOwn ? COST.shared : 1 + soft[next]!) +
          (bends ? COST.bend : 0) +
          (crosses(occupancy, next, level, net) ? COST.crossing : 0) +
          (this.spread ? length * COST.close * this.beside(edge, level, net) : 0),
        state,
      );
    }
  }
}

/** Corners of a path of nodes. */
export function toPoints(grid: Grid, nodes: readonly number[]): Point[] {
  const points: Point[] = [];
  for (const node of nodes) {
    const point = { x: grid.xs[node % grid.columns]!, y: grid.ys[Math.floor(node / grid.columns)]! };
    const [before, last] = [points.at(-2), points.at(-1)];
    if (last && last.x === point.x && last.y === point.y) continue;
    if (before && last && ((before.x === last.x && last.x === point.x) || (before.y === last.y && last.y === point.y)))
      points.pop();
    points.push(point);
  }
  return points;
}
