import { emptyDocument, type Installation, type PracticeId, type Supply, type SurveyRoom } from '../document/schema';
import { practices } from '../practices';
import { soundRooms } from './check';
import { drawBackupSource, planFeed } from './drafting/backup-source';
import { drawWay, type WayBars } from './drafting/draw-way';
import { BACKUP_BOARD, BOARD, drawGroup, drawOrigin, type GroupNeed } from './drafting/house';
import { HOUSE } from './drafting/ids';
import { drawNotices, drawPlaces, roomBoards } from './drafting/places';
import type { WayPlan } from './drafting/plan';
import { backupWays, intoGroups, mainsWays, mainSensitivityA, planHome } from './drafting/plan-home';
import { Sketch } from './drafting/sketch';

export interface DraftOptions {
  title: string;
  practice: PracticeId;
  supply: Supply;
  /** h on battery that the job asks for */
  hoursWanted: number;
}

/** A, the smallest breaking capacity on sale that the supply asks for, the draft's usual one at least. */
function breakingCapacity({ voltage, zln }: Supply, practice: PracticeId): number {
  const { draft, breakingCapacitiesA, cMax } = practices[practice];
  const prospective = zln === undefined ? 0 : (cMax.value * voltage) / zln;
  const onSale = breakingCapacitiesA.value;
  return onSale.find((icn) => icn >= prospective && icn >= draft.icnA) ?? onSale[onSale.length - 1]!;
}

/**
 * A complete drawing of what the rooms hold: origin, board, ways, the backup source with its own ways, a switchboard a room,
 * every core wired, cables sized. Rows with errors are left out. The same rooms give the same bytes.
 */
export function draftDocument(rooms: readonly SurveyRoom[], options: DraftOptions): Installation {
  const survey = [...rooms].sort((a, b) => a.order - b.order);
  const practice = practices[options.practice];
  const sound = soundRooms(survey, options);
  const plan = planHome(sound, options);
  const sketch = new Sketch({ ...emptyDocument(options.title, options.practice, options.supply), survey }, practice);
  const intake = drawPlaces(sketch, sound);
  const icn = breakingCapacity(options.supply, options.practice);
  const mains = intoGroups(mainsWays(plan));
  const backup = intoGroups(backupWays(plan));

  const tt = options.supply.system === 'TT';
  const feed = plan.backup && planFeed(sketch, plan.backup, tt);
  const mainRcd = tt || (plan.backup !== null && feed === null);
  const taps = drawOrigin(sketch, {
    ratingA: plan.serviceA,
    place: intake,
    feeders: mains.length + (plan.backup ? 1 : 0),
    mainSensitivityA: mainRcd ? mainSensitivityA(options.supply, practice.touchVolts.value) : null,
  });
  const boards = roomBoards(sketch, plan.ways);
  const backupBars = plan.backup
    ? drawBackupSource(sketch, {
        size: plan.backup,
        feed: feed ?? planFeed(sketch, plan.backup, true)!,
        from: taps(),
        intake,
        hours: plan.hours,
        groups: backup.length,
        icn,
      })
    : [];
  const mainsBars = mains.map((_, i) => drawGroup(sketch, taps(), mainsGroup(i + 1, mains.length > 1, plan.serviceA, icn, intake)));
  drawWays(sketch, mains, mainsBars, boards);
  drawWays(sketch, backup, backupBars, boards);
  if (plan.backup) drawNotices(sketch, intake, [BOARD, BACKUP_BOARD], sketch.find(HOUSE.inverter)!.ref!);
  return sketch.finish();
}

/** The nth group of mains ways at the board. */
const mainsGroup = (n: number, several: boolean, ratingA: number, icn: number, intake: string): GroupNeed => ({
  side: 'mains',
  n,
  label: several ? `Mains ways ${n}` : 'Mains ways',
  ratingA,
  icn,
  rcdPlace: intake,
  rcdBoard: BOARD,
  place: intake,
  board: BOARD,
});

function drawWays(sketch: Sketch, groups: readonly WayPlan[][], bars: readonly WayBars[], boards: ReadonlyMap<string, string>): void {
  groups.forEach((ways, i) => ways.forEach((way) => drawWay(sketch, way, bars[i]!, boards)));
}
