import { withstandS } from '../calculations/adiabatic';
import { requirePositive } from '../calculations/requirements';
import { HOLDS_FOREVER, INSTANT, TRIPS_IN_TIME, tripBand, type OvercurrentDevice } from '../calculations/trip-curve';

/** s, the picture's own range */
export const FASTEST_S = 0.01;
export const SLOWEST_S = 10_000;
/** s between which a short circuit heats the copper alone: IEC 60364-4-43 434.5.2 */
export const ADIABATIC_UP_TO_S = 5;

export interface BandPoint {
  currentA: number;
  /** s, never before; cut to the picture */
  earliestS: number;
  /** s, never after; cut to the picture */
  latestS: number;
}

const cut = (seconds: number): number => Math.min(SLOWEST_S, Math.max(FASTEST_S, seconds));
const PER_DECADE = 30;

function currents(device: OvercurrentDevice, fromA: number, toA: number): number[] {
  const grid: number[] = [];
  for (let i = Math.floor(Math.log10(fromA) * PER_DECADE); i <= Math.ceil(Math.log10(toA) * PER_DECADE); i++)
    grid.push(10 ** (i / PER_DECADE));
  if (device.kind === 'mcb') {
    const { holds, trips } = INSTANT[device.curve ?? 'C'];
    // On either side of each jump, so that it stands upright.
    for (const multiple of [HOLDS_FOREVER, TRIPS_IN_TIME, 2.55, holds, trips])
      grid.push(device.ratingA * multiple * (1 - 1e-6), device.ratingA * multiple);
  }
  return grid.filter((currentA) => currentA >= fromA && currentA <= toA).sort((a, b) => a - b);
}

/**
 * The band of a device for a log-log picture, from the least current at which it may open; at its jumps there are two points.
 * @throws RangeError naming the field
 */
export function bandFor(device: OvercurrentDevice, fromA: number, toA: number): BandPoint[] {
  requirePositive('fromA', fromA);
  requirePositive('toA', toA);
  return currents(device, fromA, toA).flatMap((currentA) => {
    const { earliestS, latestS } = tripBand(device, currentA);
    return Number.isFinite(earliestS) ? [{ currentA, earliestS: cut(earliestS), latestS: cut(latestS) }] : [];
  });
}

export interface WithstandPoint {
  currentA: number;
  seconds: number;
}

/**
 * How long a conductor withstands a current, t = (k S / I)^2, as a straight line of the log-log picture. Up to 5 s no heat
 * leaves the copper; beyond, the line is on the safe side.
 * @throws RangeError naming the field
 * @source IEC 60364-4-43 434.5.2
 */
export function withstandLine(conductor: { csaMm2: number; k: number }, fromS: number, toS: number): WithstandPoint[] {
  requirePositive('fromS', fromS);
  requirePositive('toS', toS);
  const { csaMm2, k } = conductor;
  return [toS, Math.sqrt(fromS * toS), fromS].map((seconds) => {
    const currentA = (k * csaMm2) / Math.sqrt(seconds);
    return { currentA, seconds: withstandS({ csaMm2, k, currentA }) };
  });
}
