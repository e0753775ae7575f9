import { NONE } from './mesh';

/** Nodes in lists by number of neighbours: the least is found at once. */
export class Buckets {
  private readonly first: Int32Array;
  private readonly after: Int32Array;
  private readonly before: Int32Array;
  private readonly at: Int32Array;
  private least = 0;

  constructor(size: number) {
    this.first = new Int32Array(size + 1).fill(NONE);
    this.after = new Int32Array(size).fill(NONE);
    this.before = new Int32Array(size).fill(NONE);
    this.at = new Int32Array(size).fill(NONE);
  }

  put(node: number, degree: number): void {
    if (this.at[node] === degree) return;
    this.drop(node);
    const first = this.first[degree]!;
    this.after[node] = first;
    this.before[node] = NONE;
    if (first !== NONE) this.before[first] = node;
    this.first[degree] = node;
    this.at[node] = degree;
    if (degree < this.least) this.least = degree;
  }

  drop(node: number): void {
    const degree = this.at[node]!;
    if (degree === NONE) return;
    const before = this.before[node]!;
    const after = this.after[node]!;
    if (before === NONE) this.first[degree] = after;
    else this.after[before] = after;
    if (after !== NONE) this.before[after] = before;
    this.at[node] = NONE;
  }

  /** A node with the fewest neighbours, taken out; NONE when all are gone. */
  take(): number {
    while (this.least < this.first.length && this.first[this.least] === NONE) this.least++;
    if (this.least === this.first.length) return NONE;
    const node = this.first[this.least]!;
    this.drop(node);
    return node;
  }
}
