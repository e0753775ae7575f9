import { autonomyHours } from '../calculations/autonomy';
import { backupLoad, currentAtCutoffA, type BackedLoad, type BackupLoad } from '../calculations/backup-load';
import { ASSUMED, type Assumptions, type Bank } from '../calculations/battery-bank';
import type { PartOf } from '../document/schema';
import type { Graph } from '../terminals/graph';
import type { Evaluated } from './evaluate';
import { ASSUMED_EFFICIENCY, bankBehind, chargeWatts, takenBy } from './loads';

/** What a backup source has to carry, and for how long it can. */
export interface BackupFigures {
  inverter: PartOf<'inverter'>;
  /** ids of the points that it feeds, in the condition in which they take most */
  points: string[];
  loads: BackedLoad[];
  load: BackupLoad;
  /** false while a load that it feeds has no watts */
  known: boolean;
  bank: Bank | null;
  assumed: Assumptions;
  efficiency: number;
  /** W from the mains while charging; null where charge or bank is not known */
  chargeWatts: number | null;
  /** h at the running load; null where the bank is not known or nothing is fed */
  autonomyHours: number | null;
  /** A from the bank at full VA and cutoff; null without one of them */
  dcAmps: number | null;
}

function fedBy({ points }: Evaluated, inverter: string): string[] {
  return [...points].filter(([, state]) => state.fed && state.source?.part.id === inverter).map(([id]) => id);
}

/** The figures of every inverter that is on and has a battery, its loads all running on battery at once. */
export function backupFigures(
  graph: Graph,
  evaluated: readonly Evaluated[],
  inverters: readonly PartOf<'inverter'>[],
): BackupFigures[] {
  return inverters.map((inverter) => {
    const sets = evaluated
      .filter(({ condition }) => condition.base === 'outage')
      .map((each) => fedBy(each, inverter.id));
    const described = sets.map((points) => {
      const parts = points.map((id) => graph.parts.get(id)!);
      const taken = parts.map((part) => ({ part, wants: takenBy(part) }));
      const loads = taken.flatMap(({ part, wants }) => (wants ? [{ name: part.id, ...wants }] : []));
      return {
        points,
        loads,
        load: backupLoad(loads),
        known: taken.every(({ part, wants }) => wants !== null || part.kind === 'socket'),
      };
    });
    const none = { points: [], loads: [], load: backupLoad([]), known: true };
    const most = described.reduce((worst, each) => (each.load.va > worst.load.va ? each : worst), described[0] ?? none);
    const bank = bankBehind(graph, inverter);
    const efficiency = inverter.efficiency ?? ASSUMED_EFFICIENCY;
    const hours = bank && most.load.watts > 0 ? autonomyHours({ bank, watts: most.load.watts, efficiency }) : null;
    const { va, cutoff } = inverter;
    return {
      inverter,
      ...most,
      bank,
      assumed: ASSUMED[bank?.chemistry ?? 'flooded'],
      efficiency,
      chargeWatts: chargeWatts(graph, inverter),
      autonomyHours: hours,
      dcAmps: va === undefined || cutoff === undefined ? null : currentAtCutoffA({ va, efficiency, cutoffV: cutoff }),
    };
  });
}
