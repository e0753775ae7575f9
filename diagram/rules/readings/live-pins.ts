import type { Evaluated } from '../../circuit/evaluate';
import type { Part, PartOf } from '../../document/schema';
import { groups, reach, reaches } from '../../terminals/reach';
import { isPoint } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

export interface LivePin {
  plug: string;
  pins: string[];
  /** live only through a load, not directly */
  through: boolean;
  conditions: string[];
}

/**
 * Groups that stand at line voltage with the plug out: what a source's line reaches, and what a load ties to it while
 * nothing ties it to earth. A source whose neutral has lost the earth is itself lifted by a load between its line and earth.
 */
function liveGroups(
  context: Context,
  { condition }: Evaluated,
  closed: Uint8Array,
): { direct: Set<number>; all: Set<number>; group: Int32Array } {
  const { graph, earth } = context;
  const joined = closed.slice();
  graph.edges.forEach((edge, number) => {
    if (edge.kind === 'bond' && condition.onBattery.has(edge.part!)) joined[number] = 1;
  });
  const group = groups(graph, joined);
  const earthed = new Set<number>();
  for (const part of graph.parts.values()) if (part.kind === 'supply') earthed.add(group[graph.node(part.id, 'N')!]!);
  for (const node of earth.reached.order) earthed.add(group[node]!);
  const direct = new Set(condition.sources.map(({ line }) => group[line]!));
  for (const one of earthed) direct.delete(one);
  const all = new Set(direct);
  const neutrals = new Set(condition.sources.map(({ neutral }) => group[neutral]!));
  const floating = condition.sources.filter(({ neutral }) => !earthed.has(group[neutral]!));
  const loads = [...graph.parts.values()]
    .filter(isPoint)
    .map(({ id }) => [group[graph.node(id, 'L')!]!, group[graph.node(id, 'N')!]!] as const);
  for (const [l, n] of loads) {
    for (const { line, neutral } of floating) {
      const [from, to] = group[line] === l ? [l, n] : [n, l];
      if (from === group[line] && earthed.has(to)) all.add(group[neutral]!);
    }
  }
  for (let before = -1; before !== all.size;) {
    before = all.size;
    for (const [l, n] of loads) {
      for (const [from, to] of [
        [l, n],
        [n, l],
      ] as const)
        if (all.has(from) && !earthed.has(to) && !neutrals.has(to)) all.add(to);
    }
  }
  return { direct, all, group };
}

/** Plugs with pins that are live in some condition, hanging or pulled. */
export const livePins = once((context: Context): LivePin[] => {
  const { graph } = context;
  const plugs = context.parts('plug').filter((part: Part): part is PartOf<'plug'> => part.kind === 'plug');
  const found: LivePin[] = [];
  for (const plug of plugs) {
    const entry: LivePin = { plug: plug.id, pins: [], through: true, conditions: [] };
    for (const evaluated of context.evaluated) {
      const closed = evaluated.whole.slice();
      for (const number of graph.contactsOf.get(plug.id) ?? []) closed[number] = 0;
      // A loop joint is closed again by nothing else: pins are judged with all other joints as drawn.
      const { direct, all, group } = liveGroups(context, evaluated, closed);
      for (const pin of ['L', 'N']) {
        const node = graph.node(plug.id, pin)!;
        const here = group[node]!;
        if (!all.has(here)) continue;
        const straight =
          direct.has(here) &&
          evaluated.condition.sources.some(({ line }) => reaches(reach(graph, [line], closed), node));
        if (straight) entry.through = false;
        if (!entry.pins.includes(pin)) entry.pins.push(pin);
        if (!entry.conditions.includes(evaluated.condition.name)) entry.conditions.push(evaluated.condition.name);
      }
    }
    if (entry.pins.length > 0) found.push(entry);
  }
  return found;
});
