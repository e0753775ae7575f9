/**
 * Complex nodal analysis of a network at one frequency. Homes are nearly trees, so that eliminating the node with the
 * fewest neighbours first leaves almost no fill and takes almost linear time.
 *
 * Each elimination is a star-mesh transformation: the branches at a node are replaced by branches between its neighbours.
 * The diagonal is never stored but added up when it is needed, from admittances that all lie in the right half plane, so
 * that nothing is subtracted: a contact of a microhm beside an insulation of a gigohm loses no digit.
 */

/** A node number, or this for the reference (true earth). */
export const REFERENCE = -1;

export interface Network {
  /** nodes 0 to size - 1, beside the reference */
  size: number;
  /** branch i joins from[i] and to[i] with the admittance re[i] + j im[i], S, re >= 0 */
  from: Int32Array;
  to: Int32Array;
  re: Float64Array;
  im: Float64Array;
  /** A rms pushed into each node from the reference */
  injectRe: Float64Array;
  injectIm: Float64Array;
  /** nodes held at a voltage against the reference, V rms */
  held?: ReadonlyMap<number, { re: number; im: number }>;
}

export interface Solution {
  /** V rms of each node against the reference */
  re: Float64Array;
  im: Float64Array;
  /** A rms of each branch, from `from` to `to` */
  currentRe: Float64Array;
  currentIm: Float64Array;
}

/** A node without any path to the reference or a held node: its voltage is not determined. */
export class FloatingNode extends Error {
  constructor(readonly node: number) {
    super(`node ${node} hangs free: nothing joins it to the reference`);
  }
}

const NONE = -1;

function twice<T extends Int32Array | Float64Array>(old: T): T {
  const bigger = new (old.constructor as new (length: number) => T)(old.length * 2);
  bigger.set(old);
  return bigger;
}

/** Half-edges in linked lists: h and h ^ 1 are the two ends of one branch. */
class Mesh {
  head: Int32Array;
  next: Int32Array;
  to: Int32Array;
  re: Float64Array;
  im: Float64Array;
  /** admittance to the reference */
  groundRe: Float64Array;
  groundIm: Float64Array;
  degree: Int32Array;
  used = 0;

  constructor(network: Network) {
    const room = 3 * network.from.length + 16;
    this.head = new Int32Array(network.size).fill(NONE);
    this.next = new Int32Array(2 * room);
    this.to = new Int32Array(2 * room);
    this.re = new Float64Array(room);
    this.im = new Float64Array(room);
    this.groundRe = new Float64Array(network.size);
    this.groundIm = new Float64Array(network.size);
    this.degree = new Int32Array(network.size);
  }

  private grow(): void {
    this.next = twice(this.next);
    this.to = twice(this.to);
    this.re = twice(this.re);
    this.im = twice(this.im);
  }

  join(a: number, b: number, re: number, im: number): void {
    if (2 * this.used + 2 > this.to.length) this.grow();
    const branch = this.used++;
    const h = 2 * branch;
    this.re[branch] = re;
    this.im[branch] = im;
    this.to[h] = b;
    this.next[h] = this.head[a]!;
    this.head[a] = h;
    this.to[h + 1] = a;
    this.next[h + 1] = this.head[b]!;
    this.head[b] = h + 1;
    this.degree[a]!++;
    this.degree[b]!++;
  }
}

