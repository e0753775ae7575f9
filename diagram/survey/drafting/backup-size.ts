import { autonomyHours, chargingWatts } from '../../calculations/autonomy';
import { backupLoad, currentAtCutoffA, type BackedLoad, type BackupLoad } from '../../calculations/backup-load';
import { bankOf, type Batteries } from '../../calculations/battery-bank';
import { batteryLead, type BatteryLead } from '../../calculations/battery-lead';
import type { SurveyRoom } from '../../document/schema';
import type { Practice } from '../../practices/types';
import { LENGTH, POWER_FACTOR, START } from './assumptions';

/** VA, inverters on sale; common practice, no source */
const INVERTERS_VA = [600, 850, 1000, 1500, 2000, 3000, 4000, 5000, 7500, 10_000] as const;
/** VA a start may take, as a multiple of the rated VA; common practice, no source */
const SURGE = 2;
/** share of the inverter that the draft loads; common practice, no source */
const LOADED = 0.8;
const EFFICIENCY = 0.85;
/** ms; common practice, no source */
const TRANSFER = 15;
/** V at which a bank of nominal 12 V counts as empty; common practice, no source */
const CUTOFF_PER_VOLT = 10.5 / 12;
const BANK_VOLTS = [12, 24, 48, 120, 240] as const;
/** Ah at C20 of blocks of 12 V and of cells of 2 V on sale; common practice, no source */
const BLOCK_AH = [42, 65, 100, 120, 150, 200] as const;
const CELL_AH = [300, 400, 500, 600, 800, 1000, 1200, 1500] as const;
const MOST_CELLS = 64;
/** A of charge per Ah of the bank: usual, and where that would ask too much of the mains; common practice, no source */
const CHARGE = { usual: 0.1, least: 0.06 } as const;

export interface BackupSize {
  load: BackupLoad;
  va: number;
  surge: number;
  efficiency: number;
  transfer: number;
  cutoff: number;
  /** A dc */
  charge: number;
  chargeWatts: number;
  batteries: Required<Pick<Batteries, 'volts' | 'ah' | 'count' | 'arrangement'>> & { chemistry: 'vrla'; hours: number };
  bankVolts: number;
  lead: BatteryLead;
  /** h that the load lasts; Infinity without a load */
  hours: number;
}

/** What stays on in an outage, by load. */
export function backedLoads(rooms: readonly SurveyRoom[]): BackedLoad[] {
  return rooms.flatMap((room) => [
    ...Array.from({ length: room.keepLamps }, (_, i) => ({
      name: `${room.name} lamp ${i + 1}`,
      watts: room.lampWatts,
      pf: POWER_FACTOR.lamp,
    })),
    ...Array.from({ length: room.keepFans }, (_, i) => ({
      name: `${room.name} fan ${i + 1}`,
      watts: room.fanWatts,
      pf: POWER_FACTOR.fan,
      surge: START.fan,
    })),
    ...(room.keepOutletWatts > 0 ? [{ name: `${room.name} outlet`, watts: room.keepOutletWatts, pf: 1 }] : []),
  ]);
}

export const keepsSomething = (room: SurveyRoom): boolean =>
  room.keepLamps > 0 || room.keepFans > 0 || room.keepOutletWatts > 0;

/** h, the longest wish of the rooms that keep something on, or of the job. */
export const hoursWanted = (rooms: readonly SurveyRoom[], job: number): number =>
  Math.max(job, ...rooms.filter(keepsSomething).map(({ hours }) => hours), 0);

/** The smallest inverter that carries the load with something in hand and its largest start; null where none does. */
export function inverterVa(load: BackupLoad): number | null {
  return INVERTERS_VA.find((va) => load.va <= LOADED * va && load.surgeVa <= SURGE * va) ?? null;
}

function* banks(volts: number): Iterable<BackupSize['batteries']> {
  const of = (block: number, ah: number) => ({
    volts: block,
    ah,
    count: volts / block,
    arrangement: 'series' as const,
    chemistry: 'vrla' as const,
    hours: 20,
  });
  for (const ah of BLOCK_AH) yield of(12, ah);
  if (volts / 2 <= MOST_CELLS) for (const ah of CELL_AH) yield of(2, ah);
}

/**
 * Inverter, bank, fuse and leads for what stays on. The smallest bank that lasts the hours wanted; the largest on sale
 * where none does, and the examination says how short it is.
 * @returns null where the load is more than one inverter on sale carries
 */
export function sizeBackup(
  rooms: readonly SurveyRoom[],
  wanted: number,
  practice: Practice,
  ambientC: number,
): BackupSize | null {
  const load = backupLoad(backedLoads(rooms));
  const va = inverterVa(load);
  if (va === null) return null;
  let best: BackupSize | null = null;
  for (const bankVolts of BANK_VOLTS) {
    const cutoff = bankVolts * CUTOFF_PER_VOLT;
    const { material, insulation } = practice.draft;
    const lengthM = LENGTH.batteryToFuse + LENGTH.fuseToInverter;
    const currentA = currentAtCutoffA({ va, efficiency: EFFICIENCY, cutoffV: cutoff });
    const lead = batteryLead({ practice, currentA, bankVolts, lengthM, method: 'C', material, insulation, ambientC });
    if (!lead) continue;
    for (const batteries of banks(bankVolts)) {
      const bank = bankOf(batteries);
      const usual = chargingWatts({ chargeA: CHARGE.usual * bank.ah, bankVolts, efficiency: EFFICIENCY });
      const charge = Math.round(bank.ah * (usual > va ? CHARGE.least : CHARGE.usual));
      const chargeWatts = chargingWatts({ chargeA: charge, bankVolts, efficiency: EFFICIENCY });
      const hours = autonomyHours({ bank, watts: load.watts, efficiency: EFFICIENCY });
      const size = {
        load,
        va,
        surge: SURGE * va,
        efficiency: EFFICIENCY,
        transfer: TRANSFER,
        cutoff,
        charge,
        chargeWatts,
        batteries,
        bankVolts,
        lead,
        hours,
      };
      if (hours >= wanted) return size;
      if (!best || hours > best.hours) best = size;
    }
  }
  return best;
}
