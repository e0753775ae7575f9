import type { SurveyRoom } from '../../document/schema';
import type { Practice } from '../../practices/types';
import {
  LENGTH,
  OUTLETS_PER_RADIAL,
  OUTLETS_PER_RING,
  OUTLET_WATTS,
  POINTS_PER_WAY,
  POWER_FACTOR,
  RING_FROM,
  ROOMS_PER_WAY,
  WAY_FILL,
  ratingFor,
  startsMotor,
} from './assumptions';
import { sizeRun, type RunSize } from './size-run';
import { USUAL_RUN } from '../columns';

/** What is to be drawn in a room: numbers of lamps, fans and outlets that its parts are called by, from 1. */
export interface Wish {
  room: SurveyRoom;
  lamps: number[];
  fans: number[];
  outlets: number[];
  heavy: { number: number; what: string; watts: number }[];
  /** of these, what stays on in an outage, besides the ones above */
  keptLamps: number[];
  keptFans: number[];
  keptOutlet: boolean;
}

/** What of one room hangs on one way. */
export interface Segment {
  room: SurveyRoom;
  lamps: number[];
  fans: number[];
  outlets: number[];
}

export type WayKind = 'lamps' | 'outlets' | 'heavy' | 'backup' | 'backup-outlet';

/** A way before it is drawn. */
export interface WayPlan {
  kind: WayKind;
  /** running number among the ways of this kind that begin in the same room, from 1 */
  number: number;
  label: string;
  segments: Segment[];
  /** of a heavy appliance's own way */
  heavy?: Wish['heavy'][number];
  ring: boolean;
  ratingA: number;
  curve: 'B' | 'C' | 'D';
  /** A, all of it at once */
  amps: number;
  /** null where no cable on sale serves it: the way is too long for its load */
  size: RunSize | null;
}

export const isBackup = ({ kind }: Pick<WayPlan, 'kind'>): boolean => kind === 'backup' || kind === 'backup-outlet';

export interface WaySupply {
  practice: Practice;
  voltage: number;
  ambientC: number;
}

export interface Limit {
  points: number;
  watts: number;
}

/** Whole numbers from one to another, both counted. */
export const numbers = (from: number, to: number): number[] => Array.from({ length: Math.max(0, to - from + 1) }, (_, i) => from + i);

/** All of a room, as a draft from nothing draws it: what stays on has the first numbers. */
export const wholeRoom = (room: SurveyRoom): Wish => ({
  room,
  lamps: numbers(room.keepLamps + 1, room.lamps),
  fans: numbers(room.keepFans + 1, room.fans),
  outlets: numbers(1, room.outlets),
  heavy: room.heavy.map((item, i) => ({ number: i + 1, ...item })),
  keptLamps: numbers(1, room.keepLamps),
  keptFans: numbers(1, room.keepFans),
  keptOutlet: room.keepOutletWatts > 0,
});

export const segmentWatts = ({ room, lamps, fans }: Segment): number => lamps.length * room.lampWatts + fans.length * room.fanWatts;
const pointsOf = ({ lamps, fans }: Segment): number => lamps.length + fans.length;
const fits = (segments: readonly Segment[], limit: Limit): boolean =>
  segments.reduce((sum, segment) => sum + pointsOf(segment), 0) <= limit.points &&
  segments.reduce((sum, segment) => sum + segmentWatts(segment), 0) <= limit.watts;

/** Points and watts of one way of lamps and fans. */
export function lightingLimit({ practice, voltage }: WaySupply, ratingA: number): Limit {
  const stated = practice.pointsLimits.find(({ value }) => value.of === 'lighting')?.value;
  const watts = WAY_FILL * ratingA * voltage * POWER_FACTOR.lamp;
  return { points: stated?.points ?? POINTS_PER_WAY, watts: Math.min(watts, stated?.watts ?? watts) };
}

/** Cuts a room's lamps and fans into pieces within the limit; one point above it stands alone. */
function pieces(whole: Segment, limit: Limit): Segment[] {
  const done: Segment[] = [];
  let open: Segment = { room: whole.room, lamps: [], fans: [], outlets: [] };
  const add = (list: 'lamps' | 'fans', number: number) => {
    const grown = { ...open, [list]: [...open[list], number] };
    if (pointsOf(open) > 0 && !fits([grown], limit)) {
      done.push(open);
      open = { ...open, lamps: [], fans: [], [list]: [number] };
    } else open = grown;
  };
  for (const lamp of whole.lamps) add('lamps', lamp);
  for (const fan of whole.fans) add('fans', fan);
  return pointsOf(open) > 0 ? [...done, open] : done;
}

