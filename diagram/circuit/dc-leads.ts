import type { Part, PartOf } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { closedEdges, pathTo, reach, reaches } from '../terminals/reach';
import { batteryStrings } from './loads';

/** Batteries one after the other between the dc terminals of an inverter, with the conductors between them. */
export interface DcString {
  batteries: readonly PartOf<'battery'>[];
  /** edges from bat.+ through the string to bat.-, wires and contacts, in that order */
  edges: readonly number[];
  /** edges up to the first battery: the plus lead where nothing is reversed */
  plus: readonly number[];
}

/** Edges between two nodes over wires and devices; null where nothing joins them. */
function between(graph: Graph, from: number, to: number): number[] | null {
  const walk = reach(
    graph,
    [from],
    closedEdges(graph, ({ kind }) => kind !== 'wire' && kind !== 'device'),
  );
  return reaches(walk, to) ? pathTo(graph, walk, to) : null;
}

/** The strings of an inverter's bank with their leads, and batteries that stand in them the wrong way round. */
export function dcStrings(
  graph: Graph,
  inverter: PartOf<'inverter'>,
): { strings: DcString[]; reversed: PartOf<'battery'>[] } {
  const { batteries, reversed } = batteryStrings(graph, inverter);
  const turned = new Set(reversed);
  const strings = batteries.flatMap((list): DcString[] => {
    if (list.length === 0) return [];
    const edges: number[] = [];
    let plus: number[] = [];
    let at = graph.node(inverter.id, 'bat.+')!;
    for (const battery of list) {
      const [near, far] = turned.has(battery) ? ['-', '+'] : ['+', '-'];
      const path = between(graph, at, graph.node(battery.id, near!)!);
      if (!path) return [];
      if (edges.length === 0) plus = path;
      edges.push(...path);
      at = graph.node(battery.id, far!)!;
    }
    const last = between(graph, at, graph.node(inverter.id, 'bat.-')!);
    return last ? [{ batteries: list, edges: [...edges, ...last], plus }] : [];
  });
  return { strings, reversed };
}

/** Fuses and breakers: what opens a short circuit of the bank by itself. An isolator does not. */
export const opensShort = (part: Part): boolean => part.kind === 'fuse' || part.kind === 'mcb' || part.kind === 'rcbo';

/** Devices on some edges that open on overcurrent, in the order passed. */
export const fusesOn = (graph: Graph, edges: readonly number[]): Part[] =>
  edges.flatMap((number) => {
    const { kind, part } = graph.edges[number]!;
    const device = kind === 'device' ? graph.parts.get(part!)! : undefined;
    return device && opensShort(device) ? [device] : [];
  });
