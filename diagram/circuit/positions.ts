import { byDesignation } from '../document/names';
import type { Edge, Graph } from '../terminals/graph';
import { closedEdges, groups, reach, reaches } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';

/** Two-way and cross switches that work the same points, and the bit of the position number that sets each. */
export interface SwitchSet {
  /** ids, by designation */
  switches: string[];
}

export interface Positions {
  sets: SwitchSet[];
  /** how many positions must be looked at so that every set has been in all of its own */
  count: number;
  /** true when the contact is closed in this position */
  isClosed(edge: Edge, position: number): boolean;
  /** by node, what is joined with all two-way and cross contacts open */
  group: Int32Array;
  /** true for line, neutral and earth before any of these switches: sets do not meet through them */
  isRail(node: number): boolean;
}

/** More switches in one set than this share bits: 2^6 positions is the most that is looked at. */
const MOST_BITS = 6;

const FIRST = new Set(['1', 'straight']);

/**
 * Groups two-way and cross switches by the strappers that join them. Sets do not meet but at line and neutral, so
 * one numbering serves all sets at once.
 */
export function switchPositions(graph: Graph): Positions {
  const selects = [...graph.parts.values()].filter(({ kind }) => kind === 'switch-2way' || kind === 'switch-cross');
  if (selects.length === 0)
    return { sets: [], count: 1, isClosed: () => true, group: new Int32Array(), isRail: () => true };
  const closed = closedEdges(graph, (edge) => edge.kind === 'select' || edge.kind === 'bond');
  const rails: number[] = [];
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    const source = part.kind === 'supply' || (part.kind === 'inverter' && !mark.startsWith('bat'));
    if (source || part.kind === 'earth-bar' || part.kind === 'electrode') rails.push(node);
  });
  const fixed = reach(graph, rails, closed);
  const group = groups(graph, closed);

  const leader = new Map<string, string>();
  const find = (id: string): string => {
    const up = leader.get(id);
    return up === undefined || up === id ? id : find(up);
  };
  const atGroup = new Map<number, string>();
  for (const { id } of selects) leader.set(id, id);
  for (const { id } of selects) {
    for (const number of graph.contactsOf.get(id)!) {
      const { a, b } = graph.edges[number]!;
      for (const node of [a, b]) {
        if (reaches(fixed, node)) continue;
        const other = atGroup.get(group[node]!);
        if (other === undefined) atGroup.set(group[node]!, id);
        else leader.set(find(id), find(other));
      }
    }
  }
  for (const part of graph.parts.values()) {
    if (!isPoint(part)) continue;
    const ends = ['L', 'N'].map((mark) => atGroup.get(group[graph.node(part.id, mark)!]!));
    if (ends[0] !== undefined && ends[1] !== undefined) leader.set(find(ends[0]), find(ends[1]));
  }

  const members = new Map<string, string[]>();
  for (const { id } of selects.sort(byDesignation)) members.set(find(id), [...(members.get(find(id)) ?? []), id]);
  const sets = [...members.values()].map((switches) => ({ switches }));
  const bitOf = new Map(sets.flatMap(({ switches }) => switches.map((id, i) => [id, i % MOST_BITS] as const)));
  const bits = Math.min(MOST_BITS, Math.max(...sets.map(({ switches }) => switches.length)));
  return {
    sets,
    count: 2 ** bits,
    isClosed: (edge, position) => FIRST.has(edge.position!) === (((position >> bitOf.get(edge.part!)!) & 1) === 0),
    group,
    isRail: (node) => reaches(fixed, node),
  };
}
