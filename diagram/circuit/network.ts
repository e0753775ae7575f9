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

/** The branches of a network alone. */
export type Branches = Pick<Network, 'from' | 'to' | 're' | 'im'>;

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
