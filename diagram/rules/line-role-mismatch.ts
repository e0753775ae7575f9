import { natureOfRole, type Nature } from '../circuit/natures';
import { isControl, isPoint } from '../terminals/roles-of-parts';
import type { Part, Role } from '../document/schema';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import { branches } from './readings/branches';
import { crossings } from './readings/crossings';
import { earthGaps } from './readings/earth-gaps';
import { misledStretches } from './readings/misled';
import { neutralContacts } from './readings/neutral-contacts';
import { openRegions } from './readings/open-regions';
import { potentials } from './readings/potentials';
import { reversals, reversedNodes } from './readings/reversals';
import type { Rule } from './types';
import { sayParts, sayWire } from './readings/words';

const WORD: Record<Nature, string> = { L: 'line', N: 'neutral', E: 'earth', D: 'battery lead' };

const ROLE: Record<Nature, Role> = { L: 'line', N: 'neutral', E: 'earth', D: 'dc+' };

/** What a wire turns out to be; undefined where it is dead, or more than one thing as switches move. */
function natureOf(context: Context, node: number): Nature | undefined {
  const { line, neutral, earth } = potentials(context);
  const natures = (
    [
      ['L', line],
      ['N', neutral],
      ['E', earth],
    ] as const
  ).filter(([, at]) => at[node] === 1);
  return natures.length === 1 ? natures[0]![0] : undefined;
}

function addWire({ graph }: Context, edge: number, into: Set<string>): void {
  const { wire } = graph.edges[edge]!;
  if (wire) into.add(wire.id);
}

function wiresAt({ graph }: Context, node: number): string[] {
  const ids: string[] = [];
  for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
    const { wire } = graph.edges[graph.around[k]!]!;
    if (wire) ids.push(wire.id);
  }
  return ids;
}

/** Wires and parts that a rule of polarity speaks of already. */
function told(context: Context): {
  wires: Set<string>;
  parts: Set<string>;
  /** line and earth change places on the same way: the live cases say it */
  isByLiveCase(part: Part): boolean;
} {
  const wires = new Set<string>();
  const parts = new Set<string>();
  for (const each of [...reversals(context), ...neutralContacts(context).switched, ...neutralContacts(context).fused])
    for (const id of each.wires) wires.add(id);
  for (const { wire, switches } of crossings(context)) {
    wires.add(wire);
    for (const id of switches) parts.add(id);
  }
  for (const { wires: ids, on, parts: at } of earthGaps(context)) {
    for (const id of ids) wires.add(id);
    if (on !== 'nothing') for (const id of at) parts.add(id);
  }
  for (const { points } of reversals(context)) for (const id of points) parts.add(id);
  for (const stretch of misledStretches(context)) for (const id of stretch.wires) wires.add(id);
  for (const { on, nodes } of openRegions(context))
    if (on) for (const node of nodes) for (const id of wiresAt(context, node)) wires.add(id);
  // Line that arrives at the neutral of a point which has no way back is told with the open neutral.
  for (const { points } of context.evaluated)
    for (const { part, fed, source, lineEnd, lineEdges } of points.values())
      if (source && !fed && lineEnd === context.graph.node(part.id, 'N'))
        for (const number of lineEdges) addWire(context, number, wires);
  const cases = earthGaps(context).flatMap((gap) => (gap.on === 'line' ? gap.parts : []));
  const ways = new Set(cases.map((id) => branches(context).get(id)));
  return { wires, parts, isByLiveCase: ({ id }) => cases.length > 0 && ways.has(branches(context).get(id)) };
}

/** A wire drawn as one conductor that the graph shows is another. */
export const lineRoleMismatch: Rule = {
  meta: {
    id: 'line-role-mismatch',
    severity: 'defect',
    group: 'polarity',
    title: 'A wire is not what it is drawn as',
    clauses: [COMMON_PRACTICE],
    lesson:
      'The colour follows the role. A core drawn as neutral that carries line gets the neutral colour, and the next person takes it for harmless.',
    remedy: 'Draw the wire as what it is, or lead it to where it belongs.',
  },
  *check(context) {
    const { graph } = context;
    const known = told(context);
    const group = new Map<string, { wires: string[]; drawn: Nature; is: Nature; parts: Set<string> }>();
    const reversed = reversedNodes(context);
    graph.edges.forEach(({ wire, a, b }) => {
      if (!wire || known.wires.has(wire.id) || reversed.has(a) || reversed.has(b)) return;
      const drawn = natureOfRole(wire.role);
      const is = natureOf(context, a);
      if (is === undefined || is === drawn || drawn === 'D') return;
      if ([a, b].some((node) => known.parts.has(graph.partOf[node]!.id))) return;
      const ends = [a, b].map((node) => graph.partOf[node]!);
      if (drawn !== 'N' && is !== 'N' && ends.some((part) => known.isByLiveCase(part))) return;
      // Wires one after the other that are drawn wrong the same way are one mistake of the pen.
      const place = ends.find((part) => !isPoint(part) && !isControl(part)) ?? ends[0]!;
      const key = `${drawn} ${is} ${place.id}`;
      const entry = group.get(key) ?? { wires: [], drawn, is, parts: new Set() };
      entry.wires.push(wire.id);
      for (const part of ends) entry.parts.add(part.id);
      group.set(key, entry);
    });
    for (const { wires, drawn, is, parts } of group.values()) {
      const one = wires.length === 1;
      yield {
        heading: `Drawn as ${WORD[drawn]}, is ${WORD[is]}`,
        message: one
          ? `The wire ${sayWire(context, wires[0]!)} is drawn as ${WORD[drawn]}; as joined it is ${WORD[is]}.`
          : `${wires.length} wires at ${sayParts(context, parts)} are drawn as ${WORD[drawn]}; as joined they are ${WORD[is]}.`,
        parts: [...parts],
        wires,
        remedies: [
          {
            label: `Draw ${one ? 'it' : 'them'} as ${WORD[is]}`,
            patch: { set: { wires: wires.map((id) => ({ ...graph.wires.get(id)!, role: ROLE[is] })) } },
          },
        ],
      };
    }
  },
};
