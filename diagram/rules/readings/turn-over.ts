import type { End, Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import type { Reversal } from './reversals';

/** The end of a wire that a walk from the source reaches last. */
function farEnd({ graph }: Context, wire: Wire, path: readonly number[], start: number): End {
  let at = start;
  for (const number of path) {
    const edge = graph.edges[number]!;
    at = edge.a === at ? edge.b : edge.a;
    if (edge.wire?.id === wire.id) break;
  }
  return graph.node(...wire.from) === at ? wire.from : wire.to;
}

/** "Change the two wires over": each takes the other's far end. */
export function turnOver(context: Context, { points, wires }: Reversal): Remedy[] {
  if (wires.length !== 2) return [];
  const [line, neutral] = wires.map((id) => context.graph.wires.get(id)!) as [Wire, Wire];
  for (const { points: states } of context.evaluated) {
    const state = states.get(points[0]!)!;
    if (!state.reversed || !state.source) continue;
    const lineEnd = farEnd(context, line, state.lineEdges, state.source.line);
    const neutralEnd = farEnd(context, neutral, state.neutralEdges, state.source.neutral);
    const swap = (wire: Wire, at: End, to: End): Wire => (wire.from === at ? { ...wire, from: to } : { ...wire, to });
    const turned = [swap(line, lineEnd, neutralEnd), swap(neutral, neutralEnd, lineEnd)];
    return [{ label: 'Change the two wires over', patch: { set: { wires: turned } } }];
  }
  return [];
}
