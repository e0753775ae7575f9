import { eliminateTo, follow, type Factors } from './eliminate';
import { REFERENCE, type Branches, type Network, type Solution } from './network';

/**
 * A network taken apart at some of its nodes, the cut: cells hang on the cut and are joined to nothing else. A cell is
 * condensed by itself to branches among the nodes of the cut, the cut is solved with those, and each cell's voltages
 * follow from it. What one cell comes to depends on itself alone, to the last digit: a cell that did not change is taken
 * over as it is.
 */

export interface Cell {
  /** by itself: its own nodes, then those of the cut that it meets; no current is pushed into it */
  own: Network;
  /** nodes of the cut that it meets, the last of its own, by their numbers in the cut */
  meets: readonly number[];
  factors: Factors;
  /** what it is to the cut, by numbers of the cut */
  left: Branches;
}

const NOTHING = new Float64Array(0);

const branchesFor = (count: number): Branches => ({
  from: new Int32Array(count),
  to: new Int32Array(count),
  re: new Float64Array(count),
  im: new Float64Array(count),
});

/** Branches of a network by their numbers, between nodes that `number` calls otherwise. */
function pick(network: Network, list: readonly number[], number: (node: number) => number): Branches {
  const picked = branchesFor(list.length);
  const at = (node: number) => (node < 0 ? REFERENCE : number(node));
  list.forEach((i, k) => {
    picked.from[k] = at(network.from[i]!);
    picked.to[k] = at(network.to[i]!);
    picked.re[k] = network.re[i]!;
    picked.im[k] = network.im[i]!;
  });
  return picked;
}

const alike = (a: ArrayLike<number>, b: ArrayLike<number>): boolean => {
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return false;
  return true;
};

const sameCell = ({ own, meets }: Cell, next: Network, nextMeets: readonly number[]): boolean =>
  own.size === next.size &&
  alike(meets, nextMeets) &&
  alike(own.from, next.from) &&
  alike(own.to, next.to) &&
  alike(own.re, next.re) &&
  alike(own.im, next.im);

function condenseCell(own: Network, meets: readonly number[]): Cell {
  const first = own.size - meets.length;
  const { factors, left } = eliminateTo(own, first);
  const inCut = (node: number) => (node < 0 ? REFERENCE : meets[node - first]!);
  return { own, meets, factors, left: { ...left, from: left.from.map(inCut), to: left.to.map(inCut) } };
}

export interface Pieces {
  /** branches of the network within the cut, by their numbers in the network */
  within: number[];
  cells: Cell[];
  /** by node its number in its cell; in the cut the given one */
  numbers: Int32Array;
}

/**
 * Takes a network apart.
 * @param cellOf by node the number of its cell, or -1 in the cut; no branch joins two cells, and current is pushed into
 * the cut alone
 * @param inCut by node its number in the cut; read for nodes of the cut only
 * @param known cells from before: one of the same branches is taken over
 */
export function takeApart(
  network: Network,
  cellOf: Int32Array,
  count: number,
  inCut: Int32Array,
  known: readonly Cell[] = [],
): Pieces {
  const { size, from, to } = network;
  const numbers = inCut.slice();
  const sizes = new Int32Array(count);
  for (let node = 0; node < size; node++) if (cellOf[node]! >= 0) numbers[node] = sizes[cellOf[node]!]!++;
  const within: number[] = [];
  const lists = Array.from({ length: count }, (): number[] => []);
  const home = (node: number) => (node < 0 ? -1 : cellOf[node]!);
  for (let i = 0; i < from.length; i++) {
    const cell = Math.max(home(from[i]!), home(to[i]!));
    (cell < 0 ? within : lists[cell]!).push(i);
  }
  const cells = lists.map((list, cell) => {
    const met = new Set<number>();
    for (const i of list)
      for (const node of [from[i]!, to[i]!]) if (node >= 0 && cellOf[node]! < 0) met.add(inCut[node]!);
    const meets = [...met].sort((a, b) => a - b);
    const first = sizes[cell]!;
    const own: Network = {
      size: first + meets.length,
      ...pick(network, list, (node) => (cellOf[node]! < 0 ? first + meets.indexOf(inCut[node]!) : numbers[node]!)),
      injectRe: NOTHING,
      injectIm: NOTHING,
    };
    const before = known[cell];
    return before && sameCell(before, own, meets) ? before : condenseCell(own, meets);
  });
  return { within, cells, numbers };
}

/** The cut of a network by itself. @param size of the cut  @param inCut by node its number there, -1 in a cell */
export function cutOf(network: Network, within: readonly number[], size: number, inCut: Int32Array): Network {
  const injectRe = new Float64Array(size);
  const injectIm = new Float64Array(size);
  inCut.forEach((at, node) => {
    if (at < 0) return;
    injectRe[at] = network.injectRe[node]!;
    injectIm[at] = network.injectIm[node]!;
  });
  return { size, ...pick(network, within, (node) => inCut[node]!), injectRe, injectIm };
}

/** The cut with its cells in their place; the cut's own branches come first. */
export function withCells(cut: Network, cells: readonly Cell[]): Network {
  const all: Branches[] = [cut, ...cells.map(({ left }) => left)];
  const joined = branchesFor(all.reduce((sum, { from }) => sum + from.length, 0));
  let at = 0;
  for (const { from, to, re, im } of all) {
    joined.from.set(from, at);
    joined.to.set(to, at);
    joined.re.set(re, at);
    joined.im.set(im, at);
    at += from.length;
  }
  return { ...cut, ...joined, injectRe: cut.injectRe.slice(), injectIm: cut.injectIm.slice() };
}

/** V by node. */
export type Volts = Pick<Solution, 're' | 'im'>;

/** V of each node of a cell, between those of the cut. @param volts takes them; at least as long as the cell has nodes */
export function cellVolts({ own, factors, meets }: Cell, cut: Volts, volts: Volts): void {
  const first = own.size - meets.length;
  meets.forEach((at, i) => {
    volts.re[first + i] = cut.re[at]!;
    volts.im[first + i] = cut.im[at]!;
  });
  follow(factors, volts.re, volts.im);
}
