import { requirePositive } from './requirements';

/**
 * I = c U0 / Z: the current of a bolted fault over a loop.
 * Greatest with cold conductors and c = Cmax, for breaking capacity; least with hot ones and c = Cmin, for
 * disconnection;
 * c = 1 for what is printed as the prospective current at the origin.
 * @param fault.loopOhm ohm, the whole loop, > 0
 * @param fault.factor  voltage factor, above 0
 * @returns A
 * @throws RangeError naming the field
 * @source IEC 60364-4-43 434.1, IEC 60909-0
 */
export function prospectiveA(fault: { voltage: number; loopOhm: number; factor?: number }): number {
  requirePositive('voltage', fault.voltage);
  requirePositive('loopOhm', fault.loopOhm);
  const factor = fault.factor ?? 1;
  requirePositive('factor', factor);
  return (factor * fault.voltage) / fault.loopOhm;
}
