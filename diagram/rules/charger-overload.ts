import { CHARGE_LIMIT } from '../calculations/battery-bank';
import { amps, exceeds } from './readings/amounts';
import { COMMON_PRACTICE } from './clauses';
import { backupsOf } from './readings/figures';
import { lackOf, lackOfBattery } from './readings/lacking';
import { changePart } from './readings/remedies';
import type { Rule } from './types';
import { capital, say } from './readings/words';

/** A per Ah that the remedy sets: what makers of lead batteries advise; within the limits of every chemistry. Common practice, no source. */
const USUAL = 0.1;

/** The charge current outside what the bank takes. A charger set to none is no charger. */
export const chargerOverload: Rule = {
  meta: {
    id: 'charger-overload',
    severity: 'defect',
    group: 'backup',
    title: 'The charger does not fit the bank',
    clauses: [COMMON_PRACTICE],
    lesson:
      'Charged too hard a battery boils dry, bulges, or burns; charged too softly it is never full, its plates ' +
      'turn hard, and the second outage of the evening finds it empty.',
    remedy: "Set the charge current to about a tenth of the bank's Ah, or as its maker says.",
  },
  *check(context) {
    for (const { inverter, bank } of backupsOf(context)) {
      const { charge } = inverter;
      if (!bank || charge === undefined || charge === 0) continue;
      const { most, least } = CHARGE_LIMIT[bank.chemistry];
      const hard = exceeds(charge, most * bank.ah);
      if (!hard && !exceeds(least * bank.ah, charge)) continue;
      const usual = Math.round(USUAL * bank.ah);
      yield {
        heading: `${capital(say(context, inverter.id))} charges its bank too ${hard ? 'hard' : 'softly'}`,
        message:
          `${amps(charge)} into a bank of ${bank.ah} Ah: ${amps(least * bank.ah)} to ${amps(most * bank.ah)} is what a ` +
          `${bank.chemistry === 'lfp' ? 'lithium' : bank.chemistry === 'vrla' ? 'sealed lead' : 'flooded lead'} bank takes, unless its maker says otherwise.`,
        parts: [inverter.id],
        conditions: context.evaluated
          .filter(({ condition }) => condition.base === 'mains')
          .map(({ condition }) => condition.name),
        remedies: usual > 0 ? [changePart(`Set the charger to ${usual} A`, inverter, { charge: usual })] : [],
      };
    }
  },
  *lacks(context) {
    for (const { inverter, bank } of backupsOf(context)) {
      if (inverter.charge === undefined) yield lackOf(context, inverter, 'the charge current');
      if (bank === null) yield* lackOfBattery(context, inverter);
    }
  },
};
