import { LENGTH, POINTS_PER_WAY, POWER_FACTOR, ROOMS_PER_WAY, WAY_FILL, ratingFor } from './assumptions';
import { sizeRun } from './size-run';
import { label, runOf, type Segment, type WayPlan, type WaySupply } from './way-plan';

/** Ways of lamps and fans: within the practice's limits, two neighbouring rooms on one where they are small. */

interface Limit {
  points: number;
  watts: number;
}

const segmentWatts = ({ room, lamps, fans }: Segment): number =>
  lamps.length * room.lampWatts + fans.length * room.fanWatts;
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

/** m, from the board to the farthest point of a way of lamps, the longest row of lamps on one switch counted in. */
function lampsLength(segments: readonly Segment[]): number {
  const longestRow = Math.max(0, ...segments.map(({ lamps }) => Math.ceil(lamps.length / 2)));
  return (
    runOf(segments[0]!.room) +
    (segments.length - 1) * LENGTH.roomToRoom +
    LENGTH.boxToPoint +
    longestRow * LENGTH.pointToPoint
  );
}

function lampWay(segments: Segment[], kind: 'lamps' | 'backup', supply: WaySupply): Omit<WayPlan, 'number'> {
  const draft = supply.practice.draft[kind === 'lamps' ? 'lighting' : 'backup'];
  const amps = segments.reduce((sum, segment) => sum + segmentWatts(segment), 0) / (supply.voltage * POWER_FACTOR.lamp);
  const ratingA = ratingFor(amps, supply.practice.breakerRatingsA.value, draft.ratingA);
  const size = sizeRun({
    ...supply,
    ratingA,
    curve: draft.curve,
    amps,
    lengthM: lampsLength(segments),
    use: kind === 'lamps' ? 'lighting' : 'backup',
    leastMm2: draft.csaMm2,
  });
  const what = kind === 'lamps' ? (segments.some(({ fans }) => fans.length > 0) ? 'lamps, fans' : 'lamps') : 'backup';
  return { kind, label: label(segments, what), segments, ring: false, ratingA, curve: draft.curve, amps, size };
}

/** The ways that lamps and fans of the rooms ask for, in the order of the rooms. */
export function lampWays(
  rooms: readonly Segment[],
  kind: 'lamps' | 'backup',
  supply: WaySupply,
): Omit<WayPlan, 'number'>[] {
  const limit = lightingLimit(supply, supply.practice.draft[kind === 'lamps' ? 'lighting' : 'backup'].ratingA);
  const joined = joinRooms(
    rooms.map((room) => pieces(room, limit)),
    limit,
  );
  return joined.flatMap((segments) => {
    const way = lampWay(segments, kind, supply);
    return way.size || segments.length === 1 ? [way] : segments.map((segment) => lampWay([segment], kind, supply));
  });
}
