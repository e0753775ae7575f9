import type { Line } from './route-grid';
import type { StepCosts } from './route-steps';

/**
 * Least-cost ways over a piece of the grid, by sweeping: along rows, then along columns, each line that has become
 * cheaper somewhere, until none is left. As many sweeps as the way has bends, whatever it has to cross.
 */

export interface Start {
  at: number;
  /** 0 up, 1 right, 2 down, 3 left */
  heading: number;
  cost: number;
}

export interface Goal {
  at: number;
  /** heading in which it is entered */
  into: number;
  cost: number;
  /** of bending into it at its node */
  bend: number;
}

export interface Found {
  cost: number;
  /** numbers of the start and the goal that were taken */
  start: number;
  goal: number;
  /** nodes at which it bends, with both ends */
  corners: number[];
}

/** Costs of coming to each node along one axis, and the node where that stretch began: -1 - n for start n, or a node before. */
interface Axis {
  cost: Float64Array;
  from: Int32Array;
}

interface Layer {
  level: Axis;
  upright: Axis;
}

const axis = (): Axis => ({ cost: new Float64Array(0), from: new Int32Array(0) });
function clear(list: Axis, size: number): void {
  if (list.cost.length < size) {
    list.cost = new Float64Array(size);
    list.from = new Int32Array(size);
  }
  list.cost.fill(Infinity, 0, size);
  list.from.fill(0, 0, size);
}

/** From where to where each line has become cheaper on the other axis; `to` before `from` where it has not. */
interface Marks {
  from: Int32Array;
  to: Int32Array;
}

const marks = (lines: number): Marks => ({ from: new Int32Array(lines), to: new Int32Array(lines).fill(-1) });
function mark(list: Marks, line: number, at: number): void {
  if (list.to[line]! < 0) list.from[line] = list.to[line] = at;
  else if (at < list.from[line]!) list.from[line] = at;
  else if (at > list.to[line]!) list.to[line] = at;
}
const anyMarked = ({ to }: Marks): boolean => to.some((at) => at >= 0);

/** Reads and clears the marks of a line: how many lines there are, how long, and the steps between them and along them. */
interface Sweep {
  into: Axis;
  /** the other axis, from which one bends */
  source: Axis;
  edge: Float64Array;
  enter: Float64Array;
  lines: number;
  length: number;
  /** from one line to the next, and from one node of a line to the next */
  across: number;
  along: number;
  marked: Marks;
  /** lines of the other axis that become cheaper */
  told: Marks;
}

export class Relaxer {
  /** kept from one search to the next: nothing in them outlives one */
  private readonly layers: Layer[] = [];
  private limit = Infinity;

  /**
   * The cheapest way from any start to any goal that goes a stretch along each of the lines in turn, or null.
   * @param limit what it must cost less than
   */
  relax(
    steps: StepCosts,
    starts: readonly Start[],
    goals: readonly Goal[],
    lines: readonly Line[],
    limit: number,
  ): Found | null {
    const size = steps.width * steps.height;
    while (this.layers.length <= lines.length) this.layers.push({ level: axis(), upright: axis() });
    const layers = this.layers.slice(0, lines.length + 1);
    for (const { level, upright } of layers) for (const list of [level, upright]) clear(list, size);
    this.limit = limit;
    let best: Found | null = null;
    const rows = marks(steps.height);
    const columns = marks(steps.width);
    const note = (at: number) => {
      const column = at % steps.width;
      const row = (at - column) / steps.width;
      mark(columns, column, row);
      mark(rows, row, column);
    };
    starts.forEach(({ at, heading, cost }, i) => {
      const { cost: costs, from } = heading % 2 === 1 ? this.layers[0]!.level : this.layers[0]!.upright;
      if (costs[at]! <= cost) return;
      costs[at] = cost;
      from[at] = -1 - i;
      note(at);
    });
    layers.forEach((layer, k) => {
      if (k > 0) this.along(steps, lines[k - 1]!, this.layers[k - 1]!, layer, note);
      const last = k === lines.length;
      const level: Sweep = {
        into: layer.level,
        source: layer.upright,
        edge: steps.right,
        enter: steps.level,
        lines: steps.height,
        length: steps.width,
        across: steps.width,
        along: 1,
        marked: rows,
        told: columns,
      };
      const upright: Sweep = {
        into: layer.upright,
        source: layer.level,
        edge: steps.down,
        enter: steps.upright,
        lines: steps.width,
        length: steps.height,
        across: 1,
        along: steps.width,
        marked: columns,
        told: rows,
      };
      while (anyMarked(rows) || anyMarked(columns)) {
        this.sweep(level, steps.bend, k === 0);
        this.sweep(upright, steps.bend, k === 0);
        if (last) best = this.reached(steps, starts, goals, layer, lines) ?? best;
      }
    });
    return best;
  }

