import type { Bank } from '../calculations/battery-bank';
import { bankOf } from '../calculations/battery-bank';
import type { DemandRow } from '../calculations/maximum-demand';
import { backupLoad } from '../calculations/backup-load';
import type { SurveyRoom } from '../document/schema';
import { OUTLET_WATTS } from './drafting/assumptions';
import { backedLoads } from './drafting/backup-size';
import { isBackup, type WayPlan } from './drafting/way-plan';
import { planHome, type HomeOptions } from './drafting/plan-home';
import { soundRooms } from './check';

/** What a survey comes to, by room and for the home. */
export interface RoomTotals {
  room: string;
  /** true for a row with an error: its backup is not summed */
  waits: boolean;
  /** connected */
  watts: number;
  amps: number;
  backupWatts: number;
  backupVa: number;
  /** numbers of the ways that reach it, as drafted */
  ways: number[];
}

export interface SurveyTotals {
  rooms: RoomTotals[];
  /** sums of the rows that have no error */
  lamps: number;
  fans: number;
  outlets: number;
  heavy: number;
  keepLamps: number;
  keepFans: number;
  keepOutletWatts: number;
  watts: number;
  amps: number;
  ways: number;
  demandWatts: number;
  demandAmps: number;
  demandLines: DemandRow[];
  /** A, the service that a draft takes */
  serviceA: number;
  /** null where nothing stays on, or more than one inverter carries */
  backup: {
    watts: number;
    va: number;
    inverterVa: number;
    /** h on battery */
    hours: number;
    hoursWanted: number;
    bank: Bank;
    efficiency: number;
    batteryText: string;
  } | null;
}

/** W, all that a room holds, at once. */
export const connectedWatts = (room: SurveyRoom): number =>
  room.lamps * room.lampWatts +
  room.fans * room.fanWatts +
  room.outlets * OUTLET_WATTS +
  room.keepOutletWatts +
  room.heavy.reduce((sum, { watts }) => sum + watts, 0);

/** Sums of a survey, and what a draft of it would take: service, inverter, bank. Rows with errors are left out of the sums. */
export function surveyTotals(rooms: readonly SurveyRoom[], options: HomeOptions): SurveyTotals {
  const sound = soundRooms(rooms, options);
  const plan = planHome(sound, options);
  const counted = new Set(sound.map(({ id }) => id));
  const amps = (watts: number) => watts / options.supply.voltage;
  const byRoom = rooms.map((room): RoomTotals => {
    const { watts: backupWatts, va: backupVa } = backupLoad(backedLoads([room]));
    const reached = (way: WayPlan) => way.segments.some((segment) => segment.room.id === room.id);
    // The feed of the inverter stands between the mains ways and the backed-up ones, and has a number too.
    const ways = plan.ways.flatMap((way, i) => (reached(way) ? [i + (isBackup(way) ? 2 : 1)] : []));
    const watts = connectedWatts(room);
    return { room: room.id, waits: !counted.has(room.id), watts, amps: amps(watts), backupWatts, backupVa, ways };
  });
  const sum = (of: (room: SurveyRoom) => number) => sound.reduce((total, room) => total + of(room), 0);
  const watts = sum(connectedWatts);
  const { backup } = plan;
  return {
    rooms: byRoom,
    lamps: sum(({ lamps }) => lamps),
    fans: sum(({ fans }) => fans),
    outlets: sum(({ outlets }) => outlets),
    heavy: sum(({ heavy }) => heavy.length),
    keepLamps: sum(({ keepLamps }) => keepLamps),
    keepFans: sum(({ keepFans }) => keepFans),
    keepOutletWatts: sum(({ keepOutletWatts }) => keepOutletWatts),
    watts,
    amps: amps(watts),
    ways: plan.ways.length,
    demandWatts: plan.demand.demandWatts,
    demandAmps: plan.demand.demandA,
    demandLines: plan.demand.rows,
    serviceA: plan.serviceA,
    backup: backup && {
      watts: backup.load.watts,
      va: backup.load.va,
      inverterVa: backup.va,
      hours: backup.hours,
      hoursWanted: plan.hours,
      bank: bankOf(backup.batteries),
      efficiency: backup.efficiency,
      batteryText: `${backup.bankVolts} V ${backup.batteries.ah} Ah`,
    },
  };
}
