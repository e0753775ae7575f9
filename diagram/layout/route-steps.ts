import { CROSSABLE, type Grid, type Line } from './route-grid';
import { COST, type Occupancy } from './route-occupancy';

/** What every step over a piece of the grid costs one run: laid out densely, so that it is read fast. */

/** Columns and rows within which a way is looked for, both ends counted. */
export interface Window {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

// named here once: they are read at every node
const { bend: BEND, crossing: CROSSING, shared: SHARED, close: CLOSE, onLine: ON_LINE, pushing: PUSHING } = COST;

export class StepCosts {
  width = 0;
  height = 0;
  /** cost of the edge to the right and of the edge down; infinite where it may not be walked */
  right = new Float64Array(0);
  down = new Float64Array(0);
  /** cost of coming to a node level and upright, and of bending there */
  level = new Float64Array(0);
  upright = new Float64Array(0);
  bend = new Float64Array(0);
  private window: Window = { left: 0, right: -1, top: 0, bottom: -1 };

  constructor(
    private readonly grid: Grid,
    private readonly occupancy: Occupancy,
    private readonly terminals: ReadonlyMap<number, number>,
    private readonly spread: boolean,
  ) {}

  /** Number of a node within the window, or -1 outside. */
  local(node: number): number {
    const column = node % this.grid.columns;
    const row = (node - column) / this.grid.columns;
    const { left, right, top, bottom } = this.window;
    return column < left || column > right || row < top || row > bottom ? -1 : (row - top) * this.width + column - left;
  }

  private node(local: number): number {
    const column = local % this.width;
    return (this.window.top + (local - column) / this.width) * this.grid.columns + this.window.left + column;
  }

  /** Nodes of the grid after one up to another on the same line; the node itself where both are one. */
  stretch(from: number, to: number): number[] {
    if (from === to) return [this.node(to)];
    const step = (Math.abs(to - from) < this.width ? 1 : this.width) * Math.sign(to - from);
    return Array.from({ length: (to - from) / step }, (_, i) => this.node(from + step * (i + 1)));
  }

  /** Indexes of the column or row of a line within the window, or -1. */
  lineIn({ x, y }: Line): number {
    const { left, right, top, bottom } = this.window;
    if (x !== undefined) {
      const column = this.grid.xs.indexOf(x);
      return column < left || column > right ? -1 : column - left;
    }
    const row = this.grid.ys.indexOf(y);
    return row < top || row > bottom ? -1 : row - top;
  }

  /** Nothing comes to a node. */
  bar(node: number): void {
    const at = this.local(node);
    if (at >= 0) this.level[at] = this.upright[at] = Infinity;
  }

  allowBend(node: number, allowed: boolean): void {
    const at = this.local(node);
    if (at >= 0) this.bend[at] = allowed ? BEND : Infinity;
  }

  private reserve(size: number): void {
    if (this.right.length >= size) return;
    this.right = new Float64Array(size);
    this.down = new Float64Array(size);
    this.level = new Float64Array(size);
    this.upright = new Float64Array(size);
    this.bend = new Float64Array(size);
  }

  /** Works out the costs of one run's steps over a window. */
  survey(
    window: Window,
    ask: { net: number; backup: boolean; insists: boolean; lines: readonly Line[] },
  ): void {
    const { grid, occupancy: o, spread } = this;
    const { columns, covered, xs, ys } = grid;
    const { net, insists } = ask;
    const soft = ask.backup ? grid.soft.backup : grid.soft.mains;
    const { families, nets } = o;
    const family = families[net + 1]!;
    const own = nets[net + 1]!;
    this.window = window;
    this.width = window.right - window.left + 1;
    this.height = window.bottom - window.top + 1;
    this.reserve(this.width * this.height);
    const { right, down, level, upright, bend } = this;
    const push = (on: number): number => (insists ? PUSHING * (1 + o.pushed[on + 1]!) : Infinity);
    const isOther = (on: number | undefined): boolean => on !== undefined && on !== 0 && families[on + 1] !== family;
    let at = 0;
    for (let row = window.top; row <= window.bottom; row++) {
      const deep = (ys[row + 1] ?? ys[row]!) - ys[row]!;
      for (let column = window.left; column <= window.right; column++, at++) {
        const node = row * columns + column;
        const wide = (xs[column + 1] ?? xs[column]!) - xs[column]!;
        const corner = o.corner[node]!;
        const turned =
          corner === 0 || nets[corner + 1] === own ? 0 : insists && this.terminals.has(node) ? Infinity : push(corner);
        const cover = covered[node]!;
        const onLevel = o.level[node]!;
        const onUpright = o.upright[node]!;
        const acrossLevel = onUpright !== 0 && families[onUpright + 1] !== family;
        const acrossUpright = onLevel !== 0 && families[onLevel + 1] !== family;
        level[at] = cover !== 0 ? Infinity : acrossLevel ? turned + CROSSING : turned;
        upright[at] =
          cover !== 0 && cover !== CROSSABLE ? Infinity : acrossUpright ? turned + CROSSING : turned;
        // a bend on another conductor would look like a joint
        bend[at] = cover !== 0 ? Infinity : acrossLevel || acrossUpright ? push(acrossLevel ? onUpright : onLevel) + BEND : BEND;
        const onRight = o.right[node]!;
        const onDown = o.down[node]!;
        const here = 1 + soft[node]!;
        let price = onRight === net ? wide * SHARED : wide * here;
        if (onRight !== 0 && families[onRight + 1] !== family) price += push(onRight);
        if (spread && isOther(o.right[node - columns])) price += wide * CLOSE;
        if (spread && isOther(o.right[node + columns])) price += wide * CLOSE;
        right[at] = price;
        price = onDown === net ? deep * SHARED : deep * here;
        if (onDown !== 0 && families[onDown + 1] !== family) price += push(onDown);
        if (spread && isOther(o.down[node - 1])) price += deep * CLOSE;
        if (spread && isOther(o.down[node + 1])) price += deep * CLOSE;
        down[at] = price;
      }
    }
    for (const line of ask.lines) this.favour(line);
  }

  /** A stretch on a line chosen by hand costs a little less, so that the run stays on it. */
  private favour(line: Line): void {
    const index = this.lineIn(line);
    if (index < 0) return;
    if (line.x !== undefined) for (let r = 0; r < this.height; r++) this.down[r * this.width + index]! *= ON_LINE;
    else for (let c = 0; c < this.width; c++) this.right[index * this.width + c]! *= ON_LINE;
  }
}