  /**
   * Sweeps every line that is marked, there and back: from where it has become cheaper to where nothing is gained any more.
   * Beyond a node that was come to as cheaply before, all is known.
   */
  private sweep(s: Sweep, bend: Float64Array, begins: boolean): void {
    const { cost, from } = s.into;
    const turned = s.source.cost;
    const { edge, enter, length, along, marked, told } = s;
    const { limit } = this;
    for (let line = 0; line < s.lines; line++) {
      const last = marked.to[line]!;
      if (last < 0) continue;
      const first = marked.from[line]!;
      marked.to[line] = -1;
      for (let back = 0; back < 2; back++) {
        const way = back ? -1 : 1;
        const [start, end, stop] = back ? [last, first, -1] : [first, last, length];
        let at = line * s.across + start * along;
        const step = way * along;
        // the edge to the next node is kept at the one before it, to the last at itself
        const lag = back ? 0 : -along;
        let running = Infinity;
        let began = -1;
        for (let i = start; i !== stop; i += way, at += step) {
          const beyond = (i - end) * way > 0;
          if (running !== Infinity) running += edge[at + lag]! + enter[at]!;
          if (beyond && running >= limit) break;
          const known = cost[at]!;
          const bent = turned[at]! + bend[at]!;
          if (bent < running) {
            if (beyond) break;
            running = bent;
            began = at;
          }
          if (begins && known < running && from[at]! < 0) {
            running = known;
            began = at;
          } else if (running >= limit) running = Infinity;
          else if (began !== at) {
            if (running < known) {
              cost[at] = running;
              from[at] = began;
              mark(told, i, line);
            } else running = Infinity;
          }
        }
      }
    }
  }

  /** From one layer to the next: at least one step along a line, from wherever the layer before comes to it. */
  private along(steps: StepCosts, line: Line, before: Layer, after: Layer, note: (at: number) => void): void {
    const index = steps.lineIn(line);
    if (index < 0) return;
    const upright = line.x !== undefined;
    const [own, other] = upright ? [before.upright, before.level] : [before.level, before.upright];
    const { cost, from } = upright ? after.upright : after.level;
    const edge = upright ? steps.down : steps.right;
    const enter = upright ? steps.upright : steps.level;
    const [length, step, first] = upright
      ? [steps.height, steps.width, index]
      : [steps.width, 1, index * steps.width];
    for (const back of [false, true]) {
      let running = Infinity;
      let began = -1;
      for (let i = 0; i < length; i++) {
        const at = first + (back ? length - 1 - i : i) * step;
        running += edge[back ? at : at - step]! + enter[at]!;
        if (running < cost[at]!) {
          cost[at] = running;
          from[at] = -1 - began;
          note(at);
        }
        const here = Math.min(own.cost[at]!, other.cost[at]! + steps.bend[at]!);
        if (i === 0 || !(running <= here)) {
          running = here;
          began = at;
        }
      }
    }
  }

  /** The best goal that the last layer comes to, if it is better than any before. */
  private reached(
    steps: StepCosts,
    starts: readonly Start[],
    goals: readonly Goal[],
    { level, upright }: Layer,
    lines: readonly Line[],
  ): Found | null {
    let best: Found | null = null;
    goals.forEach((goal, n) => {
      const [ahead, aside] = goal.into % 2 === 1 ? [level, upright] : [upright, level];
      for (const [list, cost] of [
        [ahead, ahead.cost[goal.at]! + goal.cost],
        [aside, aside.cost[goal.at]! + goal.cost + goal.bend],
      ] as const) {
        if (!(cost < this.limit)) continue;
        // a start that is the goal itself is no way back into it
        const begun = list.from[goal.at]!;
        if (lines.length === 0 && begun < 0 && list === ahead && starts[-1 - begun]!.heading !== goal.into) continue;
        this.limit = cost;
        best = { cost, goal: n, ...this.trace(steps, goal.at, list === level, lines.length) };
      }
    });
    return best;
  }

  /** Back along the stretches, from a node that was come to on one axis. */
  private trace(steps: StepCosts, goal: number, onLevel: boolean, last: number): { corners: number[]; start: number } {
    const corners = [goal];
    let at = goal;
    let isLevel = onLevel;
    let k = last;
    for (;;) {
      const layer = this.layers[k]!;
      const from = (isLevel ? layer.level : layer.upright).from[at]!;
      if (from < 0 && k === 0) return { corners: corners.reverse(), start: -1 - from };
      const next = from < 0 ? -1 - from : from;
      if (next !== at) corners.push(next);
      if (from < 0) {
        k--;
        const { level, upright } = this.layers[k]!;
        const [own, other] = isLevel ? [level, upright] : [upright, level];
        if (other.cost[next]! + steps.bend[next]! < own.cost[next]!) isLevel = !isLevel;
      } else {
        const [own, other] = isLevel ? [layer.level, layer.upright] : [layer.upright, layer.level];
        // a stretch begins at a start, or at a bend
        const begun = own.from[next]!;
        if (k === 0 && begun < 0 && own.cost[next]! < other.cost[next]! + steps.bend[next]!)
          return { corners: corners.reverse(), start: -1 - begun };
        isLevel = !isLevel;
      }
      at = next;
    }
  }
}
