import type { End, Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import type { NeutralFault } from './neutral-faults';
import { barsWhere, moveTo, takeOut } from './rewire';

/** At most so many bars are tried: the nearest are the likely ones. */
const MOST = 6;

/** The end of a wire on the side away from the points: where it was landed wrongly. */
function farEnds(context: Context, wires: readonly string[], points: readonly string[]): { wire: Wire; at: End }[] {
  const { graph } = context;
  return wires.flatMap((id) => {
    const wire = graph.wires.get(id)!;
    // Walked from the points, the far end is the one met last.
    const near = (end: End) =>
      points.includes(end[0]) ||
      (graph.parts.get(end[0])!.kind === 'joint' &&
        graph.parts.get(end[0])!.place === graph.parts.get(points[0]!)!.place);
    const far = near(wire.from) && !(near(wire.to) && points.includes(wire.to[0])) ? wire.to : wire.from;
    return [{ wire, at: far }];
  });
}

/**
 * Ways to bring a neutral home: a link is taken out; stray wires are led to the neutral joints and bars of the home, those of
 * the same place first. Whether one is right shows when the home is examined with it.
 */
export function neutralRemedies(context: Context, { points, wires, link }: NeutralFault): Remedy[] {
  if (link) return [takeOut('Take the link out', wires)];
  if (wires.length === 0) return [];
  const { graph } = context;
  const ends = farEnds(context, wires, points);
  const place = graph.parts.get(points[0]!)!.place;
  const isNeutral = (node: number) => {
    for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++)
      if (graph.edges[graph.around[k]!]!.wire?.role === 'neutral') return true;
    return false;
  };
  const here = barsWhere(context, (part, node) => part.kind === 'joint' && part.place === place && isNeutral(node));
  const bars = barsWhere(context, ({ kind }) => kind === 'neutral-bar');
  const landed = new Set(ends.map(({ at }) => at[0]));
  const leavesRoom = ends.every(({ at }) => graph.parts.get(at[0])!.kind === 'neutral-bar');
  return (leavesRoom || here.length === 0 ? bars : here)
    .filter(({ id }) => !landed.has(id))
    .slice(0, MOST)
    .flatMap(({ id }) => moveTo(context, 'the neutral', ends, id));
}
