import type { Installation, Part, SurveyRoom } from '../../document/schema';
import { findWays, type Way } from '../../terminals/ways';
import { soundRooms } from '../check';
import { drawnByPlace, drawnIn, type Drawn } from '../drawn';
import { differenceOf, type Difference } from '../missing';
import { LENGTH, OUTLET_WATTS } from './assumptions';
import { sizeBackup } from './backup-size';
import { drawBackupSource, planFeed } from './backup-source';
import { detach } from './detach';
import { breakingCapacity, mainsGroup } from './draft-home';
import { drawOutlet, drawWay, outletPlace } from './draw-way';
import { findGroups, roomiest, tapBeside, type Group } from './groups';
import { BACKUP_BOARD, BOARD, drawGroup } from './house';
import { HOUSE, breakerId, groupIds, roomKey } from './ids';
import { drawNotices, drawPlaces, roomBoards, roomsWithSwitches } from './places';
import { isBackup, planWays, type WayPlan, type WaySupply, type Wish } from './plan';
import { DRAFT_AMBIENT, type HomeOptions } from './plan-home';
import { openBox, openRow } from './room-taps';
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

/** Lamps or fans that change sides: taken off their way, to be drawn anew as they are. Those drawn by hand stay. */
function moveSides(sketch: Sketch, room: SurveyRoom, what: 'lamp' | 'fan', parts: readonly Part[], count: number): { numbers: number[]; parts: Part[] } {
  const drafted = parts.filter((part) => numberOf(part, room, what) !== undefined).slice(0, count);
  for (const part of drafted) detach(sketch, part.id);
  return { numbers: drafted.map((part) => numberOf(part, room, what)!), parts: drafted };
}

/** What of a room is still to be drawn, and the parts that keep their values when drawn anew on the other side. */
function wishFrom(sketch: Sketch, room: SurveyRoom, drawn: Drawn, difference: Difference): { wish: Wish; moved: Part[] } {
  const onMains = <T extends Part>(all: readonly T[], kept: readonly T[]) => all.filter((part) => !kept.includes(part)).reverse();
  const lampsOut = moveSides(sketch, room, 'lamp', onMains(drawn.lamps, drawn.keptLamps), difference.lampsToBackup);
  const lampsBack = moveSides(sketch, room, 'lamp', [...drawn.keptLamps].reverse(), difference.lampsToMains);
  const fansOut = moveSides(sketch, room, 'fan', onMains(drawn.fans, drawn.keptFans), difference.fansToBackup);
  const fansBack = moveSides(sketch, room, 'fan', [...drawn.keptFans].reverse(), difference.fansToMains);
  const busy = (moves: { numbers: number[] }[]) => new Set(moves.flatMap(({ numbers }) => numbers));
  const fresh = (what: string, count: number, taken: Set<number>) =>
    freeNumbers(sketch, room, what, count + taken.size).filter((n) => !taken.has(n)).slice(0, count);
  const lamps = fresh('lamp', difference.lamps, busy([lampsOut, lampsBack]));
  const fans = fresh('fan', difference.fans, busy([fansOut, fansBack]));
  const heavy = fresh('heavy', difference.heavy.length, new Set());
  return {
    wish: {
      room,
      lamps: [...lamps.slice(difference.keptLamps), ...lampsBack.numbers],
      fans: [...fans.slice(difference.keptFans), ...fansBack.numbers],
      outlets: fresh('outlet', difference.outlets, new Set()),
      heavy: difference.heavy.map((item, i) => ({ number: heavy[i]!, ...item })),
      keptLamps: [...lamps.slice(0, difference.keptLamps), ...lampsOut.numbers],
      keptFans: [...fans.slice(0, difference.keptFans), ...fansOut.numbers],
      keptOutlet: difference.keptOutlet,
    },
    moved: [...lampsOut.parts, ...lampsBack.parts, ...fansOut.parts, ...fansBack.parts],
  };
}

/** Hangs on ways that are drawn what they have room for. @returns what still needs a way of its own */
function hangOn(sketch: Sketch, doc: Installation, ways: readonly Way[], wish: Wish, supply: WaySupply): Wish {
  const { room } = wish;
  const left = { ...wish };
  const side = (backup: boolean, lamps: number[], fans: number[]): boolean => {
    if (lamps.length + fans.length === 0) return true;
    const watts = lamps.length * room.lampWatts + fans.length * room.fanWatts;
    const box = openBox(sketch, doc, ways, room, backup, { points: lamps.length + fans.length, watts }, supply);
    box?.fill({ room, lamps, fans, outlets: [] }, backup);
    return box !== undefined;
  };
  if (side(false, wish.lamps, wish.fans)) Object.assign(left, { lamps: [], fans: [] });
  if (side(true, wish.keptLamps, wish.keptFans)) Object.assign(left, { keptLamps: [], keptFans: [] });
  const outlets: number[] = [];
  for (const number of wish.outlets) {
    const row = openRow(sketch, doc, ways, outletPlace(sketch, room), room, supply);
    if (row) drawOutlet(sketch, room, `${roomKey(room)}.outlet${number}`, OUTLET_WATTS, row.size, row.taps, LENGTH.outletToOutlet, false);
    else outlets.push(number);
  }
  return { ...left, outlets };
}

