import type { Network } from './network';

/** The end of a list, or no node. */
export const NONE = -1;

/** The same numbers in an array twice as long. */
export function twice<T extends Int32Array | Float64Array>(old: T): T {
  const bigger = new (old.constructor as new (length: number) => T)(old.length * 2);
  bigger.set(old);
  return bigger;
}

/** Half-edges in linked lists: h and h ^ 1 are the two ends of one branch. */
export class Mesh {
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

/** The branches of a network as lists at each node, parallel ones as one. */
export function buildMesh(network: Network): Mesh {
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
