import type { Edge, Graph } from '../terminals/graph';
import { closedEdges, reach, reaches, type Reach } from '../terminals/reach';
import { spread } from '../terminals/spread';
import { natureOfNode, type Nature } from './natures';

/** Nodes that are earth by what they are: the supply's earth terminal (TN), electrodes, earth bars. */
export function earthAnchors(graph: Graph): number[] {
  const tt = graph.document.supply.system === 'TT';
  const nodes: number[] = [];
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    if (part.kind === 'earth-bar' || part.kind === 'electrode' || (part.kind === 'supply' && mark === 'E' && !tt))
      nodes.push(node);
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
  /** on TN, what hangs on electrodes apart from the main earth: an outbuilding with its own rod is TT by itself */
  islands: Reach;
}

interface Crossed {
  edge: number;
  between: readonly [Nature, Nature];
}

/** Neutral terminals before the home's first device or meter, where TN-C-S has its one joint of neutral and earth. */
function beforeOrigin(graph: Graph): (node: number) => boolean {
  const starts = [...graph.parts.values()]
    .filter(({ kind }) => kind === 'supply')
    .map(({ id }) => graph.node(id, 'N')!);
  const own = (node: number) => natureOfNode(graph, node) !== 'E' && graph.partOf[node]!.kind !== 'neutral-bar';
  const { nodes } = spread(
    graph,
    starts,
    (edge) => edge.kind === 'wire',
    (node) => !own(node),
  );
  return (node) => nodes.has(node) && own(node);
}

/** True when a joint of neutral and earth is the supply's own, drawn: on TN-C-S, before the origin. */
export function isSupplyJoint(graph: Graph, edge: number): boolean {
  if (graph.document.supply.system !== 'TN-C-S') return false;
  const before = beforeOrigin(graph);
  return before(graph.edges[edge]!.a) || before(graph.edges[edge]!.b);
}

/** Where the means of earthing is: the supply's earth on TN (or its drawn joint on TN-C-S), electrodes on TT. */
function meansOfEarthing(graph: Graph, crossed: readonly Crossed[]): number[] {
  const tt = graph.document.supply.system === 'TT';
  const own = earthAnchors(graph).filter((node) => graph.partOf[node]!.kind === (tt ? 'electrode' : 'supply'));
  const joints = crossed
    .filter(({ edge, between }) => between.includes('N') && between.includes('E') && isSupplyJoint(graph, edge))
    .flatMap(({ edge }) => [graph.edges[edge]!.a, graph.edges[edge]!.b])
    .filter((node) => natureOfNode(graph, node) === 'E');
  return [...new Set([...own, ...joints])];
}

/**
 * Follows the earth. Where the bar itself has no earth, what hangs on the bar still counts as reached, so that one
 * missing main earth is not said again at every part.
 */
export function workOutEarth(
  graph: Graph,
  evaluation: { evaluated: readonly { crossed: readonly Crossed[] }[] },
): Earth {
  const joints = evaluation.evaluated.flatMap(({ crossed }) => crossed);
  const closed = closedEdges(graph, (edge: Edge) => edge.kind === 'bond');
  for (const { edge } of joints) closed[edge] = 0;
  const means = meansOfEarthing(graph, joints);
  const fromMeans = reach(graph, means, closed);
  const bars = earthAnchors(graph).filter((node) => graph.partOf[node]!.kind === 'earth-bar');
  const earthedBar = bars.find((node) => reaches(fromMeans, node));
  const weight = (node: number) => reach(graph, [node], closed).order.length;
  const mainBar =
    earthedBar ??
    bars.map((node) => ({ node, size: weight(node) })).sort((a, b) => b.size - a.size || a.node - b.node)[0]?.node;
  const starts = mainBar === undefined || earthedBar !== undefined ? means : [mainBar];
  const reached = reach(graph, starts, closed);
  const rods = earthAnchors(graph).filter(
    (node) => graph.partOf[node]!.kind === 'electrode' && earthedBar !== undefined && !reaches(reached, node),
  );
  return { closed, reached, mainBar, earthed: earthedBar !== undefined, islands: reach(graph, rods, closed) };
}
