import { isBar } from '../document/kinds';
import type { Edge, Graph } from '../terminals/graph';
import { reach, reaches, type Reach } from '../terminals/reach';
import { natureOfNode, natureOfRole } from './natures';

/** A wire or plug pin that closes a loop of conductors which, without it, is a tree. */
export interface ParallelJoint {
  edge: number;
  /** edges of the rest of the loop, from the joint's first end to its second */
  loop: number[];
}

const isAccessory = (graph: Graph, node: number): boolean => {
  const { kind } = graph.partOf[node]!;
  return isBar(kind) || kind === 'socket';
};

/** True for a line from outlet to outlet that no neutral goes with: a row of outlets is led on with both. */
function isAlone(graph: Graph, { a, b }: Edge): boolean {
  if (graph.markOf[a] !== 'L' || graph.markOf[b] !== 'L') return false;
  const [from, to] = [a, b].map((node) => graph.node(graph.partOf[node]!.id, 'N'));
  if (from === undefined || to === undefined) return false;
  for (let k = graph.start[from]!; k < graph.start[from + 1]!; k++) {
    const edge = graph.edges[graph.around[k]!]!;
    if (edge.a === to || edge.b === to) return false;
  }
  return true;
}

/**
 * How far an edge looks like an afterthought: fitting wires at devices first, loose links between joints last, plugs
 * after all.
 */
function oddness(graph: Graph, edge: Edge): number {
  const { a, b, wire, kind } = edge;
  if (kind === 'plug') return 1000;
  if (!wire) return 0;
  const known = [natureOfRole(wire.role), natureOfNode(graph, a), natureOfNode(graph, b)].filter(
    (nature) => nature !== undefined,
  );
  const disagree = new Set(known).size - 1;
  const between = isAccessory(graph, a) && isAccessory(graph, b) ? 1 : 0;
  const unknown = 3 - known.length;
  return 100 * disagree + 20 * between + (isAlone(graph, edge) ? 10 : 0) + 4 * unknown + (wire.cable ? 0 : 1);
}

/** The starts that no earlier one reaches, and all that they reach. */
function walkTrees(graph: Graph, closed: Uint8Array, starts: readonly number[]): { roots: number[]; walk: Reach } {
  const roots: number[] = [];
  let walk = reach(graph, roots, closed);
  for (const start of starts) {
    if (reaches(walk, start)) continue;
    roots.push(start);
    walk = reach(graph, roots, closed);
  }
  return { roots, walk };
}

/** The way between two nodes over a set of edges, as edge numbers; undefined where there is none. */
function wayBetween(graph: Graph, from: number, to: number, closed: Uint8Array): number[] | undefined {
  const walk = reach(graph, [from], closed);
  if (!reaches(walk, to)) return undefined;
  const path: number[] = [];
  for (let at = to; walk.via[at]! >= 0;) {
    const number = walk.via[at]!;
    path.push(number);
    const edge = graph.edges[number]!;
    at = edge.a === at ? edge.b : edge.a;
  }
  return path.reverse();
}

/**
 * Finds what closes loops among the conductors that some nodes reach. The tree is put together with contacts first and
 * wires in the order of how well they fit; an edge whose two ends are joined already closes a loop.
 */
export function findParallelJoints(graph: Graph, closed: Uint8Array, starts: readonly number[]): ParallelJoint[] {
  const { roots, walk } = walkTrees(graph, closed, starts);
  const inside: number[] = [];
  graph.edges.forEach((edge, number) => {
    if (closed[number] !== 0 && edge.a !== edge.b && reaches(walk, edge.a)) inside.push(number);
  });
  // A tree has one edge less than nodes: no more edges, no loop.
  if (inside.length <= walk.order.length - roots.length) return [];

  const parent = Int32Array.from({ length: graph.size }, (_, node) => node);
  const find = (node: number): number => {
    let at = node;
    while (parent[at] !== at) {
      parent[at] = parent[parent[at]!]!;
      at = parent[at]!;
    }
    return at;
  };
  const odd = new Map(inside.map((number) => [number, oddness(graph, graph.edges[number]!)]));
  inside.sort((x, y) => odd.get(x)! - odd.get(y)! || x - y);
  const tree = new Uint8Array(graph.edges.length);
  const closing: number[] = [];
  for (const number of inside) {
    const a = find(graph.edges[number]!.a);
    const b = find(graph.edges[number]!.b);
    if (a === b) closing.push(number);
    else {
      parent[b] = a;
      tree[number] = 1;
    }
  }
  return closing.map((edge) => ({
    edge,
    loop: wayBetween(graph, graph.edges[edge]!.a, graph.edges[edge]!.b, tree) ?? [],
  }));
}

/**
 * True when a loop of line conductors passes a device or a source: it is no ring of one way, but two feeds that meet.
 */
export const meetsDevice = (graph: Graph, { loop }: ParallelJoint): boolean =>
  loop.some((number) => {
    const { kind } = graph.edges[number]!;
    return kind === 'device' || kind === 'bypass' || kind === 'changeover';
  });

/** True when a wire closes a loop that passes a protective device or an inverter, not changeovers alone. */
export const joinsFeeds = (graph: Graph, { edge, loop }: ParallelJoint): boolean =>
  graph.edges[edge]!.wire !== undefined &&
  loop.some((number) => graph.edges[number]!.kind === 'device' || graph.edges[number]!.kind === 'bypass');
