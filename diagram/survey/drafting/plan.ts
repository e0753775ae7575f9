import type { SurveyRoom } from '../../document/schema';
import type { Practice } from '../../practices/types';
import {
  LENGTH,
  OUTLETS_PER_RADIAL,
  OUTLETS_PER_RING,
  OUTLET_WATTS,
  POWER_FACTOR,
  RING_FROM,
  ratingFor,
  startsMotor,
} from './assumptions';
import { lampWays } from './plan-lamps';
import { sizeRun } from './size-run';
import { label, runOf, type WayPlan, type WaySupply } from './way-plan';
import { numbers, type Wish } from './wish';

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
    const outlets = wanted.slice(
      Math.floor(((way - 1) * wanted.length) / ways),
      Math.floor((way * wanted.length) / ways),
    );
    const amps = (outlets.length * OUTLET_WATTS) / supply.voltage;
    const segments = [{ room, lamps: [], fans: [], outlets }];
    const common = {
      kind: 'outlets' as const,
      label: label(segments, asRing ? 'outlets, ring' : 'outlets'),
      segments,
      ring: asRing,
      curve: draft.curve,
      amps,
    };
    const lengthM = outletsLength(room, outlets.length);
    if (!asRing) {
      const size = sizeRun({
        ...supply,
        ratingA: draft.ratingA,
        curve: draft.curve,
        amps,
        lengthM,
        use: 'other',
        leastMm2: draft.csaMm2,
      });
      return { ...common, ratingA: draft.ratingA, size };
    }
    // A leg carries less than the device's rating: BS 7671 433.1.204, the figures are the practice's data.
    const size = sizeRun({
      ...supply,
      ratingA: ring.legIzAtLeastA,
      curve: draft.curve,
      amps,
      lengthM,
      use: 'other',
      leastMm2: ring.legCsaMm2,
    });
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
    const size = sizeRun({
      ...supply,
      ratingA,
      curve,
      amps,
      lengthM: runOf(room) + LENGTH.switchToAppliance,
      use: 'other',
      leastMm2: draft.csaMm2,
    });
    return {
      kind: 'heavy',
      label: label(segments, what),
      segments,
      heavy: item,
      ring: false,
      ratingA,
      curve,
      amps,
      size,
    };
  });
}

function backupOutletWay({ room, keptOutlet }: Wish, supply: WaySupply): Omit<WayPlan, 'number'>[] {
  if (!keptOutlet) return [];
  const { practice, voltage } = supply;
  const pattern = outletPattern(practice, room.keepOutletWatts, voltage);
  const amps = room.keepOutletWatts / voltage;
  const draft = pattern.ratingA > practice.draft.backup.ratingA ? practice.draft.outlets : practice.draft.backup;
  const ratingA = ratingFor(
    Math.max(amps, pattern.ratingA),
    practice.breakerRatingsA.value,
    practice.draft.backup.ratingA,
  );
  const size = sizeRun({
    ...supply,
    ratingA,
    curve: draft.curve,
    amps,
    lengthM: runOf(room),
    use: 'backup',
    leastMm2: draft.csaMm2,
  });
  const segments = [{ room, lamps: [], fans: [], outlets: [1] }];
  return [
    {
      kind: 'backup-outlet',
      label: label(segments, 'outlet, backup'),
      segments,
      ring: false,
      ratingA,
      curve: draft.curve,
      amps,
      size,
    },
  ];
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
export function planWays(
  wishes: readonly Wish[],
  supply: WaySupply,
  taken: (way: WayPlan) => boolean = () => false,
): WayPlan[] {
  const none = { outlets: [] };
  const mains = wishes.map(({ room, lamps, fans }) => ({ room, lamps, fans, ...none }));
  const kept = wishes.map(({ room, keptLamps, keptFans }) => ({ room, lamps: keptLamps, fans: keptFans, ...none }));
  const lamps = lampWays(mains, 'lamps', supply);
  const backup = lampWays(kept, 'backup', supply);
  const startingIn = (ways: readonly Omit<WayPlan, 'number'>[], { room }: Wish) =>
    ways.filter(({ segments }) => segments[0]!.room.id === room.id);
  return numbered(
    [
      ...wishes.flatMap((wish) => [
        ...startingIn(lamps, wish),
        ...outletWays(wish, supply),
        ...heavyWays(wish, supply),
      ]),
      ...wishes.flatMap((wish) => [...startingIn(backup, wish), ...backupOutletWay(wish, supply)]),
    ],
    taken,
  );
}
