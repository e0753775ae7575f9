import { exceeds, voltAmps } from './readings/amounts';
import { COMMON_PRACTICE } from './clauses';
import { largerInverter, wayToMains } from './readings/backup-remedies';
import { backupsOf } from './readings/figures';
import { lackOf } from './readings/lacking';
import type { Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** All that runs and the largest start among it, above what the inverter gives for a moment. */
export const backupSurge: Rule = {
  meta: {
    id: 'backup-surge',
    severity: 'advice',
    group: 'backup',
    title: 'A start may stop the inverter',
    clauses: [COMMON_PRACTICE],
    lesson:
      'A motor takes two to six times its running current for the moment it starts. If that, on top of what ' +
      'already runs, is more than the inverter gives for a second, everything goes dark whenever the pump comes ' +
      'on.',
    remedy: 'Keep motors with hard starts on the mains, or fit an inverter with a larger surge.',
  },
  *check(context) {
    for (const figures of backupsOf(context)) {
      const { inverter, load, known, conditions, drawn } = figures;
      const overloaded = inverter.va !== undefined && exceeds(load.va, inverter.va);
      // What is too much already while it runs is the finding of `backup-overload`.
      if (
        inverter.surge === undefined ||
        !known ||
        overloaded ||
        load.starts === null ||
        !exceeds(load.surgeVa, inverter.surge)
      )
        continue;
      yield {
        heading: `${capital(say(context, inverter.id))} may stop when ${sayParts(context, [load.starts])} starts`,
        message: `With the rest running, that start takes ${voltAmps(load.surgeVa)}; ${say(context, inverter.id)} gives ${voltAmps(inverter.surge)} for a moment.`,
        parts: [inverter.id, load.starts],
        conditions,
        get remedies() {
          return [
            ...largerInverter(context, figures, load),
            ...drawn.flatMap(({ part, way }) => (part.id === load.starts && way !== null ? wayToMains(context, way) : [])),
          ];
        },
      };
    }
  },
  *lacks(context) {
    for (const { inverter, load } of backupsOf(context))
      if (inverter.surge === undefined && load.starts !== null) yield lackOf(context, inverter, 'the surge VA');
  },
};
