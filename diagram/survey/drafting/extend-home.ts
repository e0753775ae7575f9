import type { Installation, Part, SurveyRoom } from '../../document/schema';
import { findWays, type Way } from '../../terminals/ways';
import { soundRooms } from '../check';
import { drawnByPlace, drawnIn, type Drawn } from '../drawn';
import { differenceOf, type Difference } from '../missing';
import { LENGTH, OUTLET_WATTS, RCD_RATINGS, WAYS_PER_RCD } from './assumptions';
import { hoursWanted, sizeBackup, type BackupSize } from './backup-size';
import { drawBackupSource } from './backup-source';
import { detach } from './detach';
import { breakingCapacity } from './draft-home';
import { drawOutlet, drawWay, outletPlace, type WayBars } from './draw-way';
import { canTapBeside, findGroups, roomiest, tapBeside, type Group } from './groups';
import { BACKUP_BOARD, BOARD, drawGroup } from './house';
import { HOUSE, breakerId, groupIds, roomKey } from './ids';
import { drawNotices, drawPlaces, roomBoards, roomsWithSwitches } from './places';
import { planWays } from './plan';
import { isBackup, type WayPlan, type WaySupply } from './way-plan';
import type { Wish } from './wish';
import { DRAFT_AMBIENT, type HomeOptions } from './plan-home';
import { openBox, openRow, type Held } from './room-taps';
import type { Sketch } from './sketch';

/** Numbers for new things of a room that nothing drawn bears: `lamp3`, `outlet4`. */
function freeNumbers(sketch: Sketch, room: SurveyRoom, what: string, count: number): number[] {
  const free: number[] = [];
  for (let n = 1; free.length < count; n++) {
    const id = `${roomKey(room)}.${what}${n}`;
    if (!sketch.find(id) && !sketch.find(`${id}.switch`)) free.push(n);
  }
  return free;
}

const numberOf = (part: Part, room: SurveyRoom, what: string): number | undefined => {
  const found = new RegExp(`\\.${what}(\\d+)$`).exec(part.id);
  return found && part.id.startsWith(`${roomKey(room)}.`) ? Number(found[1]) : undefined;
};

/**
 * Takes lamps or fans that change sides off their way, those with the highest numbers first; those drawn by hand stay.
 * @returns their numbers, under which they are drawn again
 */
function moveSides(
  sketch: Sketch,
  room: SurveyRoom,
  what: 'lamp' | 'fan',
  parts: readonly Part[],
  count: number,
): number[] {
  const numbers = parts.map((part) => numberOf(part, room, what)).filter((n) => n !== undefined);
  const moved = numbers.sort((a, b) => b - a).slice(0, count);
  for (const n of moved) detach(sketch, `${roomKey(room)}.${what}${n}`);
  return moved.sort((a, b) => a - b);
}

/** What of a room is still to be drawn; lamps and fans that change sides are taken off their ways for it. */
function wishFrom(sketch: Sketch, room: SurveyRoom, drawn: Drawn, difference: Difference): Wish {
  const onMains = <T extends Part>(all: readonly T[], kept: readonly T[]) => all.filter((part) => !kept.includes(part));
  const lampsOut = moveSides(sketch, room, 'lamp', onMains(drawn.lamps, drawn.keptLamps), difference.lampsToBackup);
  const lampsBack = moveSides(sketch, room, 'lamp', drawn.keptLamps, difference.lampsToMains);
  const fansOut = moveSides(sketch, room, 'fan', onMains(drawn.fans, drawn.keptFans), difference.fansToBackup);
  const fansBack = moveSides(sketch, room, 'fan', drawn.keptFans, difference.fansToMains);
  const fresh = (what: string, count: number, taken: readonly number[] = []) =>
    freeNumbers(sketch, room, what, count + taken.length)
      .filter((n) => !taken.includes(n))
      .slice(0, count);
  const lamps = fresh('lamp', difference.lamps, [...lampsOut, ...lampsBack]);
  const fans = fresh('fan', difference.fans, [...fansOut, ...fansBack]);
  const heavy = fresh('heavy', difference.heavy.length);
  return {
    room,
    lamps: [...lamps.slice(difference.keptLamps), ...lampsBack],
    fans: [...fans.slice(difference.keptFans), ...fansBack],
    outlets: fresh('outlet', difference.outlets),
    heavy: difference.heavy.map((item, i) => ({ number: heavy[i]!, ...item })),
    keptLamps: [...lamps.slice(0, difference.keptLamps), ...lampsOut],
    keptFans: [...fans.slice(0, difference.keptFans), ...fansOut],
    keptOutlet: difference.keptOutlet,
  };
}

