import type { Edge, Graph } from './graph';

/**
 * The neighbourhood of some nodes: everything joined to them over the edges that `passes` allows. A node that `stops` is
 * included but not walked beyond. Costs only what it visits, so it can be asked for each of many ways.
 */
export function spread(
  graph: Graph,
  starts: Iterable<number>,
  passes: (edge: Edge, number: number) => boolean,
  stops: (node: number) => boolean = () => false,
): { nodes: Set<number>; edges: Set<number> } {
  const nodes = new Set(starts);
  const edges = new Set<number>();
  for (const node of nodes) {
    if (stops(node)) continue;
    for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
      const number = graph.around[k]!;
      const edge = graph.edges[number]!;
      if (!passes(edge, number)) continue;
      edges.add(number);
      nodes.add(edge.a === node ? edge.b : edge.a);
    }
  }
  return { nodes, edges };
}
