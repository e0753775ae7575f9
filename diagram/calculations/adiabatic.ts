import type { Curve, Insulation, Material } from '../practices/types';
import { requireNonNegative, requirePositive } from './requirements';
import { INSTANT, type OvercurrentDevice, tripBand } from './trip-curve';

/**
 * k in A s^0.5/mm2: core in a cable (BS 7671 Table 54.3) and separate conductor (Table 54.2), Certsure Pocket Guide 14;
 * aluminium in a cable and both with XLPE from memory.
 */
const K: Record<Material, Record<Insulation, { inCable: number; separate: number }>> = {
  Cu: { PVC: { inCable: 115, separate: 143 }, XLPE: { inCable: 143, separate: 176 } },
  Al: { PVC: { inCable: 76, separate: 95 }, XLPE: { inCable: 94, separate: 116 } },
};

export const kFactor = (material: Material, insulation: Insulation, inCable: boolean): number =>
  K[material][insulation][inCable ? 'inCable' : 'separate'];

/**
 * S >= sqrt(I2 t) / k.
 * @param energyA2s I2t, A2 s, >= 0
 * @returns mm2
 * @throws RangeError naming the field
 * @source IEC 60364-5-54 543.1.2, IEC 60364-4-43 434.5.2; 0.1 to 5 s, below it the let-through energy
 */
export function adiabaticMm2(energyA2s: number, k: number): number {
  requireNonNegative('energyA2s', energyA2s);
  requirePositive('k', k);
  return Math.sqrt(energyA2s) / k;
}

/** t = (k S / I)^2: how long a conductor withstands a current. @returns s @throws RangeError naming the field */
export function withstandS(input: { csaMm2: number; k: number; currentA: number }): number {
  requirePositive('csaMm2', input.csaMm2);
  requirePositive('k', input.k);
  requirePositive('currentA', input.currentA);
  return ((input.k * input.csaMm2) / input.currentA) ** 2;
}

/**
 * Let-through of energy class 3, A2 s, by prospective A: to 16 A and to 32 A, types B and C (EN 60898-1 Tables ZA.1 and
 * ZA.2, from memory).
 */
const CLASS_3: readonly { uptoA: number; B16: number; C16: number; B32: number; C32: number }[] = [
  { uptoA: 3000, B16: 15000, C16: 17000, B32: 18000, C32: 20000 },
  { uptoA: 6000, B16: 35000, C16: 42000, B32: 45000, C32: 55000 },
  { uptoA: 10000, B16: 70000, C16: 84000, B32: 90000, C32: 110000 },
];

function letThroughLimit(ratingA: number, curve: Curve, currentA: number): number {
  const row = CLASS_3.find(({ uptoA }) => currentA <= uptoA);
  if (!row || ratingA > 32 || curve === 'D') return Infinity;
  return row[`${curve}${ratingA <= 16 ? 16 : 32}`];
}

/**
 * I2t that a device lets through at a prospective current. Time by its latest opening; for the instantaneous trip of an
 * mcb one period, 20 ms, as published examples take it, and never more than its energy class allows.
 * @returns A2 s; Infinity where the device never opens
 * @throws RangeError naming the field
 */
export function letThroughA2s(device: OvercurrentDevice, currentA: number): number {
  const { latestS } = tripBand(device, currentA);
  if (device.kind === 'gG' || !Number.isFinite(latestS)) return currentA ** 2 * latestS;
  const curve = device.curve ?? 'C';
  if (currentA < INSTANT[curve].trips * device.ratingA) return currentA ** 2 * latestS;
  return Math.min(currentA ** 2 * 0.02, letThroughLimit(device.ratingA, curve, currentA));
}