/** Joins the last piece of a room with the first of the next while both stay within the limit: two rooms on a way. */
function joinRooms(rooms: readonly Segment[][], limit: Limit): Segment[][] {
  const ways: Segment[][] = [];
  for (const [first, ...rest] of rooms) {
    if (!first) continue;
    const last = ways[ways.length - 1];
    if (last && last.length < ROOMS_PER_WAY && fits([...last, first], limit)) last.push(first);
    else ways.push([first]);
    for (const piece of rest) ways.push([piece]);
  }
  return ways;
}

const names = (segments: readonly Segment[]): string => segments.map(({ room }) => room.name.trim()).join(' and ');
const label = (segments: readonly Segment[], what: string): string => `${names(segments).slice(0, 79 - what.length)} ${what}`;

/** m, from the board to the farthest point of a way of lamps, the longest row of lamps on one switch counted in. */
function lampsLength(segments: readonly Segment[]): number {
  const longestRow = Math.max(0, ...segments.map(({ lamps }) => Math.ceil(lamps.length / 2)));
  return runOf(segments[0]!.room) + (segments.length - 1) * LENGTH.roomToRoom + LENGTH.boxToPoint + longestRow * LENGTH.pointToPoint;
}

export const runOf = (room: SurveyRoom): number => room.run ?? USUAL_RUN;

function lampWay(segments: Segment[], kind: 'lamps' | 'backup', supply: WaySupply): Omit<WayPlan, 'number'> {
  const draft = supply.practice.draft[kind === 'lamps' ? 'lighting' : 'backup'];
  const amps = segments.reduce((sum, segment) => sum + segmentWatts(segment), 0) / (supply.voltage * POWER_FACTOR.lamp);
  const ratingA = ratingFor(amps, supply.practice.breakerRatingsA.value, draft.ratingA);
  const size = sizeRun({ ...supply, ratingA, curve: draft.curve, amps, lengthM: lampsLength(segments), use: kind === 'lamps' ? 'lighting' : 'backup', leastMm2: draft.csaMm2 });
  const what = kind === 'lamps' ? (segments.some(({ fans }) => fans.length > 0) ? 'lamps, fans' : 'lamps') : 'backup';
  return { kind, label: label(segments, what), segments, ring: false, ratingA, curve: draft.curve, amps, size };
}

function lampWays(rooms: readonly Segment[], kind: 'lamps' | 'backup', supply: WaySupply): Omit<WayPlan, 'number'>[] {
  const limit = lightingLimit(supply, supply.practice.draft[kind === 'lamps' ? 'lighting' : 'backup'].ratingA);
  const joined = joinRooms(rooms.map((room) => pieces(room, limit)), limit);
  return joined.flatMap((segments) => {
    const way = lampWay(segments, kind, supply);
    return way.size || segments.length === 1 ? [way] : segments.map((segment) => lampWay([segment], kind, supply));
  });
}

/** The rating of an ordinary outlet in the practice, A. */
export function outletPattern(practice: Practice, watts: number, voltage: number): { id: string; ratingA: number } {
  const usual = practice.sockets.find(({ id }) => id === practice.draft.socket)!;
  const heavy = practice.sockets.find(({ id }) => id === practice.draft.heavySocket)!;
  return watts <= usual.ratingA * voltage ? usual : heavy;
}

/** m, along a row of outlets. */
const outletsLength = (room: SurveyRoom, count: number): number => runOf(room) + (count - 1) * LENGTH.outletToOutlet;

function outletWays({ room, outlets: wanted }: Wish, supply: WaySupply): Omit<WayPlan, 'number'>[] {
  const { practice } = supply;
  const draft = practice.draft.outlets;
  const ring = practice.ring?.value;
  const asRing = ring !== undefined && wanted.length >= RING_FROM;
  const most = asRing ? OUTLETS_PER_RING : OUTLETS_PER_RADIAL;
  const ways = Math.ceil(wanted.length / most);
  return numbers(1, ways).map((way) => {
    const outlets = wanted.slice(Math.floor(((way - 1) * wanted.length) / ways), Math.floor((way * wanted.length) / ways));
    const amps = (outlets.length * OUTLET_WATTS) / supply.voltage;
    const segments = [{ room, lamps: [], fans: [], outlets }];
    const common = { kind: 'outlets' as const, label: label(segments, asRing ? 'outlets, ring' : 'outlets'), segments, ring: asRing, curve: draft.curve, amps };
    const lengthM = outletsLength(room, outlets.length);
    if (!asRing) {
      const size = sizeRun({ ...supply, ratingA: draft.ratingA, curve: draft.curve, amps, lengthM, use: 'other', leastMm2: draft.csaMm2 });
      return { ...common, ratingA: draft.ratingA, size };
    }
    // A leg carries less than the device's rating: BS 7671 433.1.204, the figures are the practice's data.
    const size = sizeRun({ ...supply, ratingA: ring.legIzAtLeastA, curve: draft.curve, amps, lengthM, use: 'other', leastMm2: ring.legCsaMm2 });
    return { ...common, ratingA: ring.deviceA, size };
  });
}

