import { eliminate, substitute } from './eliminate';
import type { Network, Solution } from './network';

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
