import type { Graph } from '../terminals/graph';
import { natureOfNode, natureOfRole, type Nature } from './natures';

/** A wire that joins two conductors which must stay apart. */
export interface CrossedJoint {
  edge: number;
  between: readonly [Nature, Nature];
}

/**
 * Finds the wires that join line, neutral and earth to one another. The home is put together again from nothing, the
 * wires that fit their terminals and their role first: a wire that then closes two different conductors is the odd one.
 * @param closed contacts that are closed; wires not in it are left out
 * @param anchors nodes known to be line, neutral or earth
 */
export function findCrossedJoints(
  graph: Graph,
  closed: Uint8Array,
  anchors: ReadonlyMap<number, Nature>,
): CrossedJoint[] {
  const parent = Int32Array.from({ length: graph.size }, (_, node) => node);
  const label = new Array<Nature | undefined>(graph.size);
  for (const [node, nature] of anchors) label[node] = nature;
  const find = (node: number): number => {
    let at = node;
    while (parent[at] !== at) {
      parent[at] = parent[parent[at]!]!;
      at = parent[at]!;
    }
    return at;
  };
  const join = (a: number, b: number) => {
    const x = find(a);
    const y = find(b);
    if (x === y) return;
    parent[y] = x;
    label[x] ??= label[y];
  };

  const stages: number[][] = [[], [], [], [], []];
  graph.edges.forEach((edge, number) => {
    if (closed[number] === 0) return;
    if (!edge.wire) return join(edge.a, edge.b);
    const known = [natureOfRole(edge.wire.role), natureOfNode(graph, edge.a), natureOfNode(graph, edge.b)].filter(
      (nature) => nature !== undefined,
    );
    const disagree = new Set(known).size - 1;
    const unknown = 3 - known.length;
    stages[disagree === 0 ? unknown : 2 + disagree]!.push(number);
  });

  const crossed: CrossedJoint[] = [];
  let postponed: number[] = [];
  for (const stage of stages) {
    const later: number[] = [];
    for (const number of [...stage, ...postponed]) {
      const { a, b, wire } = graph.edges[number]!;
      const role = natureOfRole(wire!.role);
      const fits = [label[find(a)], label[find(b)]].every((nature) => nature === undefined || nature === role);
      if (fits) join(a, b);
      else later.push(number);
    }
    postponed = later;
  }
  for (const number of postponed) {
    const { a, b } = graph.edges[number]!;
    const x = label[find(a)];
    const y = label[find(b)];
    if (x !== undefined && y !== undefined && x !== y) crossed.push({ edge: number, between: [x, y] });
    else join(a, b);
  }
  return crossed;
}
