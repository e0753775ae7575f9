import { LEADS_MM2, LEAD_DROP_PERCENT } from '../calculations/battery-lead';
import { dcStrings } from '../circuit/dc-leads';
import type { PartOf } from '../document/schema';
import { amps, exceeds, mm2, percent } from './readings/amounts';
import { COMMON_PRACTICE, recalled } from './clauses';
import type { Context } from './context';
import { dcLeads, leadIz, type DcLead } from './readings/dc-leads';
import { backupsOf } from './readings/figures';
import { lackOf, lackOfCables } from './readings/lacking';
import { changeCables } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';

/** All thin leads in the least size with which the current, the fuse and the drop are met. */
function thicker(context: Context, thin: readonly DcLead[], dropPercent: number): Remedy[] {
  const csa = LEADS_MM2.find((size) =>
    thin.every(({ cable, currentA, fuseA }) => {
      const iz = leadIz(context, { ...cable, csa: size });
      const dropped = (dropPercent * cable.csa) / size;
      return size > cable.csa && iz !== null && iz >= Math.max(currentA, fuseA ?? 0) && dropped <= LEAD_DROP_PERCENT;
    }),
  );
  return csa === undefined
    ? []
    : [
        changeCables(
          `Fit leads of ${csa} mm2`,
          thin.map(({ cable }) => ({ ...cable, csa })),
        ),
      ];
}

function judge(context: Context, inverter: PartOf<'inverter'>, dcAmps: number, bankVolts: number) {
  const { leads, dropV } = dcLeads(context, dcStrings(context.graph, inverter).strings, dcAmps);
  const dropPercent = (100 * dropV) / bankVolts;
  const hot = leads.filter(({ cable, currentA, fuseA }) => {
    const iz = leadIz(context, cable);
    return iz !== null && exceeds(Math.max(currentA, fuseA ?? 0), iz);
  });
  return { leads, hot, dropPercent };
}

/** A dc lead that full load at an empty bank overheats, that its fuse does not protect, or in which over 2 % is lost. */
export const thinBatteryLead: Rule = {
  meta: {
    id: 'thin-battery-lead',
    severity: 'danger',
    group: 'backup',
    title: 'A battery lead is too thin',
    clauses: [recalled('IEC 60364-4-43', '433.1'), COMMON_PRACTICE],
    lesson:
      'Behind a 12 V battery every hundred watts are nine amperes, and more as it empties. A lead sized by eye ' +
      'is warm on the first day and soft on the hottest; and half a volt lost in it makes the inverter give up ' +
      'while the battery is half full.',
    remedy: 'Fit leads for the current at full output and cutoff, at least for the fuse, and short.',
  },
  *check(context) {
    for (const { inverter, dcAmps, bank } of backupsOf(context)) {
      if (dcAmps === null || !bank || inverter.efficiency === undefined) continue;
      const { leads, hot, dropPercent } = judge(context, inverter, dcAmps, bank.volts);
      const lossy = exceeds(dropPercent, LEAD_DROP_PERCENT);
      if (hot.length === 0 && !lossy) continue;
      const thin = hot.length > 0 && !lossy ? hot : leads;
      const worst = hot[0];
      yield {
        heading: `The leads of ${say(context, inverter.id)} are too thin`,
        message: worst
          ? `${capital(say(context, inverter.id))} draws ${amps(dcAmps)} at full output and cutoff${worst.fuseA !== null ? `, behind ${amps(worst.fuseA)}` : ''}; ` +
            `${mm2(worst.cable.csa)} carries ${amps(leadIz(context, worst.cable)!)} as it is laid.`
          : `At ${amps(dcAmps)} the leads lose ${percent(dropPercent)} of the bank's volts; ${LEAD_DROP_PERCENT} % is the most.`,
        parts: [inverter.id],
        wires: thin.flatMap(({ wires }) => [...wires]),
        remedies: thicker(context, thin, dropPercent),
      };
    }
  },
  *lacks(context) {
    for (const { inverter } of backupsOf(context)) {
      if (inverter.va === undefined) yield lackOf(context, inverter, 'the VA');
      if (inverter.efficiency === undefined) yield lackOf(context, inverter, 'the efficiency');
      if (inverter.cutoff === undefined) yield lackOf(context, inverter, 'the cutoff voltage');
      yield* lackOfCables(
        context,
        dcStrings(context.graph, inverter).strings.flatMap(({ edges }) => edges),
      );
    }
  },
};
