import { requireCount, requireFraction, requireNonNegative, requirePositive } from './requirements';

/**
 * One driven rod: R = rho / (2 pi L) (ln(8 L / d) - 1).
 * @param rod.resistivityOhmM ohm m of the soil
 * @param rod.lengthM         m in the soil
 * @param rod.diameterM       m, less than 8 L / e
 * @returns ohm
 * @throws RangeError naming the field
 * @source BS 7430 clause 9.5.3 (form), from memory
 */
export function rodOhm(rod: { resistivityOhmM: number; lengthM: number; diameterM: number }): number {
  requirePositive('resistivityOhmM', rod.resistivityOhmM);
  requirePositive('lengthM', rod.lengthM);
  requirePositive('diameterM', rod.diameterM);
  if (rod.diameterM >= rod.lengthM)
    throw new RangeError(`diameterM is ${rod.diameterM}: a rod is thinner than it is long`);
  return (rod.resistivityOhmM / (2 * Math.PI * rod.lengthM)) * (Math.log((8 * rod.lengthM) / rod.diameterM) - 1);
}

/**
 * n equal rods in parallel; their fields overlap, so that they give `efficiency` of what n separate ones would.
 * @returns ohm
 * @throws RangeError naming the field
 */
export function rodsOhm(rods: { oneOhm: number; count: number; efficiency: number }): number {
  requirePositive('oneOhm', rods.oneOhm);
  requireCount('count', rods.count);
  requireFraction('efficiency', rods.efficiency);
  return rods.oneOhm / (rods.count * (rods.count === 1 ? 1 : rods.efficiency));
}

/**
 * The metalwork's voltage to true earth while a current flows through the electrode. @returns V @throws RangeError
 * naming the field
 */
export function electrodeVolts(fault: { currentA: number; electrodeOhm: number }): number {
  requireNonNegative('currentA', fault.currentA);
  requireNonNegative('electrodeOhm', fault.electrodeOhm);
  return fault.currentA * fault.electrodeOhm;
}
