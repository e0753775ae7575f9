import { exceeds, hours, watts } from './readings/amounts';
import { COMMON_PRACTICE } from './clauses';
import { largerBank, waysToMains } from './readings/backup-remedies';
import { backupsOf } from './readings/figures';
import { lackOfBattery } from './readings/lacking';
import type { Rule } from './types';
import { capital, say } from './readings/words';

/** Fewer hours on battery than were asked for, by Peukert with depth of discharge and ageing. */
export const shortAutonomy: Rule = {
  meta: {
    id: 'short-autonomy',
    severity: 'advice',
    group: 'backup',
    title: 'The bank lasts less long than was asked for',
    clauses: [COMMON_PRACTICE],
    lesson:
      'The Ah on the label are those of a new battery, warm, taken in twenty hours and to the last drop. Taken ' +
      'faster, half empty at most and some years old, it gives perhaps a third of that; the hours are promised ' +
      'to people who will count them.',
    remedy: 'Fit a larger bank with a charger for it, or leave something off in an outage.',
  },
  *check(context) {
    for (const figures of backupsOf(context)) {
      const { inverter, hours: lasts, load, known, assumed, conditions } = figures;
      const wanted = inverter.hoursWanted;
      if (wanted === undefined || lasts === null || !known || !exceeds(wanted, lasts)) continue;
      yield {
        heading: `${capital(say(context, inverter.id))} lasts ${hours(lasts)}, ${hours(wanted)} are wanted`,
        message:
          `${watts(load.watts)} last ${hours(lasts)} on this bank with ${Math.round(100 * assumed.dischargeDepth)} % taken, ` +
          `${Math.round(100 * assumed.ageing)} % left with age and a Peukert exponent of ${assumed.peukert}.`,
        parts: [inverter.id],
        conditions,
        get remedies() {
          return [...largerBank(context, figures, wanted), ...waysToMains(context, figures)];
        },
      };
    }
  },
  *lacks(context) {
    for (const { inverter, bank } of backupsOf(context))
      if (inverter.hoursWanted !== undefined && bank === null) yield* lackOfBattery(context, inverter);
  },
};
