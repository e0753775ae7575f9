import { CROSSABLE, type Grid, type RouteEnd } from './route-grid';
import { Heap } from './route-heap';
import {
  COST,
  crosses,
  edgeFrom,
  free,
  isLevel,
  joined,
  nextNode,
  same,
  straight,
  stubs,
  type Occupancy,
  type Stub,
} from './route-occupancy';
import type { Point } from './scene';

/** Shortest way between two terminals over the grid, by A*: length, bends, crossings, ground that is spoken for. */

/** By how much the length still to go is overrated where runs keep apart. */
const AHEAD = 1.15;

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
