import { recalled } from './clauses';
import { barePoints } from './readings/rcd-duty';
import { rcboInPlace } from './readings/rcbo-remedy';
import type { Rule } from './types';
import { capital, inOrder, say, sayParts } from './readings/words';

/** Loads that need an rcd and have none between the backup source and themselves. */
export const rcdIdleOnBackup: Rule = {
  meta: {
    id: 'rcd-idle-on-backup',
    severity: 'defect',
    group: 'shock',
    title: 'On battery no rcd lies before the load',
    clauses: [recalled('IEC 60364-5-55', '551.4.1'), recalled('IEC 60364-4-41', '411.3.3')],
    lesson:
      'The rcd of the board stands before the inverter. On mains it guards what the inverter feeds; on battery the current never passes it. ' +
      'The outlet that was safe before the outage is not safe during it.',
    remedy: "Fit an rcd of 30 mA in the inverter's output, before its ways.",
  },
  *check(context) {
    const found = new Map<string, { points: Set<string>; ways: Set<string>; conditions: Set<string> }>();
    context.evaluated.forEach(({ condition }, i) => {
      for (const { state } of barePoints(context)[i]!) {
        if (state.source?.kind !== 'backup') continue;
        const entry = found.get(state.source.part.id) ?? { points: new Set(), ways: new Set(), conditions: new Set() };
        entry.points.add(state.part.id);
        if (state.overcurrent) entry.ways.add(state.overcurrent);
        entry.conditions.add(condition.name);
        found.set(state.source.part.id, entry);
      }
    });
    for (const [inverter, { points, ways, conditions }] of found) {
      const sockets = [...points].some((id) => context.graph.parts.get(id)!.kind === 'socket');
      yield {
        severity: sockets ? 'danger' : 'defect',
        heading: `${capital(sayParts(context, points))} without rcd on battery`,
        message: `On battery no rcd lies between ${say(context, inverter)} and ${sayParts(context, points)}. A fault or a touch that trips on mains trips nothing then.`,
        parts: [
          inverter,
          ...inOrder(context, ways).map(({ id }) => id),
          ...inOrder(context, points).map(({ id }) => id),
        ],
        conditions: [...conditions],
        get remedies() {
          return ways.size === 1 ? rcboInPlace(context, [...ways][0]!) : [];
        },
      };
    }
  },
};
