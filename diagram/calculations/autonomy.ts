import { ASSUMED, type Assumptions, type Bank } from './battery-bank';
import { requireFraction, requireNonNegative, requirePositive, requireWithin } from './requirements';

/**
 * Peukert for a capacity stated at a discharge time: t = H (C / (I H))^k. The raw form C / I^k holds only for a
 * capacity
 * stated at 1 A and is not used.
 * @param discharge.ah       C, Ah at the H-hour rate
 * @param discharge.hours    H
 * @param discharge.currentA I, > 0
 * @param discharge.exponent k, 1 to 1.6
 * @returns h until empty
 * @throws RangeError naming the field
 * @source W. Peukert; battery vendor "Math behind the magic"
 */
export function peukertHours(discharge: { ah: number; hours: number; currentA: number; exponent: number }): number {
  const { ah, hours, currentA, exponent } = discharge;
  requirePositive('ah', ah);
  requirePositive('hours', hours);
  requirePositive('currentA', currentA);
  requireWithin('exponent', exponent, 1, 1.6);
  return hours * (ah / (currentA * hours)) ** exponent;
}

/** Battery current behind an inverter: I = P / (eta U). @returns A @throws RangeError naming the field */
export function batteryCurrentA(load: { watts: number; efficiency: number; volts: number }): number {
  requireNonNegative('watts', load.watts);
  requireFraction('efficiency', load.efficiency);
  requirePositive('volts', load.volts);
  return load.watts / (load.efficiency * load.volts);
}

/**
 * Hours that a bank carries a load through an inverter, at its nominal volts, with what is assumed of its chemistry.
 * @param input.temperatureC degC of the bank; 25 where not given
 * @returns h; Infinity without a load
 * @throws RangeError naming the field
 */
export function autonomyHours(input: {
  bank: Bank;
  watts: number;
  efficiency: number;
  temperatureC?: number;
  assumed?: Assumptions;
}): number {
  const { bank, watts } = input;
  const assumed = input.assumed ?? ASSUMED[bank.chemistry];
  const temperatureC = input.temperatureC ?? 25;
  requireWithin('temperatureC', temperatureC, -40, 60);
  const currentA = batteryCurrentA({ watts, efficiency: input.efficiency, volts: bank.volts });
  if (currentA === 0) return Infinity;
  const cold = Math.max(0, 1 - assumed.coldPerK * Math.max(0, 25 - temperatureC));
  const whole = peukertHours({ ah: bank.ah * assumed.ageing, hours: bank.hours, currentA, exponent: assumed.peukert });
  return whole * assumed.dischargeDepth * cold;
}

/** Hours against load, for a curve. @throws RangeError naming the field */
export function autonomyCurve(
  input: { bank: Bank; efficiency: number; temperatureC?: number; assumed?: Assumptions },
  fromWatts: number,
  toWatts: number,
  points = 40,
): { watts: number; hours: number }[] {
  requirePositive('fromWatts', fromWatts);
  requireWithin('toWatts', toWatts, fromWatts, 1e6);
  return Array.from({ length: points }, (_, i) => {
    const watts = fromWatts + ((toWatts - fromWatts) * i) / Math.max(1, points - 1);
    return { watts, hours: autonomyHours({ ...input, watts }) };
  });
}

/**
 * Hours when each named load is left out in turn: what it is worth to drop the fans. @throws RangeError naming the
 * field
 */
export function whatIfs(
  input: { bank: Bank; efficiency: number; temperatureC?: number; assumed?: Assumptions },
  loads: readonly { name: string; watts: number }[],
): { name: string; watts: number; hours: number }[] {
  const all = loads.reduce((sum, load) => sum + load.watts, 0);
  return loads.map(({ name, watts }) => ({
    name,
    watts: all - watts,
    hours: autonomyHours({ ...input, watts: all - watts }),
  }));
}

/**
 * Hours to charge again what a discharge took.
 * @param input.chargeA A into the bank
 * @throws RangeError naming the field
 */
export function rechargeHours(input: {
  bank: Bank;
  chargeA: number;
  takenShare?: number;
  assumed?: Assumptions;
}): number {
  const assumed = input.assumed ?? ASSUMED[input.bank.chemistry];
  const takenShare = input.takenShare ?? assumed.dischargeDepth;
  requirePositive('chargeA', input.chargeA);
  requireFraction('takenShare', takenShare);
  return (input.bank.ah * takenShare) / (input.chargeA * assumed.chargeReturn);
}

/**
 * Extra mains load while charging: charge current at the bank's nominal volts, through the charger. @returns W @throws
 * RangeError naming the field
 */
export function chargingWatts(input: { chargeA: number; bankVolts: number; efficiency: number }): number {
  requireNonNegative('chargeA', input.chargeA);
  requirePositive('bankVolts', input.bankVolts);
  requireFraction('efficiency', input.efficiency);
  return (input.chargeA * input.bankVolts) / input.efficiency;
}
