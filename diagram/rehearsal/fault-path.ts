import { size, type Steady } from '../circuit/steady';
import type { Graph } from '../terminals/graph';

/** A stretch that the fault's current takes. */
export interface PathStep {
  /** of a conductor; the id of the part where it goes through one */
  wire?: string;
  part?: string;
  /** ends in the direction of the current: part and mark */
  from: readonly [string, string];
  to: readonly [string, string];
  /** true on the way out, by line; false on the way home, by earth or neutral */
  out: boolean;
  amps: number;
}

/** Of several ways home, one that carries less than this share of the fault is not drawn. */
const SHARE = 0.2;
const LEAST_A = 5e-3;

const homeward = (kind: string, mark: string): boolean =>
  kind === 'through' ||
  kind === 'ground' ||
  kind === 'bond' ||
  mark === '3' ||
  mark === '4' ||
  mark === 'N' ||
  mark === 'E' ||
  mark === 'A3' ||
  mark === 'B3' ||
  mark.endsWith('.N') ||
  mark.endsWith('.E');

/**
 * The way of a fault's current: what flows now and did not flow before, wherever it is a fair share of the fault.
 * @param before the home as it was before this fault
 * @returns nothing where the fault draws no current
 */
export function faultPath(graph: Graph, before: Steady, now: Steady, faultAmps: number): PathStep[] {
  const least = Math.max(LEAST_A, SHARE * faultAmps);
  if (faultAmps < LEAST_A) return [];
  const path: PathStep[] = [];
  graph.edges.forEach((edge, number) => {
    const [then, here] = [before.current(number), now.current(number)];
    const added = { re: here.re - then.re, im: here.im - then.im };
    const amps = size(added);
    if (amps < least || size(here) < least) return;
    // Sources stand at angle 0: on the way out the real part runs from a to b, at home as well, along the loop.
    const forward = added.re >= 0;
    const end = (node: number, at: 0 | 1): [string, string] =>
      edge.wire ? (at === 0 ? edge.wire.from : edge.wire.to) : [graph.partOf[node]!.id, graph.markOf[node]!];
    const ends = [end(edge.a, 0), end(edge.b, 1)] as const;
    const out = edge.wire
      ? edge.wire.role !== 'neutral' && edge.wire.role !== 'earth'
      : !homeward(edge.kind, graph.markOf[edge.a]!);
    path.push({
      ...(edge.wire ? { wire: edge.wire.id } : { part: edge.part! }),
      from: forward ? ends[0] : ends[1],
      to: forward ? ends[1] : ends[0],
      out,
      amps,
    });
  });
  return path;
}
