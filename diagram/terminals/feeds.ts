import type { Installation } from '../document/schema';
import { buildGraph, type Graph } from './graph';
import { closedEdges, reach, reaches, type Reach } from './reach';

/** Which supply feeds a conductor or part: mains is one stroke, backup is cased (an outline with a light core). */
export type Feed = 'mains' | 'backup' | 'none';

/** Which supply stands behind each part and wire, as the sheet shows it: mains, an inverter's output, or none. */
export interface Feeds {
  parts: Map<string, Feed>;
  wires: Map<string, Feed>;
}

/** True at terminals that belong to the earth, which has no source. */
const isEarthMark = (mark: string): boolean => mark === 'E' || mark.endsWith('.E');

interface Sides {
  backup: Reach;
  mains: Reach;
  /** steps from the nearest source, to part what both reach */
  backupRank: Int32Array;
  mainsRank: Int32Array;
}

function ranks(graph: Graph, walk: Reach): Int32Array {
  const rank = new Int32Array(graph.size).fill(-1);
  for (const node of walk.order) {
    const number = walk.via[node]!;
    if (number < 0) rank[node] = 0;
    else {
      const edge = graph.edges[number]!;
      rank[node] = rank[edge.a === node ? edge.b : edge.a]! + 1;
    }
  }
  return rank;
}

function walkSides(graph: Graph): Sides {
  const mainsStarts: number[] = [];
  const backupStarts: number[] = [];
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    if (part.kind === 'supply' && (mark === 'L' || mark === 'N')) mainsStarts.push(node);
    if (part.kind === 'inverter' && (mark === 'out.L' || mark === 'out.N' || mark.startsWith('bat')))
      backupStarts.push(node);
  });
  const inside = new Set(['bypass', 'through', 'ground', 'bond']);
  const earth = (edge: Graph['edges'][number]) => edge.wire?.role === 'earth';
  const apart = closedEdges(graph, (edge) => inside.has(edge.kind) || edge.kind === 'changeover' || earth(edge));
  const joined = closedEdges(graph, (edge) => inside.has(edge.kind) || earth(edge));
  const mains = reach(graph, mainsStarts, apart);
  const backup = reach(graph, backupStarts, apart);
  // What lies behind a changeover is shown as backed up when either of its sides is.
  const behind = (walk: Reach, taken: Reach) => {
    const starts: number[] = [];
    graph.edges.forEach((edge) => {
      if (edge.kind === 'changeover' && reaches(walk, edge.a) && !reaches(taken, edge.b)) starts.push(edge.b);
    });
    return starts;
  };
  const backupAll = reach(graph, [...backupStarts, ...behind(backup, mains)], apart);
  const mainsAll = reach(graph, mainsStarts, joined);
  return { backup: backupAll, mains: mainsAll, backupRank: ranks(graph, backupAll), mainsRank: ranks(graph, mainsAll) };
}

/** Says for every part and wire which supply it hangs on. Where a drawing joins both, the nearer one is shown. */
export function traceFeeds(doc: Installation, graph: Graph = buildGraph(doc)): Feeds {
  const sides = walkSides(graph);
  const feedOf = (node: number): Feed => {
    const backup = sides.backupRank[node]!;
    const mains = sides.mainsRank[node]!;
    if (backup >= 0 && (mains < 0 || backup <= mains)) return 'backup';
    return mains >= 0 ? 'mains' : 'none';
  };
  const parts = new Map<string, Feed>();
  graph.partOf.forEach((part, node) => {
    const before = parts.get(part.id) ?? 'none';
    if (part.kind === 'inverter' || part.kind === 'battery') parts.set(part.id, 'backup');
    else if (before !== 'backup') {
      const here = isEarthMark(graph.markOf[node]!) ? 'none' : feedOf(node);
      parts.set(part.id, here === 'none' ? before : here);
    }
  });
  const wires = new Map<string, Feed>();
  for (const wire of graph.document.wires) {
    const number = graph.edgeOfWire.get(wire.id);
    if (number === undefined || wire.role === 'earth') wires.set(wire.id, 'none');
    else wires.set(wire.id, feedOf(graph.edges[number]!.a));
  }
  return { parts, wires };
}
