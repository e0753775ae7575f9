import type { Bank } from '../calculations/battery-bank';
import { ASSUMED } from '../calculations/battery-bank';
import { autonomyHours } from '../calculations/autonomy';
import { ASSUMED_EFFICIENCY } from '../circuit/loads';
import { designation } from '../layout/wording';
import type { Context } from '../rules/context';
import { backupsOf } from '../rules/readings/figures';

/** One load that stays on in an outage. */
export interface KeptLoad {
  id: string;
  /** "Study fan" or "E14 in Study" */
  name: string;
  room: string;
  watts: number;
  va: number;
}

/** What the curve of a backup source is drawn from. */
export interface BackupPlot {
  inverter: string;
  name: string;
  bank: Bank;
  efficiency: number;
  /** VA that it gives; null where not known */
  va: number | null;
  hoursWanted: number | null;
  loads: readonly KeptLoad[];
  /** "12 V 150 Ah at C20. Taken: 50 % discharge ..." */
  assumed: string;
}

const percent = (share: number): string => `${Math.round(share * 100)} %`;

/** The backup sources whose battery is known. */
export function backupPlots(context: Context): BackupPlot[] {
  return backupsOf(context).flatMap(({ inverter, bank, drawn }): BackupPlot[] => {
    if (!bank) return [];
    const efficiency = inverter.efficiency ?? ASSUMED_EFFICIENCY;
    const taken = ASSUMED[bank.chemistry];
    return [
      {
        inverter: inverter.id,
        name: designation(inverter),
        bank,
        efficiency,
        va: inverter.va ?? null,
        hoursWanted: inverter.hoursWanted ?? null,
        loads: drawn.map(({ part, watts, amps }) => ({
          id: part.id,
          name: [part.ref, part.label].filter(Boolean).join(' ') || context.name(part),
          room: context.graph.places.get(part.place ?? '')?.name ?? '',
          watts,
          va: amps * context.document.supply.voltage,
        })),
        assumed:
          `${bank.volts} V ${bank.ah} Ah at C${bank.hours}, ${bank.chemistry}. Taken: ${percent(taken.dischargeDepth)} discharge, ` +
          `${percent(taken.ageing)} left by age, exponent ${taken.peukert}, ${percent(efficiency)} efficiency.`,
      },
    ];
  });
}

/** h with some of the loads off; Infinity with all of them. */
export function hoursWithout(plot: BackupPlot, off: ReadonlySet<string>): { watts: number; va: number; hours: number } {
  const on = plot.loads.filter(({ id }) => !off.has(id));
  const watts = on.reduce((sum, load) => sum + load.watts, 0);
  return {
    watts,
    va: on.reduce((sum, load) => sum + load.va, 0),
    hours: autonomyHours({ bank: plot.bank, efficiency: plot.efficiency, watts }),
  };
}
