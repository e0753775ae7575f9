import { lineAt, type Grid, type Line, type RouteEnd } from './route-grid';
import { COST, joined, straight, stubs, type Occupancy, type Stub } from './route-occupancy';
import { StepCosts, type Window } from './route-steps';
import { Relaxer, type Goal, type Start } from './route-relax';
import type { Point } from './scene';
import { MODULE } from '../symbols/types';

/** The best way between two terminals over the grid: length, bends, crossings, ground that is spoken for. */

/** What is asked of a search, besides its ends. */
export interface Question {
  /** number of the run's strand, not 0 */
  net: number;
  /** which ground it keeps to */
  backup: boolean;
  /** lines on which the run goes a stretch, in order from its first end */
  lines: readonly Line[];
  /** goes over other runs where it must: they are moved away afterwards. Never over a part or a terminal. */
  insists: boolean;
  /** no other run is of its strand: nothing makes a step cheaper than its length */
  alone: boolean;
}

export interface Way {
  nodes: number[];
  cost: number;
}

/** How far beyond the ends of a run a way is looked for, before the whole sheet is, 1/100 mm. */
const BEYOND = 16 * MODULE;
/** How far at first, where what is found there tells how far a better way could lie. */
const CLOSE_BY = 4 * MODULE;

export class Search {
  private readonly steps: StepCosts;
  private readonly relaxer = new Relaxer();
  private readonly all: Window;
  /** nodes looked over so far, by all searches */
  effort = 0;

  constructor(
    private readonly grid: Grid,
    private readonly occupancy: Occupancy,
    /** nodes of terminals, which nobody's insisting moves */
    private readonly terminals: ReadonlyMap<number, number>,
    /** keep a free line between runs where there is room */
    spread: boolean,
  ) {
    this.steps = new StepCosts(grid, occupancy, terminals, spread);
    this.all = { left: 0, right: grid.columns - 1, top: 0, bottom: grid.rows - 1 };
  }

  /** Nodes from one terminal to the other, or null where there is no way. */
  find(from: RouteEnd, to: RouteEnd, ask: Question): Way | null {
    const { grid, occupancy } = this;
    const direct = ask.lines.length === 0 && straight(grid, occupancy, from, to, ask.net);
    if (direct) return { nodes: direct, cost: Math.abs(from.x - to.x) + Math.abs(from.y - to.y) };
    const fixed = ask.insists ? this.terminals : undefined;
    const starts = stubs(grid, occupancy, from, ask.net, fixed);
    const goals = stubs(grid, occupancy, to, ask.net, fixed);
    if (starts.length === 0 || goals.length === 0) return null;
    // near the straight way first: a long way round reads worse than a crossing, and is slow to look for
    const mayBound = ask.alone && ask.lines.length === 0 && !ask.insists;
    return (
      (mayBound ? this.nearest(starts, goals, ask) : null) ??
      this.within(this.around(from, to, ask.lines), starts, goals, ask) ??
      this.within(this.all, starts, goals, ask)
    );
  }

  /**
   * The best way close by, or a better one further out. A way that leaves the ground between the ends comes back again:
   * that is two bends and twice how far it went, which tells how far out a better one could lie.
   */
  private nearest(starts: readonly Stub[], goals: readonly Stub[], ask: Question): Way | null {
    const [from, to] = [starts, goals].map((list) => list.map((stub) => this.outerPoint(stub))) as [Point[], Point[]];
    const found = this.within(this.about([...from, ...to], CLOSE_BY), starts, goals, ask);
    if (!found) return null;
    let least = Infinity;
    for (const a of from) for (const b of to) least = Math.min(least, Math.abs(a.x - b.x) + Math.abs(a.y - b.y));
    const further = Math.min(BEYOND, (found.cost - least - 2 * COST.bend) / 2);
    if (further <= CLOSE_BY) return found;
    return this.within(this.about([...from, ...to], further), starts, goals, ask, found.cost) ?? found;
  }

  private outerPoint({ nodes }: Stub): Point {
    const node = nodes.at(-1)!;
    const column = node % this.grid.columns;
    return { x: this.grid.xs[column]!, y: this.grid.ys[(node - column) / this.grid.columns]! };
  }

  private around(from: RouteEnd, to: RouteEnd, lines: readonly Line[]): Window {
    return this.about([from, to, ...lines.map(({ x = from.x, y = from.y }) => ({ x, y }))], BEYOND);
  }

  private about(points: readonly Point[], beyond: number): Window {
    const { grid, all } = this;
    const xs = points.map(({ x }) => x);
    const ys = points.map(({ y }) => y);
    return {
      left: lineAt(grid.xs, Math.min(...xs) - beyond),
      right: Math.min(all.right, lineAt(grid.xs, Math.max(...xs) + beyond)),
      top: lineAt(grid.ys, Math.min(...ys) - beyond),
      bottom: Math.min(all.bottom, lineAt(grid.ys, Math.max(...ys) + beyond)),
    };
  }

  /** @param limit only a way that costs less is of use */
  private within(
    window: Window,
    starts: readonly Stub[],
    goals: readonly Stub[],
    ask: Question,
    limit = Infinity,
  ): Way | null {
    const { steps } = this;
    this.effort += (window.right - window.left + 1) * (window.bottom - window.top + 1);
    steps.survey(window, ask);
    const outer = ({ nodes }: Stub): number => nodes.at(-1)!;
    const inside = [starts, goals].map((list) => list.filter((stub) => steps.local(outer(stub)) >= 0));
    const [mine, theirs] = inside as [Stub[], Stub[]];
    // a way does not come back through its own terminals
    for (const stub of [...mine, ...theirs]) for (const node of stub.inside) steps.bar(node);
    const begin = mine.map((stub): Start => {
      steps.allowBend(outer(stub), this.mayBend(stub, ask));
      return { at: steps.local(outer(stub)), heading: stub.direction, cost: stub.penalty };
    });
    const end = theirs.map(
      (stub): Goal => ({
        at: steps.local(outer(stub)),
        into: (stub.direction + 2) % 4,
        cost: stub.penalty,
        bend: this.mayBend(stub, ask) ? COST.bend : Infinity,
      }),
    );
    const found = this.relaxer.relax(steps, begin, end, ask.lines, limit);
    if (!found) return null;
    return {
      nodes: [
        ...mine[found.start]!.nodes.slice(0, -1),
        ...found.corners.flatMap((corner, i) => steps.stretch(found.corners[i - 1] ?? corner, corner)),
        ...[...theirs[found.goal]!.nodes].reverse().slice(1),
      ],
      cost: found.cost,
    };
  }

  /** True where a bend at the outer node of a terminal's way out lies on no other conductor. */
  private mayBend(stub: Stub, { net, insists }: Question): boolean {
    const node = stub.nodes.at(-1)!;
    const { level, upright } = this.occupancy;
    return insists || (joined(this.occupancy, level[node]!, net) && joined(this.occupancy, upright[node]!, net));
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
