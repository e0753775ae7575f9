import type { Graph } from './graph';

/** What can be reached from some nodes over closed edges, and by which edge each node was first reached. */
export interface Reach {
  /** edge by which the node was reached; -1 at a start, -2 where not reached */
  via: Int32Array;
  /** nodes in the order of reaching */
  order: number[];
}

const START = -1;
const NOT = -2;

/** Walks breadth first from `starts` over the edges whose entry in `closed` is not 0. */
export function reach(graph: Graph, starts: Iterable<number>, closed: Uint8Array): Reach {
  const via = new Int32Array(graph.size).fill(NOT);
  const order: number[] = [];
  for (const node of starts) {
    if (via[node] !== NOT) continue;
    via[node] = START;
    order.push(node);
  }
  for (let i = 0; i < order.length; i++) {
    const node = order[i]!;
    for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
      const number = graph.around[k]!;
      if (closed[number] === 0) continue;
      const edge = graph.edges[number]!;
      const next = edge.a === node ? edge.b : edge.a;
      if (via[next] !== NOT) continue;
      via[next] = number;
      order.push(next);
    }
  }
  return { via, order };
}

export const reaches = (walk: Reach, node: number | undefined): boolean => node !== undefined && walk.via[node] !== NOT;

/** Edges from the start of the walk to `node`, in that order; empty at a start. `node` must have been reached. */
export function pathTo(graph: Graph, walk: Reach, node: number): number[] {
  const path: number[] = [];
  for (let at = node; walk.via[at]! >= 0;) {
    const number = walk.via[at]!;
    path.push(number);
    const edge = graph.edges[number]!;
    at = edge.a === at ? edge.b : edge.a;
  }
  return path.reverse();
}

/** Groups of nodes joined by closed edges: `groupOf[node]` is the lowest node of its group. */
export function groups(graph: Graph, closed: Uint8Array): Int32Array {
  const group = new Int32Array(graph.size).fill(-1);
  const stack: number[] = [];
  for (let first = 0; first < graph.size; first++) {
    if (group[first] !== -1) continue;
    group[first] = first;
    stack.push(first);
    while (stack.length > 0) {
      const node = stack.pop()!;
      for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
        const number = graph.around[k]!;
        if (closed[number] === 0) continue;
        const edge = graph.edges[number]!;
        const next = edge.a === node ? edge.b : edge.a;
        if (group[next] !== -1) continue;
        group[next] = first;
        stack.push(next);
      }
    }
  }
  return group;
}

/** All edges closed but those that `isOpen` names. */
export function closedEdges(graph: Graph, isOpen: (edge: Graph['edges'][number]) => boolean): Uint8Array {
  const closed = new Uint8Array(graph.edges.length).fill(1);
  graph.edges.forEach((edge, number) => isOpen(edge) && (closed[number] = 0));
  return closed;
}
