import { requireFraction, requireNonNegative, requirePositive } from './requirements';

/**
 * Ib = P / (U pf) of one load.
 * @param load.watts   W, >= 0
 * @param load.voltage V, line to neutral
 * @param load.pf      above 0, at most 1; 1 where not given
 * @returns A
 * @throws RangeError naming the field
 */
export function designCurrentA(load: { watts: number; voltage: number; pf?: number }): number {
  requireNonNegative('watts', load.watts);
  requirePositive('voltage', load.voltage);
  if (load.pf !== undefined) requireFraction('pf', load.pf);
  return load.watts / (load.voltage * (load.pf ?? 1));
}

/**
 * The same of a load stated in VA, as lamps with drivers are: Ib = S / U.
 * @throws RangeError naming the field
 */
export function apparentCurrentA(load: { va: number; voltage: number }): number {
  requireNonNegative('va', load.va);
  requirePositive('voltage', load.voltage);
  return load.va / load.voltage;
}
