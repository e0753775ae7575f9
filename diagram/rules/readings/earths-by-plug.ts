import { byDesignation } from '../../document/names';
import { reach, reaches } from '../../terminals/reach';
import { isPoint } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** Points that a plug earths and does not feed: pulled, it leaves them live and without earth. */
export interface EarthByPlug {
  plug: string;
  points: string[];
  /** earth wires at the plug */
  wires: string[];
}

/**
 * Plugs whose earth pin is the only earth of a point that gets its line past them: on mains from elsewhere, or, of a
 * fixed
 * point, from a backup source that the plug does not carry.
 */
export const earthsByPlug = once((context: Context): EarthByPlug[] => {
  const { graph, earth, evaluated } = context;
  const starts = earth.reached.order.filter((node) => earth.reached.via[node] === -1);
  const found: EarthByPlug[] = [];
  for (const plug of context.parts('plug')) {
    const pin = (graph.contactsOf.get(plug.id) ?? []).find((number) => graph.markOf[graph.edges[number]!.a] === 'E');
    if (pin === undefined) continue;
    const { a, b } = graph.edges[pin]!;
    if (earth.reached.via[a] !== pin && earth.reached.via[b] !== pin) continue;
    const closed = earth.closed.slice();
    closed[pin] = 0;
    const without = reach(graph, starts, closed);
    const points = [...graph.parts.values()]
      .filter((part) => {
        const node = isPoint(part) ? graph.node(part.id, 'E')! : undefined;
        if (!reaches(earth.reached, node) || reaches(without, node)) return false;
        return evaluated.some(({ condition, points: states }) => {
          const { source, lineEdges } = states.get(part.id)!;
          if (!source || lineEdges.some((number) => graph.edges[number]!.part === plug.id)) return false;
          return condition.base === 'mains' || ('fixed' in part && part.fixed === true);
        });
      })
      .sort(byDesignation)
      .map(({ id }) => id);
    const wires = [...graph.wires.values()].flatMap(({ id, role, from, to }) =>
      role === 'earth' && [from, to].some(([part, mark]) => part === plug.id && mark === 'E') ? [id] : [],
    );
    if (points.length > 0) found.push({ plug: plug.id, points, wires });
  }
  return found;
});
