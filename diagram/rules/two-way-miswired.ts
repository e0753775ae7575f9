import { MOST_COMBINED_SWITCHES } from '../circuit/positions';
import { COMMON_PRACTICE } from './clauses';
import { bypassedContacts } from './readings/bypassed';
import { crossings } from './readings/crossings';
import { usualTwoWay } from './readings/rewire-two-way';
import { truthTables } from './readings/switch-sets';
import { capital, sayParts } from './readings/words';
import type { Rule } from './types';

/** A set of two-way switches of which one cannot change the lamp in some position of the others. */
export const twoWayMiswired: Rule = {
  meta: {
    id: 'two-way-miswired',
    severity: 'defect',
    group: 'polarity',
    title: 'Two-way switches that do not work from everywhere',
    clauses: [COMMON_PRACTICE],
    lesson:
      'Either switch must change the lamp, whatever the other says. If a strapper sits on the common terminal, the stair is lit ' +
      'only for those who remember how they left the other switch.',
    remedy:
      'Line to the common of the first, strappers from 1 to 1 and 2 to 2, the lamp to the common of the last; cross switches between.',
  },
  *check(context) {
    // What bypasses a switch, or shorts in one of its positions, is the cause and says so.
    const told = new Set([
      ...bypassedContacts(context).map(({ part }) => part),
      ...crossings(context).flatMap(({ switches }) => switches),
    ]);
    const bySet = new Map<string, { switches: string[]; points: string[]; idle: Set<string>; condition: string }>();
    for (const { point, switches, idle, condition } of truthTables(context)) {
      if (idle.length === 0 || switches.some((id) => told.has(id))) continue;
      const key = switches.join(' ');
      const entry = bySet.get(key) ?? { switches, points: [], idle: new Set(), condition };
      entry.points.push(point);
      for (const id of idle) entry.idle.add(id);
      bySet.set(key, entry);
    }
    for (const { switches, points, idle } of bySet.values()) {
      const { graph } = context;
      const wires = [...graph.wires.values()].filter(
        ({ from, to }) => switches.includes(from[0]) && switches.includes(to[0]),
      );
      yield {
        heading: `${capital(sayParts(context, points))} cannot be changed from everywhere`,
        message: `In some position of the others, ${sayParts(context, idle)} ${idle.size === 1 ? 'does' : 'do'} not change ${sayParts(context, points)}.`,
        parts: [...switches],
        wires: wires.map(({ id }) => id),
        remedies: usualTwoWay(context, switches),
      };
    }
  },
  *lacks(context) {
    for (const { switches } of context.evaluation.positions.sets) {
      if (switches.length <= MOST_COMBINED_SWITCHES) continue;
      const names = sayParts(context, switches);
      yield {
        parts: switches,
        what: `all combinations of ${switches.length} switches: ${names} were each turned from two positions of the others`,
      };
    }
  },
};
