import type { Edge, Graph } from '../terminals/graph';
import { closedEdges, reach, type Reach } from '../terminals/reach';

/** Nodes that are earth by what they are: the supply's earth terminal (TN), electrodes, earth bars. */
export function earthAnchors(graph: Graph): number[] {
  const tt = graph.document.supply.system === 'TT';
  const nodes: number[] = [];
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    if (part.kind === 'earth-bar' || part.kind === 'electrode' || (part.kind === 'supply' && mark === 'E' && !tt)) nodes.push(node);
  });
  return nodes;
}

export interface Earth {
  /** closed edges over which earth is followed: everything but bonds and crossed joints */
  closed: Uint8Array;
  /** what reaches the main earthing terminal, over contacts too */
  reached: Reach;
  /** the earth bar that the home hangs on, whether it is earthed or not; undefined without any */
  mainBar: number | undefined;
  /** the main bar is joined to the supply's earth (TN) or an electrode (TT) */
  earthed: boolean;
}

/** Where the means of earthing is: the supply's earth on TN, electrodes on TT. */
function meansOfEarthing(graph: Graph): number[] {
  const tt = graph.document.supply.system === 'TT';
  return earthAnchors(graph).filter((node) => graph.partOf[node]!.kind === (tt ? 'electrode' : 'supply'));
}

/**
 * Follows the earth. Where the bar itself has no earth, what hangs on the bar still counts as reached, so that one
 * missing main earth is not said again at every part.
 */
export function workOutEarth(graph: Graph, evaluation: { evaluated: readonly { crossed: readonly { edge: number }[] }[] }): Earth {
  const closed = closedEdges(graph, (edge: Edge) => edge.kind === 'bond');
  for (const { crossed } of evaluation.evaluated) for (const { edge } of crossed) closed[edge] = 0;
  const means = meansOfEarthing(graph);
  const fromMeans = reach(graph, means, closed);
  const bars = earthAnchors(graph).filter((node) => graph.partOf[node]!.kind === 'earth-bar');
  const earthedBar = bars.find((node) => fromMeans.via[node] !== -2);
  const weight = (node: number) => reach(graph, [node], closed).order.length;
  const mainBar = earthedBar ?? bars.map((node) => ({ node, size: weight(node) })).sort((a, b) => b.size - a.size || a.node - b.node)[0]?.node;
  const starts = mainBar === undefined || earthedBar !== undefined ? means : [mainBar];
  return { closed, reached: reach(graph, starts, closed), mainBar, earthed: earthedBar !== undefined };
}
