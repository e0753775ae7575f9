import type { Graph } from '../terminals/graph';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import type { Wire } from '../document/schema';
import type { Remedy, Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** Ids of the regulators that a line passes. */
function regulatorsOn(graph: Graph, edges: readonly number[]): string[] {
  return edges.flatMap((number) => {
    const { kind, part } = graph.edges[number]!;
    return kind === 'switch' && graph.parts.get(part!)?.kind === 'regulator' ? [part!] : [];
  });
}

/** Everything but fans taken from before the regulator: the wires that leave it towards them begin at its other terminal. */
function before({ graph, document }: Context, id: string): Remedy[] {
  const onward = document.wires.filter(({ from, to }) =>
    [from, to].some(([part, mark]) => part === id && mark === '2'),
  );
  const ends = onward.map((wire) => ({ wire, far: wire.from[0] === id ? wire.to : wire.from }));
  const foreign = ends.filter(({ far }) => graph.parts.get(far[0])?.kind !== 'fan');
  // A joint behind the regulator may lead to fans as well: what it feeds is for a person to sort out.
  if (
    foreign.length === 0 ||
    foreign.some(({ far }) => !['lamp', 'socket', 'appliance'].includes(graph.parts.get(far[0])?.kind ?? ''))
  )
    return [];
  const wires = foreign.map(({ wire, far }): Wire => ({ ...wire, from: [id, '1'], to: far }));
  return [{ label: 'Take it from before the regulator', patch: { set: { wires } } }];
}

/** A fan regulator before a socket, lamp or appliance. */
export const regulatorFeedsOther: Rule = {
  meta: {
    id: 'regulator-feeds-other',
    severity: 'danger',
    group: 'overload',
    title: 'A fan regulator feeds something that is no fan',
    clauses: [COMMON_PRACTICE],
    lesson:
      'A regulator chops or starves the voltage for a small motor and is built for one. Behind it an outlet may ' +
      'be asked for ten times what it carries, and a motor or a driver on chopped voltage overheats: either ' +
      'burns.',
    remedy: 'Take everything but the fan from before the regulator.',
  },
  *check(context) {
    const { graph } = context;
    const found = new Map<string, { points: Set<string>; conditions: Set<string> }>();
    for (const { condition, points } of context.evaluated)
      for (const { part, lineEdges } of points.values()) {
        if (part.kind === 'fan') continue;
        for (const id of regulatorsOn(graph, lineEdges)) {
          const entry = found.get(id) ?? { points: new Set(), conditions: new Set() };
          entry.points.add(part.id);
          entry.conditions.add(condition.name);
          found.set(id, entry);
        }
      }
    for (const [id, { points, conditions }] of found) {
      const names = sayParts(context, points);
      yield {
        heading: `${capital(say(context, id))} feeds ${sayParts(context, points, 3)}`,
        message: `The line of ${names} comes through ${say(context, id)}, which is made for a fan alone. Take it from before the regulator.`,
        parts: [id, ...points],
        conditions: [...conditions],
        remedies: before(context, id),
      };
    }
  },
};
