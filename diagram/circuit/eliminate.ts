import { Buckets } from './buckets';
import { NONE, buildMesh, twice, type Mesh } from './mesh';
import { FloatingNode, REFERENCE, type Branches, type Network } from './network';

/**
 * Complex nodal analysis of a network at one frequency. Homes are nearly trees, so that eliminating the node with the
 * fewest neighbours first leaves almost no fill and takes almost linear time.
 *
 * Each elimination is a star-mesh transformation: the branches at a node are replaced by branches between its
 * neighbours.
 * The diagonal is never stored but added up when it is needed, from admittances that all lie in the right half plane,
 * so
 * that nothing is subtracted: a contact of a microhm beside an insulation of a gigohm loses no digit.
 */

/** An eliminated network: in this order, each node's voltage is its own part and shares of its neighbours' then. */
export interface Factors {
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
export function eliminate(network: Network): Factors {
  const held = new Uint8Array(network.size);
  network.held?.forEach((_, node) => (held[node] = 1));
  return eliminateMesh(buildMesh(network), held);
}

/** Eliminates the nodes before `first`, and says what branches join the others then. @throws FloatingNode */
export function eliminateTo(network: Network, first: number): { factors: Factors; left: Branches } {
  const mesh = buildMesh(network);
  const factors = eliminateMesh(mesh, new Uint8Array(network.size).fill(1, first));
  const from: number[] = [];
  const to: number[] = [];
  const re: number[] = [];
  const im: number[] = [];
  const put = (a: number, b: number, yRe: number, yIm: number) => {
    from.push(a);
    to.push(b);
    re.push(yRe);
    im.push(yIm);
  };
  for (let a = first; a < network.size; a++) {
    for (let h = mesh.head[a]!; h !== NONE; h = mesh.next[h]!)
      if (mesh.to[h]! > a) put(a, mesh.to[h]!, mesh.re[h >> 1]!, mesh.im[h >> 1]!);
    if (mesh.groundRe[a] !== 0 || mesh.groundIm[a] !== 0) put(a, REFERENCE, mesh.groundRe[a]!, mesh.groundIm[a]!);
  }
  return {
    factors,
    left: {
      from: Int32Array.from(from),
      to: Int32Array.from(to),
      re: Float64Array.from(re),
      im: Float64Array.from(im),
    },
  };
}

function eliminateMesh(mesh: Mesh, held: Uint8Array): Factors {
  const size = held.length;
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

/**
 * Voltages for currents pushed in; `re` and `im` hold the held nodes' voltages and take the others'. Uses up `inRe`,
 * `inIm`.
 */
export function substitute(
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

/** Voltages between those of the held nodes, where no current is pushed in. */
export function follow(factors: Factors, re: Float64Array, im: Float64Array): void {
  const { order, count, rowStart, rowTo, rowRe, rowIm } = factors;
  for (let i = count - 1; i >= 0; i--) {
    let vRe = 0;
    let vIm = 0;
    for (let p = rowStart[i]!; p < rowStart[i + 1]!; p++) {
      const j = rowTo[p]!;
      vRe += rowRe[p]! * re[j]! - rowIm[p]! * im[j]!;
      vIm += rowRe[p]! * im[j]! + rowIm[p]! * re[j]!;
    }
    re[order[i]!] = vRe;
    im[order[i]!] = vIm;
  }
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

/**
 * Joins the neighbours of an eliminated node with one another: y_ij = y_ki y_kj / sum, added to what joins them
 * already.
 */
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