function heavyWays({ room, heavy }: Wish, supply: WaySupply): Omit<WayPlan, 'number'>[] {
  const draft = supply.practice.draft.heavy;
  return heavy.map((item) => {
    const { what, watts } = item;
    const motor = startsMotor(what);
    const amps = watts / (supply.voltage * (motor ? POWER_FACTOR.motor : POWER_FACTOR.heater));
    const ratingA = ratingFor(amps, supply.practice.breakerRatingsA.value, draft.ratingA);
    const curve = motor ? 'C' : draft.curve;
    const segments = [{ room, lamps: [], fans: [], outlets: [] }];
    const size = sizeRun({ ...supply, ratingA, curve, amps, lengthM: runOf(room) + LENGTH.switchToAppliance, use: 'other', leastMm2: draft.csaMm2 });
    return { kind: 'heavy', label: label(segments, what), segments, heavy: item, ring: false, ratingA, curve, amps, size };
  });
}

function backupOutletWay({ room, keptOutlet }: Wish, supply: WaySupply): Omit<WayPlan, 'number'>[] {
  if (!keptOutlet) return [];
  const { practice, voltage } = supply;
  const pattern = outletPattern(practice, room.keepOutletWatts, voltage);
  const amps = room.keepOutletWatts / voltage;
  const draft = pattern.ratingA > practice.draft.backup.ratingA ? practice.draft.outlets : practice.draft.backup;
  const ratingA = ratingFor(Math.max(amps, pattern.ratingA), practice.breakerRatingsA.value, practice.draft.backup.ratingA);
  const size = sizeRun({ ...supply, ratingA, curve: draft.curve, amps, lengthM: runOf(room), use: 'backup', leastMm2: draft.csaMm2 });
  const segments = [{ room, lamps: [], fans: [], outlets: [1] }];
  return [{ kind: 'backup-outlet', label: label(segments, 'outlet, backup'), segments, ring: false, ratingA, curve: draft.curve, amps, size }];
}

/** Numbers the ways of one kind that begin in the same room, leaving out numbers that are taken. */
function numbered(ways: readonly Omit<WayPlan, 'number'>[], taken: (way: WayPlan) => boolean): WayPlan[] {
  const last = new Map<string, number>();
  return ways.map((way) => {
    const key = `${way.segments[0]!.room.id} ${way.kind}`;
    let number = (last.get(key) ?? 0) + 1;
    while (taken({ ...way, number })) number++;
    last.set(key, number);
    return { ...way, number };
  });
}

/**
 * The ways that wishes ask for, within the practice's limits: mains ways room by room (lamps and fans, outlets, heavy
 * appliances), then backup ways. Small ways of lamps serve two neighbouring rooms; a heavy appliance has its own way.
 * @param taken true for a way that is drawn already
 */
export function planWays(wishes: readonly Wish[], supply: WaySupply, taken: (way: WayPlan) => boolean = () => false): WayPlan[] {
  const none = { outlets: [] };
  const mains = wishes.map(({ room, lamps, fans }) => ({ room, lamps, fans, ...none }));
  const kept = wishes.map(({ room, keptLamps, keptFans }) => ({ room, lamps: keptLamps, fans: keptFans, ...none }));
  const lamps = lampWays(mains, 'lamps', supply);
  const backup = lampWays(kept, 'backup', supply);
  const startingIn = (ways: readonly Omit<WayPlan, 'number'>[], { room }: Wish) => ways.filter(({ segments }) => segments[0]!.room.id === room.id);
  return numbered(
    [
      ...wishes.flatMap((wish) => [...startingIn(lamps, wish), ...outletWays(wish, supply), ...heavyWays(wish, supply)]),
      ...wishes.flatMap((wish) => [...startingIn(backup, wish), ...backupOutletWay(wish, supply)]),
    ],
    taken,
  );
}
