import type { Installation, Supply } from '../../document/schema';
import type { Practice } from '../../practices/types';
import { soundRooms } from '../check';
import { drawBackupSource } from './backup-source';
import { drawWay, type WayBars } from './draw-way';
import { BACKUP_BOARD, BOARD, drawGroup, drawOrigin, type GroupNeed } from './house';
import { HOUSE } from './ids';
import { drawNotices, drawPlaces, roomBoards, roomsWithSwitches } from './places';
import type { WayPlan } from './way-plan';
import type { Wish } from './wish';
import { backupWays, intoGroups, mainSensitivityA, mainsWays, planHome, type HomeOptions } from './plan-home';
import type { Sketch } from './sketch';

/** A, the smallest breaking capacity on sale that the supply asks for, the draft's usual one at least. */
export function breakingCapacity({ voltage, zln }: Supply, { draft, breakingCapacitiesA, cMax }: Practice): number {
  const prospective = zln === undefined ? 0 : (cMax.value * voltage) / zln;
  const onSale = breakingCapacitiesA.value;
  return onSale.find((icn) => icn >= prospective && icn >= draft.icnA) ?? onSale[onSale.length - 1]!;
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

function drawWays(
  sketch: Sketch,
  groups: readonly WayPlan[][],
  bars: readonly WayBars[],
  boards: ReadonlyMap<string, string>,
): void {
  groups.forEach((ways, i) => ways.forEach((way) => drawWay(sketch, way, bars[i]!, boards)));
}

/**
 * Draws a home that has no supply yet: origin, board, ways, the backup source and its ways.
 * @param wishFor what of a room is not drawn yet
 */
export function draftHome(
  sketch: Sketch,
  doc: Installation,
  options: HomeOptions,
  wishFor?: (room: Wish['room']) => Wish,
): void {
  const { practice, supply } = sketch;
  const rooms = soundRooms(doc.survey ?? [], options);
  const plan = planHome(rooms, options, wishFor);
  const intake = drawPlaces(sketch, rooms);
  const icn = breakingCapacity(supply, practice);
  const mains = intoGroups(mainsWays(plan));
  const backup = intoGroups(backupWays(plan));
  if (mains.length === 0) mains.push([]);

  const taps = drawOrigin(sketch, {
    ratingA: plan.serviceA,
    place: intake,
    feeders: mains.length + (plan.backup ? 1 : 0),
    mainSensitivityA: supply.system === 'TT' ? mainSensitivityA(supply, practice.touchVolts.value) : null,
  });
  const boards = roomBoards(sketch, roomsWithSwitches(plan.ways));
  const bars = mains.map((_, i) =>
    drawGroup(sketch, taps(), mainsGroup(i + 1, mains.length > 1, plan.serviceA, icn, intake)),
  );
  drawWays(sketch, mains, bars, boards);
  if (!plan.backup) return;
  const source = {
    size: plan.backup,
    from: taps(),
    intake,
    hours: plan.hours,
    groups: backup.length,
    icn,
  };
  drawWays(sketch, backup, drawBackupSource(sketch, source), boards);
  drawNotices(sketch, intake, [BOARD, BACKUP_BOARD], sketch.find(HOUSE.inverter)!.ref!);
}