/** Hangs on ways that are drawn what they have room for. @returns what still needs a way of its own */
function hangOn(
  sketch: Sketch,
  doc: Installation,
  ways: readonly Way[],
  wish: Wish,
  supply: WaySupply,
  held: Held,
): Wish {
  const { room } = wish;
  const left = { ...wish };
  const side = (backup: boolean, lamps: number[], fans: number[]): boolean => {
    if (lamps.length + fans.length === 0) return true;
    const watts = lamps.length * room.lampWatts + fans.length * room.fanWatts;
    const box = openBox(sketch, doc, ways, { room, backup, points: lamps.length + fans.length, watts }, supply, held);
    box?.fill({ room, lamps, fans, outlets: [] }, backup);
    return box !== undefined;
  };
  if (side(false, wish.lamps, wish.fans)) Object.assign(left, { lamps: [], fans: [] });
  if (side(true, wish.keptLamps, wish.keptFans)) Object.assign(left, { keptLamps: [], keptFans: [] });
  const outlets: number[] = [];
  for (const number of wish.outlets) {
    const row = openRow(sketch, doc, ways, outletPlace(sketch, room), room, supply);
    if (row)
      drawOutlet(sketch, room, {
        id: `${roomKey(room)}.outlet${number}`,
        watts: OUTLET_WATTS,
        ...row,
        length: LENGTH.outletToOutlet,
        fromBoard: false,
      });
    else outlets.push(number);
  }
  return { ...left, outlets };
}

/** One more rcd with bars beside one that is drawn; undefined where its feeders cannot be told. */
function anotherGroup(sketch: Sketch, beside: Group): Group | undefined {
  const side = beside.backup ? 'backup' : 'mains';
  const { bars, rcd } = beside;
  const from = tapBeside(sketch, beside);
  if (!from) return undefined;
  let n = 1;
  while (sketch.find(groupIds(side, n).rcd)) n++;
  const run = sketch.arriving([bars.lineBar, '1'])?.cable;
  const drawn = drawGroup(sketch, from, {
    side,
    n,
    label: `${beside.backup ? 'Backup' : 'Mains'} ways ${n}`,
    ratingA: rcd.rating ?? RCD_RATINGS[RCD_RATINGS.length - 1]!,
    icn: bars.icn,
    rcdPlace: rcd.place ?? bars.place,
    rcdBoard: rcd.board ?? BOARD,
    place: bars.place,
    board: bars.board,
    ...(run !== undefined && { cable: sketch.copyCable(run, `${groupIds(side, n).rcd}.run`) }),
  });
  return groupOf(sketch, drawn, side, n);
}

const groupOf = (sketch: Sketch, bars: WayBars, side: 'mains' | 'backup', n: number): Group => ({
  rcd: sketch.find(groupIds(side, n).rcd) as Group['rcd'],
  backup: side === 'backup',
  bars,
  ways: 0,
});

/** The backup source of a home that has none yet. @returns its groups of ways */
function firstBackup(
  sketch: Sketch,
  size: BackupSize,
  beside: Group,
  ways: number,
  intake: string,
  hours: number,
): Group[] {
  const from = tapBeside(sketch, beside)!;
  const icn = breakingCapacity(sketch.supply, sketch.practice);
  const drawn = drawBackupSource(sketch, {
    size,
    from,
    intake,
    hours,
    groups: Math.ceil(ways / WAYS_PER_RCD),
    icn,
  });
  return drawn.map((bars, i) => groupOf(sketch, bars, 'backup', i + 1));
}

