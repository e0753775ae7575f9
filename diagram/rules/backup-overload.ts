import { exceeds, voltAmps, watts } from './readings/amounts';
import { COMMON_PRACTICE, recalled } from './clauses';
import { largerInverter, waysToMains } from './readings/backup-remedies';
import { backupsOf } from './readings/figures';
import { lackOf, lackOfWatts } from './readings/lacking';
import type { Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** What runs in an outage, added up, above what the inverter gives. */
export const backupOverload: Rule = {
  meta: {
    id: 'backup-overload',
    severity: 'defect',
    group: 'backup',
    title: 'More stays on than the inverter gives',
    clauses: [recalled('IEC 60364-5-55', '551.2'), COMMON_PRACTICE],
    lesson:
      'An inverter asked for more than its rating shuts down after some seconds and takes every lamp with it, in ' +
      'the very hour it was bought for. Its VA count, not the watts alone: a fan takes more current than its ' +
      'watts say.',
    remedy: 'Move loads back to the mains, or fit a larger inverter with its fuse and leads.',
  },
  *check(context) {
    for (const figures of backupsOf(context)) {
      const { inverter, load, drawn, known, conditions } = figures;
      if (inverter.va === undefined || !known || !exceeds(load.va, inverter.va)) continue;
      const largest = [...drawn].sort((a, b) => b.amps - a.amps)[0]!;
      yield {
        heading: `${capital(say(context, inverter.id))} is asked for ${voltAmps(load.va)} and gives ${voltAmps(inverter.va)}`,
        message:
          `In an outage ${watts(load.watts)} (${voltAmps(load.va)}) run on ${say(context, inverter.id)} of ${voltAmps(inverter.va)}. ` +
          `The most of it is ${sayParts(context, [largest.part.id])}.`,
        parts: [inverter.id],
        conditions,
        get remedies() {
          return [...largerInverter(context, figures, load), ...waysToMains(context, figures)];
        },
      };
    }
  },
  *lacks(context) {
    for (const figures of backupsOf(context)) {
      if (figures.inverter.va === undefined) yield lackOf(context, figures.inverter, 'the VA');
      yield* lackOfWatts(context, figures);
    }
  },
};
