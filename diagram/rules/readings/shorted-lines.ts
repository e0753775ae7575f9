import { natureOfRole } from '../../circuit/natures';
import { isBar } from '../../document/kinds';
import type { Context } from '../context';
import { crossings } from './crossings';
import { once } from './once';
import { potentials } from './potentials';

/**
 * Line wires that should have led on and are landed on neutral or earth instead: the short circuit tells what is dead
 * behind.
 */
export const shortedLines = once((context: Context): number => {
  const { graph } = context;
  const { line } = potentials(context);
  return crossings(context).filter(({ edge, between, switches }) => {
    const { a, b, wire } = graph.edges[edge]!;
    const live = [a, b].find((node) => line[node] === 1);
    if (live === undefined || !between.includes('L') || switches.length > 0) return false;
    return natureOfRole(wire!.role) === 'L' && wiresAt(graph, live) === 1 && !isBar(graph.partOf[live]!.kind);
  }).length;
});

function wiresAt({ start, around, edges }: Context['graph'], node: number): number {
  let count = 0;
  for (let k = start[node]!; k < start[node + 1]!; k++) if (edges[around[k]!]!.kind === 'wire') count++;
  return count;
}
