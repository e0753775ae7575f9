import type { Demand } from '../../calculations/maximum-demand';
import { maximumSensitivityA } from '../../calculations/rcd-time';
import type { PracticeId, Supply, SurveyRoom } from '../../document/schema';
import { practices } from '../../practices';
import { SERVICE_RATINGS, WAYS_PER_RCD, ratingFor } from './assumptions';
import { hoursWanted, keepsSomething, sizeBackup, type BackupSize } from './backup-size';
import { surveyDemand } from './demand';
import { planWays } from './plan';
import { isBackup, type WayPlan } from './way-plan';
import { wholeRoom, type Wish } from './wish';

export interface HomeOptions {
  practice: PracticeId;
  supply: Supply;
  /** h on battery that the job asks for; a room may ask for more */
  hoursWanted: number;
}

export interface HomePlan {
  ways: WayPlan[];
  backup: BackupSize | null;
  /** h, the longest wish */
  hours: number;
  demand: Demand;
  /** A, of service fuse, meter and main switch */
  serviceA: number;
  /** true where what should stay on is more than one inverter carries: it is planned on the mains */
  backupTooLarge: boolean;
}

/** degC, at which a draft is sized */
export const DRAFT_AMBIENT = 30;

const onMains = (room: SurveyRoom): SurveyRoom => ({ ...room, keepLamps: 0, keepFans: 0, keepOutletWatts: 0 });

/**
 * Everything a draft of these rooms decides before it draws. The rooms have no errors.
 * @param wishFor what of a room is to be drawn; all of it where not given
 */
export function planHome(
  rooms: readonly SurveyRoom[],
  { practice: id, supply, hoursWanted: job }: HomeOptions,
  wishFor: (room: SurveyRoom) => Wish = wholeRoom,
): HomePlan {
  const practice = practices[id];
  const hours = hoursWanted(rooms, job);
  const wanted = rooms.some(keepsSomething);
  const backup = wanted ? sizeBackup(rooms, hours, practice, DRAFT_AMBIENT) : null;
  const backupTooLarge = wanted && !backup;
  const held = backupTooLarge ? rooms.map(onMains) : rooms;
  const ways = planWays(held.map(wishFor), { practice, voltage: supply.voltage, ambientC: DRAFT_AMBIENT });
  const demand = surveyDemand(rooms, ways, backup?.chargeWatts ?? 0, practice, supply.voltage);
  return { ways, backup, hours, demand, serviceA: ratingFor(demand.demandA, SERVICE_RATINGS), backupTooLarge };
}

/** Ways shared out evenly, in order, among as few rcds as their standing leakage allows. */
export function intoGroups(ways: readonly WayPlan[]): WayPlan[][] {
  const count = Math.ceil(ways.length / WAYS_PER_RCD);
  return Array.from({ length: count }, (_, i) =>
    ways.slice(Math.floor((i * ways.length) / count), Math.floor(((i + 1) * ways.length) / count)),
  );
}

export const mainsWays = ({ ways }: HomePlan): WayPlan[] => ways.filter((way) => !isBackup(way));
export const backupWays = ({ ways }: HomePlan): WayPlan[] => ways.filter(isBackup);

/** A, sensitivities of main rcds on sale, the least sensitive first */
const MAIN_SENSITIVITIES = [0.3, 0.1, 0.03] as const;

/** A, the main rcd that the electrode allows on TT, with delay where one is made. */
export function mainSensitivityA({ ra }: Supply, touchVolts: number): number {
  if (ra === undefined) return MAIN_SENSITIVITIES[0];
  const most = maximumSensitivityA(ra, touchVolts);
  return (
    MAIN_SENSITIVITIES.find((sensitivity) => sensitivity <= most) ?? MAIN_SENSITIVITIES[MAIN_SENSITIVITIES.length - 1]!
  );
}
