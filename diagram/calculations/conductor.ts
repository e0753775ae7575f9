import type { Insulation, Material } from '../practices/types';
import { requireNonNegative, requirePositive, requireWithin } from './requirements';

/**
 * Maximum d.c. resistance at 20 degC, ohm/km, IEC 60228 class 1 and 2 (cable maker pages; all agree).
 * From memory: copper of 50 mm2 and more, aluminium of less than 10 and more than 50 mm2.
 */
const CLASS_1_2: Record<Material, Readonly<Record<string, number>>> = {
  Cu: {
    1: 18.1,
    1.5: 12.1,
    2.5: 7.41,
    4: 4.61,
    6: 3.08,
    10: 1.83,
    16: 1.15,
    25: 0.727,
    35: 0.524,
    50: 0.387,
    70: 0.268,
    95: 0.193,
  },
  Al: { 2.5: 12.1, 4: 7.41, 6: 4.61, 10: 3.08, 16: 1.91, 25: 1.2, 35: 0.868, 50: 0.641, 70: 0.443, 95: 0.32 },
};

/** The same of flexible copper, IEC 60228 class 5. */
const CLASS_5_CU: Readonly<Record<string, number>> = {
  0.5: 39,
  0.75: 26,
  1: 19.5,
  1.5: 13.3,
  2.5: 7.98,
  4: 4.95,
  6: 3.3,
  10: 1.91,
  16: 1.21,
  25: 0.78,
  35: 0.554,
};

/** ohm mm2/m at 20 degC: IEC 60028 (1/58) and IEC 60287-1-1, from memory; only for sizes outside the printed table. */
const RESISTIVITY: Record<Material, number> = { Cu: 0.017241, Al: 0.028264 };

/** 1/K at 20 degC, IEC 60228 annex B / IEC 60287-1-1, from memory. */
export const ALPHA_20: Record<Material, number> = { Cu: 0.00393, Al: 0.00403 };

/** degC, what the insulation may stand in normal use: IEC 60364-5-52 Table 52.1. */
export const LIMIT_C: Record<Insulation, number> = { PVC: 70, XLPE: 90 };

/**
 * Maximum d.c. resistance of one conductor at 20 degC.
 * Sizes that are not printed take resistivity over area and 7 % more, by which the printed maxima of copper exceed it
 * at most.
 * @returns ohm/m
 * @throws RangeError naming csaMm2
 */
export function resistance20OhmPerM(csaMm2: number, material: Material, conductorClass: 2 | 5 = 2): number {
  requirePositive('csaMm2', csaMm2);
  const printed = conductorClass === 5 && material === 'Cu' ? CLASS_5_CU[csaMm2] : CLASS_1_2[material][csaMm2];
  if (printed !== undefined) return printed / 1000;
  return (RESISTIVITY[material] / csaMm2) * 1.07;
}

/**
 * R(t) = R20 (1 + alpha (t - 20)).
 * @returns the factor on the resistance at 20 degC; 1.1965 for copper at 70 degC (handbooks round to 1.20)
 * @throws RangeError naming temperatureC
 */
export function temperatureFactor(temperatureC: number, material: Material): number {
  requireWithin('temperatureC', temperatureC, -40, 400);
  return 1 + ALPHA_20[material] * (temperatureC - 20);
}

/**
 * Resistance of one conductor of a run.
 * @param run.csaMm2       mm2, > 0
 * @param run.lengthM      m, one way, >= 0
 * @param run.temperatureC degC of the conductor
 * @returns ohm
 * @throws RangeError naming the field
 */
export function conductorOhm(run: {
  csaMm2: number;
  lengthM: number;
  temperatureC: number;
  material: Material;
  conductorClass?: 2 | 5;
}): number {
  requireNonNegative('lengthM', run.lengthM);
  return (
    resistance20OhmPerM(run.csaMm2, run.material, run.conductorClass) *
    temperatureFactor(run.temperatureC, run.material) *
    run.lengthM
  );
}
