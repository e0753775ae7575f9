import type { Graph } from '../terminals/graph';
import { COMMON_PRACTICE } from './clauses';
import type { Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** Ids of the regulators that a line passes. */
function regulatorsOn(graph: Graph, edges: readonly number[]): string[] {
  return edges.flatMap((number) => {
    const { kind, part } = graph.edges[number]!;
    return kind === 'switch' && graph.parts.get(part!)?.kind === 'regulator' ? [part!] : [];
  });
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
      'A regulator chops or starves the voltage for a small motor and is built for one. Behind it an outlet may be asked for ten ' +
      'times what it carries, and a motor or a driver on chopped voltage overheats: either burns.',
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
      };
    }
  },
};
