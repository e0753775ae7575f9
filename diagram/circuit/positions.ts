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
  /** pairs of positions in which one switch of a set stands both ways while its fellows stay */
  flips(set: SwitchSet, at: number): [number, number][];
  /** by node, what is joined with all two-way and cross contacts open */
  group: Int32Array;
  /** true for line, neutral and earth before any of these switches: sets do not meet through them */
  isRail(node: number): boolean;
}

/**
 * The most switches of one set that are looked at in all combinations, 2^6. Of a larger set each switch is turned by
 * itself,
 * once with all others one way and once with all the other way.
 */
export const MOST_COMBINED_SWITCHES = 6;

const combines = ({ switches }: SwitchSet): boolean => switches.length <= MOST_COMBINED_SWITCHES;
const positionsOf = (set: SwitchSet): number =>
  combines(set) ? 2 ** set.switches.length : 2 * (set.switches.length + 1);

/**
 * True when a switch of a set stands the second way in a position: a bit of its number, or the one turned by itself.
 */
function isTurned(set: SwitchSet, at: number, position: number): boolean {
  const here = position % positionsOf(set);
  if (combines(set)) return ((here >> at) & 1) === 1;
  const half = set.switches.length + 1;
  return here >= half !== (here % half === at + 1);
}

function flips(set: SwitchSet, at: number): [number, number][] {
  const half = set.switches.length + 1;
  if (!combines(set))
    return [
      [0, at + 1],
      [half, half + at + 1],
    ];
  return Array.from({ length: positionsOf(set) }, (_, position): [number, number] => [position, position ^ (1 << at)]);
}

const FIRST = new Set(['1', 'straight']);

/**
 * Groups two-way and cross switches by the strappers that join them. Sets do not meet but at line and neutral, so
 * one numbering serves all sets at once.
 */
export function switchPositions(graph: Graph): Positions {
  const selects = [...graph.parts.values()].filter(({ kind }) => kind === 'switch-2way' || kind === 'switch-cross');
  if (selects.length === 0)
    return { sets: [], count: 1, isClosed: () => true, flips, group: new Int32Array(), isRail: () => true };
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
  const placeOf = new Map(sets.flatMap((set) => set.switches.map((id, at) => [id, { set, at }] as const)));
  return {
    sets,
    count: Math.max(...sets.map(positionsOf)),
    isClosed(edge, position) {
      const { set, at } = placeOf.get(edge.part!)!;
      return FIRST.has(edge.position!) !== isTurned(set, at, position);
    },
    flips,
    group,
    isRail: (node) => reaches(fixed, node),
  };
}