/** Draws ways at the group with most room, with further rcds as they fill. */
function drawAt(sketch: Sketch, ways: readonly WayPlan[], groups: Group[], boards: ReadonlyMap<string, string>): void {
  for (const way of ways) {
    let group = roomiest(groups);
    if (!group) {
      const another = anotherGroup(sketch, groups[0]!);
      if (another) groups.push(another);
      group = another ?? groups[0]!;
    }
    drawWay(sketch, way, group.bars, boards);
    group.ways += 1;
  }
}

const isToDraw = (difference: Difference): boolean =>
  difference.lamps + difference.fans + difference.outlets + difference.heavy.length > 0 ||
  difference.keptOutlet ||
  difference.lampsToBackup + difference.fansToBackup + difference.lampsToMains + difference.fansToMains > 0;

/** Without bars to hang backed-up ways on, what should stay on is left to be drawn by hand. */
function drawable(difference: Difference, canKeep: boolean): Difference {
  if (canKeep) return difference;
  const { lamps, fans, keptLamps, keptFans } = difference;
  return {
    ...difference,
    lamps: lamps - keptLamps,
    fans: fans - keptFans,
    keptLamps: 0,
    keptFans: 0,
    keptOutlet: false,
    lampsToBackup: 0,
    fansToBackup: 0,
  };
}

/**
 * Draws what the survey has and the drawing has not: on ways that have room for it, else on new ones. What is drawn stays,
 * but for lamps and fans that the survey moves between mains and backup. A drawing whose board cannot be told (no 30 mA rcd
 * with bars behind it) is left as it is.
 */
export function extendHome(sketch: Sketch, doc: Installation, options: HomeOptions): void {
  const { practice, supply } = sketch;
  const survey = soundRooms(doc.survey ?? [], options);
  const groups = findGroups(doc, sketch);
  const mains = groups.filter(({ backup }) => !backup);
  if (mains.length === 0) return;
  const inverter = doc.parts.find(({ kind }) => kind === 'inverter');
  const hours = hoursWanted(survey, options.hoursWanted);
  const size = inverter ? null : sizeBackup(survey, hours, practice, DRAFT_AMBIENT);
  const canKeep = inverter ? mains.length < groups.length : size !== null && canTapBeside(sketch, mains[0]!);

  const places = drawnByPlace(doc);
  const changed = survey.flatMap((room) => {
    const drawn = drawnIn(places, room.id);
    const difference = drawable(differenceOf(room, drawn), canKeep);
    return isToDraw(difference) || !sketch.hasPlace(room.id) ? [{ room, drawn, difference }] : [];
  });
  if (changed.length === 0) return;
  const intake = drawPlaces(sketch, survey);
  const ways = findWays(doc);
  const waySupply: WaySupply = { practice, voltage: supply.voltage, ambientC: DRAFT_AMBIENT };
  const wishes = changed.map(({ room, drawn, difference }) => wishFrom(sketch, room, drawn, difference));
  const held: Held = new Map();
  const left = wishes.map((wish) => hangOn(sketch, doc, ways, wish, waySupply, held));
  const planned = planWays(left, waySupply, (way) => sketch.find(breakerId(way)) !== undefined);
  const kept = planned.filter(isBackup);
  const boards = roomBoards(sketch, roomsWithSwitches(planned));
  drawAt(
    sketch,
    planned.filter((way) => !isBackup(way)),
    mains,
    boards,
  );
  if (kept.length > 0) {
    const backup = size
      ? firstBackup(sketch, size, mains[0]!, kept.length, intake, hours)
      : groups.filter((group) => group.backup);
    drawAt(sketch, kept, backup, boards);
  }
  const source = inverter ?? sketch.find(HOUSE.inverter);
  if (source) drawNotices(sketch, intake, inverter ? [] : [BOARD, BACKUP_BOARD], source.ref ?? 'the inverter');
}