/** One more rcd with bars beside one that is drawn. */
function anotherGroup(sketch: Sketch, beside: Group, n: number): Group | null {
  const side = beside.backup ? 'backup' : 'mains';
  const { bars, rcd } = beside;
  const from = tapBeside(sketch, rcd);
  const place = rcd.place ?? bars.place;
  if (!from) return null;
  let number = n;
  while (sketch.find(groupIds(side, number).rcd)) number++;
  const run = sketch.arriving([bars.lineBar, '1'])?.cable;
  const cable = run === undefined ? undefined : sketch.copyCable(run, `${groupIds(side, number).rcd}.run`);
  const need = { ...mainsGroup(number, true, rcd.rating ?? 63, bars.icn, bars.place), side, rcdPlace: place, rcdBoard: rcd.board ?? BOARD, board: bars.board, ...(cable && { cable }) } as const;
  const drawn = drawGroup(sketch, from, need);
  return { rcd: sketch.find(groupIds(side, number).rcd) as Group['rcd'], backup: beside.backup, bars: drawn, ways: 0 };
}

/** The backup source of a home that has none yet. @returns its groups of ways, none where it cannot be fed or sized */
function firstBackup(sketch: Sketch, rooms: readonly SurveyRoom[], mains: readonly Group[], ways: number, intake: string, hours: number): Group[] {
  const size = sizeBackup(rooms, hours, sketch.practice, DRAFT_AMBIENT);
  const beside = mains[0];
  const from = size && beside && tapBeside(sketch, beside.rcd);
  if (!from) return [];
  const behindRcd = sketch.supply.system === 'TT' || sketch.find(HOUSE.mainRcd) !== undefined;
  const feed = planFeed(sketch, size, behindRcd) ?? planFeed(sketch, size, true)!;
  const icn = breakingCapacity(sketch.supply, sketch.practice);
  const drawn = drawBackupSource(sketch, { size, feed, from, intake, hours, groups: Math.ceil(ways / 9), icn });
  return drawn.map((bars, i) => ({ rcd: sketch.find(groupIds('backup', i + 1).rcd) as Group['rcd'], backup: true, bars, ways: 0 }));
}

/** Draws ways at the group with most room, with further rcds as they fill. */
function drawAt(sketch: Sketch, ways: readonly WayPlan[], groups: Group[], boards: ReadonlyMap<string, string>): void {
  for (const way of ways) {
    const first = groups[0];
    let group = roomiest(groups);
    if (!group && first) {
      group = anotherGroup(sketch, first, groups.length + 1) ?? first;
      if (group !== first) groups.push(group);
    }
    if (!group) return;
    drawWay(sketch, way, group.bars, boards);
    group.ways += 1;
  }
}

/**
 * Draws what the survey has and the drawing has not: on ways that have room for it, else on new ones. What is drawn stays,
 * but for lamps and fans that the survey moves between mains and backup.
 */
export function extendHome(sketch: Sketch, doc: Installation, options: HomeOptions): void {
  const survey = soundRooms(doc.survey ?? [], options);
  const places = drawnByPlace(doc);
  const supply: WaySupply = { practice: sketch.practice, voltage: sketch.supply.voltage, ambientC: DRAFT_AMBIENT };
  const groups = findGroups(doc, sketch);
  const hasInverter = doc.parts.some(({ kind }) => kind === 'inverter');
  const canKeep = !hasInverter || groups.some(({ backup }) => backup);
  const changed = survey.flatMap((room) => {
    const difference = reachable(differenceOf(room, drawnIn(places, room.id)), canKeep);
    return isToDraw(difference) || !sketch.hasPlace(room.id) ? [{ room, difference }] : [];
  });
  if (changed.length === 0) return;
  const intake = drawPlaces(sketch, survey);
  const ways = findWays(doc);
  const wishes = changed.map(({ room, difference }) => wishFrom(sketch, room, drawnIn(places, room.id), difference));
  const left = wishes.map(({ wish }) => hangOn(sketch, doc, ways, wish, supply));
  const planned = planWays(left, supply, (way) => sketch.find(breakerId(way)) !== undefined);
  const boards = roomBoards(sketch, roomsWithSwitches(planned));
  const mains = groups.filter(({ backup }) => !backup);
  drawAt(sketch, planned.filter((way) => !isBackup(way)), mains, boards);
  const kept = planned.filter(isBackup);
  const hours = Math.max(options.hoursWanted, ...survey.map((room) => room.hours));
  const backup = hasInverter || kept.length === 0 ? groups.filter((group) => group.backup) : firstBackup(sketch, survey, mains, kept.length, intake, hours);
  drawAt(sketch, kept, backup, boards);
  for (const part of wishes.flatMap(({ moved }) => moved)) sketch.restore(part);
  const source = doc.parts.find(({ kind }) => kind === 'inverter') ?? sketch.find(HOUSE.inverter);
  if (source) drawNotices(sketch, intake, hasInverter ? [] : [BOARD, BACKUP_BOARD], source.ref ?? 'the inverter');
}

const isToDraw = (difference: Difference): boolean =>
  difference.lamps + difference.fans + difference.outlets + difference.heavy.length > 0 ||
  difference.keptOutlet ||
  difference.lampsToBackup + difference.fansToBackup + difference.lampsToMains + difference.fansToMains > 0;

/** Without bars to hang backed-up ways on, what should stay on is left to be drawn by hand. */
function reachable(difference: Difference, canKeep: boolean): Difference {
  if (canKeep) return difference;
  const { lamps, fans, keptLamps, keptFans } = difference;
  return { ...difference, lamps: lamps - keptLamps, fans: fans - keptFans, keptLamps: 0, keptFans: 0, keptOutlet: false, lampsToBackup: 0, fansToBackup: 0 };
}
