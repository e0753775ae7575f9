import type { Curve } from '../practices/types';
import { requireNonNegative, requirePositive } from './requirements';

/** When a device opens: never before `earliestS`, never after `latestS`; Infinity where it may hold for ever. */
export interface TripBand {
  earliestS: number;
  latestS: number;
}

export interface OvercurrentDevice {
  /** an rcbo trips on overcurrent as an mcb */
  kind: 'mcb' | 'gG';
  ratingA: number;
  /** of an mcb; C where the drawing does not say */
  curve?: Curve;
}

/**
 * Instantaneous band in multiples of In: holds at the lower, opens within 0.1 s at the upper (IEC 60898-1; sources in
 * mcb.json).
 */
export const INSTANT: Record<Curve, { holds: number; trips: number }> = {
  B: { holds: 3, trips: 5 },
  C: { holds: 5, trips: 10 },
  D: { holds: 10, trips: 20 },
};

/**
 * IEC 60898-1: 1.13 In must not trip within the conventional time, 1.45 In must (seen); 2.55 In within 1 to 60 s (from
 * memory).
 */
export const HOLDS_FOREVER = 1.13;
export const TRIPS_IN_TIME = 1.45;
const TEST = 2.55;
/** s: the shortest opening; half a period at 50 Hz, common practice */
export const FASTEST_S = 0.01;
/** s: the upper multiple trips within this */
export const INSTANT_S = 0.1;

const conventionalS = (ratingA: number) => (ratingA <= 63 ? 3600 : 7200);

/** The straight line through two points of a log-log chart. */
function logLog(x: number, [x1, y1]: readonly [number, number], [x2, y2]: readonly [number, number]): number {
  return y1 * Math.exp((Math.log(x / x1) * Math.log(y2 / y1)) / Math.log(x2 / x1));
}

/**
 * Band of a miniature circuit-breaker from cold. Between the points of IEC 60898-1 Table 7 a straight line on the
 * log-log
 * chart; beyond 2.55 In at constant I2t, which meets the table's 45 s at 3 In, 15 s at 5 In, 4 s at 10 In (from
 * memory).
 */
function mcbBand(multiple: number, ratingA: number, curve: Curve): TripBand {
  const { holds, trips } = INSTANT[curve];
  const latestAtTest = ratingA <= 32 ? 60 : 120;
  const conventional = conventionalS(ratingA);
  const thermal = (from: number, at: number): number => {
    if (multiple < from) return Infinity;
    if (multiple <= TEST) return logLog(multiple, [from, conventional], [TEST, at]);
    return at * (TEST / multiple) ** 2;
  };
  return {
    earliestS: multiple >= holds ? FASTEST_S : Math.max(INSTANT_S, thermal(HOLDS_FOREVER, 1)),
    latestS: multiple >= trips ? INSTANT_S : thermal(TRIPS_IN_TIME, latestAtTest),
  };
}

/**
 * Gates of gG fuse-links, IEC 60269-1 Table 3 (from memory): A that hold 10 s, that melt within 5 s, that hold 0.1 s,
 * that
 * melt within 0.1 s. Below 16 A the table leaves the gates to the maker: the multiples of the 16 A link stand in.
 */
const GATES: readonly (readonly [ratingA: number, hold10: number, melt5: number, hold01: number, melt01: number])[] = [
  [16, 33, 65, 85, 150],
  [20, 42, 85, 110, 200],
  [25, 52, 110, 150, 260],
  [32, 75, 150, 200, 350],
  [40, 95, 190, 260, 450],
  [50, 125, 250, 350, 610],
  [63, 160, 320, 450, 820],
  [80, 215, 425, 610, 1100],
  [100, 290, 580, 820, 1450],
  [125, 355, 715, 1100, 1910],
  [160, 460, 950, 1450, 2590],
];

function gates(ratingA: number): [number, number, number, number] {
  const first = GATES[0]!;
  const last = GATES[GATES.length - 1]!;
  const exact = GATES.find((row) => row[0] >= ratingA) ?? last;
  const base = ratingA < first[0] ? first : exact;
  const scale = ratingA < first[0] || ratingA > last[0] ? ratingA / base[0] : 1;
  return [base[1] * scale, base[2] * scale, base[3] * scale, base[4] * scale];
}

function fuseBand(currentA: number, ratingA: number): TripBand {
  const [hold10, melt5, hold01, melt01] = gates(ratingA);
  const earliest = (): number => {
    if (currentA < 1.25 * ratingA) return Infinity;
    if (currentA < hold10) return logLog(currentA, [1.25 * ratingA, conventionalS(ratingA)], [hold10, 10]);
    return Math.max(0.001, logLog(currentA, [hold10, 10], [hold01, 0.1]));
  };
  const latest = (): number => {
    if (currentA < 1.6 * ratingA) return Infinity;
    if (currentA < melt5) return logLog(currentA, [1.6 * ratingA, conventionalS(ratingA)], [melt5, 5]);
    return Math.max(FASTEST_S, logLog(currentA, [melt5, 5], [melt01, 0.1]));
  };
  return { earliestS: earliest(), latestS: latest() };
}

/**
 * The time in which an overcurrent device opens at a steady current.
 * @param currentA A rms, >= 0
 * @returns the band; both Infinity below its conventional non-tripping current
 * @throws RangeError naming ratingA or currentA
 */
export function tripBand(device: OvercurrentDevice, currentA: number): TripBand {
  requirePositive('ratingA', device.ratingA);
  requireNonNegative('currentA', currentA);
  if (currentA === 0) return { earliestS: Infinity, latestS: Infinity };
  return device.kind === 'gG'
    ? fuseBand(currentA, device.ratingA)
    : mcbBand(currentA / device.ratingA, device.ratingA, device.curve ?? 'C');
}

/**
 * Ia: the least current that surely opens the device within `withinS`.
 * An mcb takes its instantaneous limit 5, 10, 20 In; within 5 s or longer a type D takes 10 In, as BS 7671 Table
 * 41.3(c) does.
 * @returns A
 * @throws RangeError naming the field
 */
export function operatingCurrentA(device: OvercurrentDevice, withinS: number): number {
  requirePositive('ratingA', device.ratingA);
  requirePositive('withinS', withinS);
  if (device.kind === 'mcb') {
    const curve = device.curve ?? 'C';
    return (curve === 'D' && withinS >= 5 ? 10 : INSTANT[curve].trips) * device.ratingA;
  }
  const [, melt5, , melt01] = gates(device.ratingA);
  if (withinS >= 5) return melt5;
  if (withinS <= 0.1) return melt01;
  return Math.exp(Math.log(melt5) + (Math.log(melt01 / melt5) * Math.log(withinS / 5)) / Math.log(0.1 / 5));
}