/** Nodes in lists by number of neighbours: the least is found at once. */
class Buckets {
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

function buildMesh(network: Network): Mesh {
  const mesh = new Mesh(network);
  const { size, from, to, re, im } = network;
  // Branches of each node, so that parallel ones become one before the mesh is made.
  const start = new Int32Array(size + 1);
  for (let i = 0; i < from.length; i++) {
    const low = Math.min(from[i]!, to[i]!);
    if (low >= 0) start[low + 1]!++;
    else if (from[i] !== to[i]) {
      const node = Math.max(from[i]!, to[i]!);
      mesh.groundRe[node]! += re[i]!;
      mesh.groundIm[node]! += im[i]!;
    }
  }
  for (let n = 0; n < size; n++) start[n + 1]! += start[n]!;
  const list = new Int32Array(start[size]!);
  const fill = start.slice(0, size);
  for (let i = 0; i < from.length; i++) {
    const low = Math.min(from[i]!, to[i]!);
    if (low >= 0) list[fill[low]!++] = i;
  }
  const seen = new Int32Array(size).fill(NONE);
  for (let n = 0; n < size; n++) {
    const before = mesh.used;
    for (let k = start[n]!; k < start[n + 1]!; k++) {
      const i = list[k]!;
      const other = Math.max(from[i]!, to[i]!);
      if (other === n) continue;
      const known = seen[other]!;
      if (known >= before) {
        mesh.re[known]! += re[i]!;
        mesh.im[known]! += im[i]!;
      } else {
        seen[other] = mesh.used;
        mesh.join(n, other, re[i]!, im[i]!);
      }
    }
  }
  return mesh;
}

/** An eliminated network: in this order, each node's voltage is its own part and shares of its neighbours' then. */
interface Factors {
  order: Int32Array;
  count: number;
  rowStart: Int32Array;
  rowTo: Int32Array;
  rowRe: Float64Array;
  rowIm: Float64Array;
  /** one over the sum of admittances at the node when it was eliminated */
  inverseRe: Float64Array;
  inverseIm: Float64Array;
}

/** Eliminates all nodes but the held ones, the least busy first. @throws FloatingNode */
function eliminate(network: Network): Factors {
  const { size } = network;
  const mesh = buildMesh(network);
  const held = new Uint8Array(size);
  network.held?.forEach((_, node) => (held[node] = 1));
  const buckets = new Buckets(size);
  for (let n = 0; n < size; n++) if (!held[n]) buckets.put(n, mesh.degree[n]!);

  const gone = new Uint8Array(size);
  const order = new Int32Array(size);
  const rowStart = new Int32Array(size + 1);
  let rowTo = new Int32Array(4 * size + 16);
  let rowRe = new Float64Array(rowTo.length);
  let rowIm = new Float64Array(rowTo.length);
  const inverseRe = new Float64Array(size);
  const inverseIm = new Float64Array(size);
  const mark = new Int32Array(size).fill(NONE);
  let count = 0;
  let end = 0;

  for (let k = buckets.take(); k !== NONE; k = buckets.take()) {
    gone[k] = 1;
    order[count] = k;
    const first = end;
    rowStart[count++] = first;
    let sumRe = mesh.groundRe[k]!;
    let sumIm = mesh.groundIm[k]!;
    for (let h = mesh.head[k]!; h !== NONE; h = mesh.next[h]!) {
      const j = mesh.to[h]!;
      if (gone[j]) continue;
      if (end === rowTo.length) {
        rowTo = twice(rowTo);
        rowRe = twice(rowRe);
        rowIm = twice(rowIm);
      }
      rowTo[end] = j;
      rowRe[end] = mesh.re[h >> 1]!;
      rowIm[end] = mesh.im[h >> 1]!;
      sumRe += rowRe[end]!;
      sumIm += rowIm[end]!;
      end++;
    }
    const square = sumRe * sumRe + sumIm * sumIm;
    if (!(square > 0)) throw new FloatingNode(k);
    const oneRe = (inverseRe[k] = sumRe / square);
    const oneIm = (inverseIm[k] = -sumIm / square);
    busiestLast(mesh.degree, rowTo, rowRe, rowIm, first, end);
    const earthRe = mesh.groundRe[k]!;
    const earthIm = mesh.groundIm[k]!;
    for (let p = first; p < end; p++) {
      const j = rowTo[p]!;
      const yRe = rowRe[p]!;
      const yIm = rowIm[p]!;
      const shareRe = yRe * oneRe - yIm * oneIm;
      const shareIm = yRe * oneIm + yIm * oneRe;
      // The share of k's way to the reference that j takes over.
      mesh.groundRe[j]! += shareRe * earthRe - shareIm * earthIm;
      mesh.groundIm[j]! += shareRe * earthIm + shareIm * earthRe;
      mesh.degree[j]!--;
      rowRe[p] = shareRe;
      rowIm[p] = shareIm;
    }
    if (end - first > 1) fillIn(mesh, rowTo, rowRe, rowIm, first, end, sumRe, sumIm, gone, mark);
    for (let p = first; p < end; p++) {
      const j = rowTo[p]!;
      if (!held[j]) buckets.put(j, mesh.degree[j]!);
    }
  }
  rowStart[count] = end;
  return { order, count, rowStart, rowTo, rowRe, rowIm, inverseRe, inverseIm };
}

/** Voltages for currents pushed in; `re` and `im` hold the held nodes' voltages and take the others'. Uses up `inRe`, `inIm`. */
function substitute(
  factors: Factors,
  inRe: Float64Array,
  inIm: Float64Array,
  re: Float64Array,
  im: Float64Array,
): void {
  const { order, count, rowStart, rowTo, rowRe, rowIm, inverseRe, inverseIm } = factors;
  for (let i = 0; i < count; i++) {
    const k = order[i]!;
    const kRe = inRe[k]!;
    const kIm = inIm[k]!;
    if (kRe === 0 && kIm === 0) continue;
    for (let p = rowStart[i]!; p < rowStart[i + 1]!; p++) {
      const j = rowTo[p]!;
      inRe[j]! += rowRe[p]! * kRe - rowIm[p]! * kIm;
      inIm[j]! += rowRe[p]! * kIm + rowIm[p]! * kRe;
    }
  }
  for (let i = count - 1; i >= 0; i--) {
    const k = order[i]!;
    let vRe = inRe[k]! * inverseRe[k]! - inIm[k]! * inverseIm[k]!;
    let vIm = inRe[k]! * inverseIm[k]! + inIm[k]! * inverseRe[k]!;
    for (let p = rowStart[i]!; p < rowStart[i + 1]!; p++) {
      const j = rowTo[p]!;
      vRe += rowRe[p]! * re[j]! - rowIm[p]! * im[j]!;
      vIm += rowRe[p]! * im[j]! + rowIm[p]! * re[j]!;
    }
    re[k] = vRe;
    im[k] = vIm;
  }
}

/** Adds to each branch's current what these voltages drive through it. */
function addCurrents(
  network: Network,
  re: Float64Array,
  im: Float64Array,
  intoRe: Float64Array,
  intoIm: Float64Array,
): void {
  const { from, to, re: yRe, im: yIm } = network;
  for (let i = 0; i < from.length; i++) {
    const a = from[i]!;
    const b = to[i]!;
    const dRe = (a < 0 ? 0 : re[a]!) - (b < 0 ? 0 : re[b]!);
    const dIm = (a < 0 ? 0 : im[a]!) - (b < 0 ? 0 : im[b]!);
    intoRe[i]! += dRe * yRe[i]! - dIm * yIm[i]!;
    intoIm[i]! += dRe * yIm[i]! + dIm * yRe[i]!;
  }
}

/**
 * Solves the network. The current of a contact is a tiny difference of large voltages times a large admittance; one
 * refinement by what is left over at each node gives it all its digits.
 * @returns voltages of all nodes against the reference, and currents of all branches
 * @throws FloatingNode where a node has no path to the reference or a held node
 */
export function solveNetwork(network: Network): Solution {
  const { size, from, to } = network;
  const factors = eliminate(network);
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  network.held?.forEach((value, node) => {
    re[node] = value.re;
    im[node] = value.im;
  });
  substitute(factors, network.injectRe.slice(), network.injectIm.slice(), re, im);
  const currentRe = new Float64Array(from.length);
  const currentIm = new Float64Array(from.length);
  addCurrents(network, re, im, currentRe, currentIm);

  const leftRe = network.injectRe.slice();
  const leftIm = network.injectIm.slice();
  for (let i = 0; i < from.length; i++) {
    const a = from[i]!;
    const b = to[i]!;
    if (a >= 0) {
      leftRe[a]! -= currentRe[i]!;
      leftIm[a]! -= currentIm[i]!;
    }
    if (b >= 0) {
      leftRe[b]! += currentRe[i]!;
      leftIm[b]! += currentIm[i]!;
    }
  }
  const stepRe = new Float64Array(size);
  const stepIm = new Float64Array(size);
  substitute(factors, leftRe, leftIm, stepRe, stepIm);
  addCurrents(network, stepRe, stepIm, currentRe, currentIm);
  for (let n = 0; n < size; n++) {
    re[n]! += stepRe[n]!;
    im[n]! += stepIm[n]!;
  }
  return { re, im, currentRe, currentIm };
}

/** Puts the neighbour with the longest list last, where filling in need not walk it: bars and joints are busy. */
function busiestLast(
  degree: Int32Array,
  rowTo: Int32Array,
  rowRe: Float64Array,
  rowIm: Float64Array,
  first: number,
  end: number,
): void {
  if (end - first < 2) return;
  let busiest = first;
  for (let p = first + 1; p < end; p++) if (degree[rowTo[p]!]! > degree[rowTo[busiest]!]!) busiest = p;
  for (const row of [rowTo, rowRe, rowIm]) {
    const kept = row[busiest]!;
    row[busiest] = row[end - 1]!;
    row[end - 1] = kept;
  }
}

/** Joins the neighbours of an eliminated node with one another: y_ij = y_ki y_kj / sum, added to what joins them already. */
function fillIn(
  mesh: Mesh,
  rowTo: Int32Array,
  rowRe: Float64Array,
  rowIm: Float64Array,
  first: number,
  end: number,
  sumRe: number,
  sumIm: number,
  gone: Uint8Array,
  mark: Int32Array,
): void {
  for (let p = first; p < end - 1; p++) {
    const i = rowTo[p]!;
    // Marks what i is joined to, and forgets its branches to nodes that are gone.
    let last = NONE;
    for (let h = mesh.head[i]!; h !== NONE; h = mesh.next[h]!) {
      const j = mesh.to[h]!;
      if (gone[j]) {
        if (last === NONE) mesh.head[i] = mesh.next[h]!;
        else mesh.next[last] = mesh.next[h]!;
      } else {
        mark[j] = h >> 1;
        last = h;
      }
    }
    // share_i x y_kj = share_i x share_j x sum
    const halfRe = rowRe[p]! * sumRe - rowIm[p]! * sumIm;
    const halfIm = rowRe[p]! * sumIm + rowIm[p]! * sumRe;
    for (let q = p + 1; q < end; q++) {
      const j = rowTo[q]!;
      const yRe = halfRe * rowRe[q]! - halfIm * rowIm[q]!;
      const yIm = halfRe * rowIm[q]! + halfIm * rowRe[q]!;
      const known = mark[j]!;
      if (known === NONE) mesh.join(i, j, yRe, yIm);
      else {
        mesh.re[known]! += yRe;
        mesh.im[known]! += yIm;
      }
    }
    for (let h = mesh.head[i]!; h !== NONE; h = mesh.next[h]!) mark[mesh.to[h]!] = NONE;
  }
}
