import type { Condition, Source } from '../circuit/conditions';
import type { Graph } from '../terminals/graph';
import { pathTo, reach, reaches } from '../terminals/reach';
import { isOvercurrent } from '../terminals/roles-of-parts';

/** By which line a node is fed: the source, and the devices from it on. */
export interface FedBy {
  source: Source;
  /** ids, from the source on */
  devices: string[];
  /** id of the overcurrent device nearest before it; null where there is none */
  way: string | null;
}

/** Ids of the devices that a path of edges passes, in its order. */
export function devicesOn(graph: Graph, edges: readonly number[]): string[] {
  const ids = edges.flatMap((number) => {
    const { kind, part } = graph.edges[number]!;
    return kind === 'device' || kind === 'changeover' || kind === 'bypass' ? [part!] : [];
  });
  return [...new Set(ids)];
}

/** How each of some nodes is fed; nodes that no line reaches are left out. */
export function fedBy(
  graph: Graph,
  condition: Condition,
  closed: Uint8Array,
  nodes: readonly number[],
): Map<number, FedBy> {
  const found = new Map<number, FedBy>();
  for (const source of condition.sources) {
    const walk = reach(graph, [source.line], closed);
    for (const node of nodes) {
      if (found.has(node) || !reaches(walk, node)) continue;
      const devices = devicesOn(graph, pathTo(graph, walk, node));
      const way = devices.findLast((id) => isOvercurrent(graph.parts.get(id)!)) ?? null;
      found.set(node, { source, devices, way });
    }
  }
  return found;
}
