import type { PartOf } from '../document/schema';
import { reach, reaches } from '../terminals/reach';
import { seen, recalled } from './clauses';
import { earthGaps } from './readings/earth-gaps';
import { changePart } from './readings/remedies';
import type { Rule } from './types';
import { capital, say } from './readings/words';

/** A backup source whose neutral is joined to earth nowhere. */
export const noEarthReferenceOnBackup: Rule = {
  meta: {
    id: 'no-earth-reference-on-backup',
    severity: 'danger',
    group: 'shock',
    title: "On battery the source's neutral has no earth",
    clauses: [seen('IEC 60364-5-55', '551.4.3.2.1'), recalled('IEC 60364-4-41', '411.4.1')],
    lesson:
      'An rcd trips because fault current flows through earth back to the source. If the source is joined to earth nowhere, a first ' +
      'fault drives no current: the rcd sees nothing, the breaker sees nothing, and the fault stays until a second one, or a person, closes the circuit.',
    remedy:
      'Let the inverter join its neutral to earth on battery (bond), so that the joint is made exactly when the supply no longer makes it.',
  },
  *check(context) {
    const { graph, earth } = context;
    const unearthed = new Set(earthGaps(context).flatMap(({ parts }) => parts));
    const found = new Map<string, string[]>();
    for (const { condition, whole, crossed, points } of context.evaluated) {
      for (const { part, kind, neutral } of condition.sources) {
        const inverter = part as PartOf<'inverter'>;
        // A bond to a case that has no earth is the missing earth's finding, not another one.
        if (
          kind !== 'backup' ||
          (inverter.bond && (reaches(earth.reached, graph.node(part.id, 'out.E')) || unearthed.has(part.id)))
        )
          continue;
        const closed = whole.slice();
        for (const { edge, between } of crossed) if (!between.includes('L')) closed[edge] = 1;
        const walk = reach(graph, [neutral], closed);
        const earthed = walk.order.some(
          (node) =>
            reaches(earth.reached, node) || (graph.partOf[node]!.kind === 'supply' && graph.markOf[node] === 'N'),
        );
        const used = [...points.values()].some(({ source }) => source?.part.id === part.id);
        if (earthed || !used) continue;
        found.set(part.id, [...(found.get(part.id) ?? []), condition.name]);
      }
    }
    for (const [id, conditions] of found) {
      const off = conditions.every((name) => name.startsWith('main-off'));
      const because =
        off && context.mainSwitch
          ? ` ${capital(say(context, context.mainSwitch.id))} takes the supply's earthed neutral away with its line.`
          : '';
      yield {
        heading: off
          ? `With the main switch off ${say(context, id)} has no earth`
          : `On battery ${say(context, id)} has no earth`,
        message: `The neutral of ${say(context, id)} is joined to earth nowhere.${because} A first fault to a case then trips nothing, neither rcd nor breaker.`,
        parts: [id],
        conditions,
        remedies: [
          changePart(`Bond ${say(context, id)} on battery`, graph.parts.get(id) as PartOf<'inverter'>, { bond: true }),
        ],
      };
    }
  },
};
