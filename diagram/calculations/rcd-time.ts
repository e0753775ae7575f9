import type { TripBand } from './trip-curve';
import { requireNonNegative, requirePositive } from './requirements';

export interface ResidualDevice {
  /** A, rated residual operating current */
  sensitivityA: number;
  delay?: 'none' | 'S';
}

/** Multiples of the sensitivity at which IEC 61008-1 sets the break times, with s at most and s at least (rcd.json). */
const STEPS = {
  none: [
    { from: 1, atMost: 0.3, atLeast: 0 },
    { from: 2, atMost: 0.15, atLeast: 0 },
    { from: 5, atMost: 0.04, atLeast: 0 },
  ],
  S: [
    { from: 1, atMost: 0.5, atLeast: 0.13 },
    { from: 2, atMost: 0.2, atLeast: 0.06 },
    { from: 5, atMost: 0.15, atLeast: 0.05 },
  ],
} as const;

/** Must not operate at or below this share of the sensitivity. */
export const NON_OPERATING = 0.5;
/** s: a device without delay needs about half a period; common practice */
const FASTEST_S = 0.01;

/**
 * The time in which a residual-current device opens on a sinusoidal residual current; the type AC, A, F or B makes no
 * difference to that. Between two multiples the time of the lower one stands, which is the safe reading.
 * @param residualA A rms, >= 0
 * @returns Infinity for both at half the sensitivity or less; between half and the whole it may open but need not
 * @throws RangeError naming sensitivityA or residualA
 * @source IEC 61008-1 Table 1
 */
export function rcdBand(device: ResidualDevice, residualA: number): TripBand {
  requirePositive('sensitivityA', device.sensitivityA);
  requireNonNegative('residualA', residualA);
  const multiple = residualA / device.sensitivityA;
  const steps = STEPS[device.delay ?? 'none'];
  if (multiple <= NON_OPERATING) return { earliestS: Infinity, latestS: Infinity };
  // A hair below a printed multiple is that multiple: 0.15 A over 0.03 A is 4.999... in binary.
  const step = [...steps].reverse().find(({ from }) => multiple >= from * (1 - 1e-9));
  return {
    earliestS: Math.max(FASTEST_S, (step ?? steps[0]).atLeast),
    latestS: step ? step.atMost : Infinity,
  };
}

/** s within which it opens at 5 times its sensitivity. */
export const rcdFastS = (delay: 'none' | 'S' = 'none'): number => STEPS[delay][2].atMost;

/** TT: RA IdN <= 50 V. @returns ohm, the largest RA @throws RangeError naming the field @source 411.5.3 */
export function maximumElectrodeOhm(sensitivityA: number, touchVolts = 50): number {
  requirePositive('sensitivityA', sensitivityA);
  requirePositive('touchVolts', touchVolts);
  return touchVolts / sensitivityA;
}

/** TT: the largest sensitivity an electrode allows. @returns A @throws RangeError naming the field @source 411.5.3 */
export function maximumSensitivityA(electrodeOhm: number, touchVolts = 50): number {
  requirePositive('electrodeOhm', electrodeOhm);
  requirePositive('touchVolts', touchVolts);
  return touchVolts / electrodeOhm;
}

/**
 * Standing earth leakage against the 30 % of the sensitivity that may flow in normal use.
 * @throws RangeError naming the field
 * @source BS 7671 531.3.2, from memory
 */
export function leakageBudget(sensitivityA: number, leakageA: number): { allowedA: number; holds: boolean } {
  requirePositive('sensitivityA', sensitivityA);
  requireNonNegative('leakageA', leakageA);
  const allowedA = 0.3 * sensitivityA;
  return { allowedA, holds: leakageA <= allowedA };
}
