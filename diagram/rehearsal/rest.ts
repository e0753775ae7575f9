import { evaluate } from '../circuit/evaluate';
import { standingsOf } from '../circuit/steady';
import type { Graph } from '../terminals/graph';
import { drawnSettings, type Setting } from './settings';

/**
 * Where every switch and device stands before anybody has touched it: as drawn, and two-way and cross switches that the
 * drawing leaves open so that their lamps burn.
 */
export function restOf(graph: Graph): Record<string, Setting> {
  const settings = drawnSettings(graph);
  const free = [...graph.parts.values()].filter(
    (part) => (part.kind === 'switch-2way' || part.kind === 'switch-cross') && part.state === undefined,
  );
  if (free.length === 0) return settings;
  const standings = standingsOf(graph, evaluate(graph).evaluated[0]!);
  const closed = standings[0]!.standing.closed;
  for (const { id } of free) {
    for (const number of graph.contactsOf.get(id) ?? [])
      if (closed[number]) settings[id] = graph.edges[number]!.position!;
  }
  return settings;
}
