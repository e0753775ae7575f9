import { autonomyHours } from '../calculations/autonomy';
import { backupLoad, currentAtCutoffA, type BackupLoad } from '../calculations/backup-load';
import { ASSUMED, type Assumptions, type Bank } from '../calculations/battery-bank';
import type { PartOf } from '../document/schema';
import type { Graph } from '../terminals/graph';
import type { Drawn } from './drawn';
import type { Evaluation } from './evaluate';
import { ASSUMED_EFFICIENCY, bankBehind, chargeWatts } from './loads';

/** What one backup source carries when the mains are gone, and how long. */
export interface BackupFigures {
  inverter: PartOf<'inverter'>;
  /** what it feeds in an outage, in the changeover positions that load it most */
  drawn: readonly Drawn[];
  /** running and starting; of what is known where `known` is false */
  load: BackupLoad;
  /** false while a load of it has no watts */
  known: boolean;
  /** names of the outage conditions in which it feeds something */
  conditions: string[];
  bank: Bank | null;
  /** assumed of the bank's chemistry */
  assumed: Assumptions;
  /** W drawn from the mains while charging; null where charge or bank is not known */
  chargeWatts: number | null;
  /** h at the running load; null without bank, or without any load */
  hours: number | null;
  /** A dc at full output and cutoff; null where a rating is not given */
  dcAmps: number | null;
}

const asBacked =
  (voltage: number) =>
  ({ part, watts, amps, startAmps }: Drawn) => ({
    name: part.id,
    watts,
    pf: amps > 0 ? Math.min(1, watts / (amps * voltage)) : 1,
    surge: amps > 0 ? Math.min(20, Math.max(1, startAmps / amps)) : 1,
  });

/** Works out each backup source, by designation: all that it feeds on at once. */
export function workOutBackups(
  graph: Graph,
  { backups, evaluated }: Evaluation,
  drawn: readonly Drawn[],
): BackupFigures[] {
  const { voltage } = graph.document.supply;
  return backups.map((inverter) => {
    const outages = evaluated
      .filter(({ condition }) => condition.base === 'outage')
      .map(({ condition, points }) => {
        const fed = drawn.filter(({ part, isPoint }) => {
          const state = isPoint ? points.get(part.id) : undefined;
          return state !== undefined && state.fed && state.source?.part.id === inverter.id;
        });
        return { name: condition.name, fed, load: backupLoad(fed.map(asBacked(voltage))) };
      });
    const worst = outages.reduce((a, b) => (b.load.va > a.load.va ? b : a));
    const bank = bankBehind(graph, inverter);
    const efficiency = inverter.efficiency ?? ASSUMED_EFFICIENCY;
    const { va, cutoff } = inverter;
    return {
      inverter,
      drawn: worst.fed,
      load: worst.load,
      known: worst.fed.every((each) => each.known),
      conditions: outages.filter(({ fed }) => fed.length > 0).map(({ name }) => name),
      bank,
      assumed: ASSUMED[bank?.chemistry ?? 'flooded'],
      chargeWatts: chargeWatts(graph, inverter),
      hours: bank && worst.load.watts > 0 ? autonomyHours({ bank, watts: worst.load.watts, efficiency }) : null,
      dcAmps: va === undefined || cutoff === undefined ? null : currentAtCutoffA({ va, efficiency, cutoffV: cutoff }),
    };
  });
}
