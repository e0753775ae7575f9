import { letThroughA2s } from './adiabatic';
import { requireNonNegative, requirePositive } from './requirements';
import { INSTANT, tripBand, type OvercurrentDevice } from './trip-curve';
import type { ResidualDevice } from './rcd-time';

/**
 * Least ratio of ratings at which two overcurrent devices in series are taken as selective on overload: common practice
 * for gG, 1.6.
 */
export const LEAST_RATIO = 1.6;

export interface Selectivity {
  ratio: number;
  ratioHolds: boolean;
  /** A, above which both may open; Infinity where the upper one never opens with the lower */
  uptoA: number;
  /** true when a fault of `faultA` opens the lower device alone */
  alone: boolean;
}

const PRE_ARCING_AT = 0.1;

/** A from which the upper device may open although the lower one clears. */
function limitA(upper: OvercurrentDevice, lower: OvercurrentDevice): number {
  if (upper.kind === 'mcb') return INSTANT[upper.curve ?? 'C'].holds * upper.ratingA;
  // A fuse holds while what the lower device lets through stays below its own pre-arcing I2t, taken at its 0.1 s gate.
  let holdA = upper.ratingA;
  while (tripBand(upper, holdA).earliestS > PRE_ARCING_AT) holdA *= 1.01;
  const preArcing = holdA ** 2 * PRE_ARCING_AT;
  for (let currentA = holdA / 2; currentA < 10_000; currentA *= 1.02)
    if (
      letThroughA2s(lower, currentA) > preArcing &&
      tripBand(upper, currentA).earliestS <= tripBand(lower, currentA).latestS
    )
      return currentA;
  return Infinity;
}

/**
 * Two overcurrent devices in series: does a fault after the lower one leave the upper one closed?
 * @param faultA A, the fault at the far end; 0 judges overload only
 * @throws RangeError naming the field
 */
export function selectivity(upper: OvercurrentDevice, lower: OvercurrentDevice, faultA: number): Selectivity {
  requirePositive('upper.ratingA', upper.ratingA);
  requirePositive('lower.ratingA', lower.ratingA);
  requireNonNegative('faultA', faultA);
  const ratio = upper.ratingA / lower.ratingA;
  const uptoA = limitA(upper, lower);
  const ratioHolds = ratio >= LEAST_RATIO;
  return { ratio, ratioHolds, uptoA, alone: ratioHolds && faultA < uptoA };
}

/**
 * Two residual-current devices in series: the upper of type S with at least 3 times the sensitivity.
 * @source BS 7671 536.4.1.4, from memory
 */
export function residualSelective(upper: ResidualDevice, lower: ResidualDevice): boolean {
  requirePositive('upper.sensitivityA', upper.sensitivityA);
  requirePositive('lower.sensitivityA', lower.sensitivityA);
  return upper.delay === 'S' && lower.delay !== 'S' && upper.sensitivityA >= 3 * lower.sensitivityA * (1 - 1e-9);
}

export interface CurvePoint {
  currentA: number;
  earliestS: number;
  latestS: number;
}

/**
 * Points of a device's band for a log-log picture; leaves out currents at which it may hold for ever.
 * @throws RangeError naming the field
 */
export function bandPoints(device: OvercurrentDevice, fromA: number, toA: number, perDecade = 40): CurvePoint[] {
  requirePositive('fromA', fromA);
  requirePositive('toA', toA);
  requirePositive('perDecade', perDecade);
  const points: CurvePoint[] = [];
  for (let i = Math.ceil(Math.log10(fromA) * perDecade); i <= Math.log10(toA) * perDecade; i += 1) {
    const currentA = 10 ** (i / perDecade);
    const band = tripBand(device, currentA);
    if (Number.isFinite(band.latestS) || Number.isFinite(band.earliestS)) points.push({ currentA, ...band });
  }
  return points;
}
