import { operatingCurrentA, type OvercurrentDevice } from './trip-curve';
import { requireFraction, requireNonNegative, requirePositive } from './requirements';

/** Zs = Ze + (R1 + R2). @returns ohm @throws RangeError naming the field */
export function loopOhm(loop: { zeOhm: number; r1Ohm: number; r2Ohm: number }): number {
  requireNonNegative('zeOhm', loop.zeOhm);
  requireNonNegative('r1Ohm', loop.r1Ohm);
  requireNonNegative('r2Ohm', loop.r2Ohm);
  return loop.zeOhm + loop.r1Ohm + loop.r2Ohm;
}

/**
 * The largest loop with which an overcurrent device still opens in time: Zs = Cmin U0 / Ia.
 * @param input.withinS s, the disconnection time asked for
 * @param input.cMin    voltage factor, 0.95; 1 for tables printed before 2015
 * @returns ohm, exact: printed tables round it to two places
 * @throws RangeError naming the field
 * @source BS 7671 411.4.4 and Table 41.3; IEC 60364-4-41 411.4.4
 */
export function maximumLoopOhm(input: {
  device: OvercurrentDevice;
  voltage: number;
  withinS: number;
  cMin: number;
}): number {
  requirePositive('voltage', input.voltage);
  requireFraction('cMin', input.cMin);
  return (input.cMin * input.voltage) / operatingCurrentA(input.device, input.withinS);
}

/**
 * What a cold measured loop may read on the test sheet: 80 % of the limit. @returns ohm @throws RangeError naming the
 * field
 */
export function measuredLimitOhm(limitOhm: number, share = 0.8): number {
  requirePositive('limitOhm', limitOhm);
  requireFraction('share', share);
  return limitOhm * share;
}
