import { requireCount, requirePositive } from './requirements';

export type Chemistry = 'flooded' | 'vrla' | 'lfp';

/** One battery as its label says, and how many stand together. */
export interface Batteries {
  volts: number;
  /** Ah at the `hours` rate */
  ah: number;
  hours?: number;
  chemistry?: Chemistry;
  count?: number;
  arrangement?: 'series' | 'parallel';
}

/** The whole bank. */
export interface Bank {
  volts: number;
  ah: number;
  /** h, the discharge time at which `ah` holds */
  hours: number;
  chemistry: Chemistry;
}

/** What is assumed of a chemistry; printed with every figure that leans on it. */
export interface Assumptions {
  peukert: number;
  /** share of the charge that may be taken */
  dischargeDepth: number;
  /** share of the rated Ah that is left at the end of the bank's life */
  ageing: number;
  /** share of charge put in that can be taken out again */
  chargeReturn: number;
  /** share of the Ah lost for each K below 25 degC */
  coldPerK: number;
}

/**
 * Peukert: flooded 1.2 and agm 1.05 to 1.15 (BatteryGuy; sources disagree), lithium from memory. Depth 0.5 for lead,
 * 0.9
 * for lithium: common design practice, no standard (0.8 is claimed for tubular plates). Ageing 0.8: the end of life of
 * IEC 60896 and IEEE 485, from memory. Charge return and cold: makers' general advice, from memory.
 */
export const ASSUMED: Record<Chemistry, Assumptions> = {
  flooded: { peukert: 1.2, dischargeDepth: 0.5, ageing: 0.8, chargeReturn: 0.8, coldPerK: 0.008 },
  vrla: { peukert: 1.1, dischargeDepth: 0.5, ageing: 0.8, chargeReturn: 0.85, coldPerK: 0.008 },
  lfp: { peukert: 1.05, dischargeDepth: 0.9, ageing: 0.8, chargeReturn: 0.98, coldPerK: 0.005 },
};

/**
 * Charge current in A per Ah that the bank takes: flooded 0.1 usual, 0.2 at most; under 0.05 it is never full. Makers'
 * advice, from memory.
 */
export const CHARGE_LIMIT: Record<Chemistry, { most: number; least: number }> = {
  flooded: { most: 0.2, least: 0.05 },
  vrla: { most: 0.25, least: 0.05 },
  lfp: { most: 0.5, least: 0.05 },
};

/** Series adds volts, parallel adds Ah. @throws RangeError naming the field */
export function bankOf(batteries: Batteries): Bank {
  const count = batteries.count ?? 1;
  requirePositive('volts', batteries.volts);
  requirePositive('ah', batteries.ah);
  requireCount('count', count);
  const hours = batteries.hours ?? 20;
  requirePositive('hours', hours);
  const series = (batteries.arrangement ?? 'series') === 'series';
  return {
    volts: batteries.volts * (series ? count : 1),
    ah: batteries.ah * (series ? 1 : count),
    hours,
    chemistry: batteries.chemistry ?? 'flooded',
  };
}

/** The bank that several equal batteries or strings, drawn as parts of their own, make in series or in parallel. */
export function joined(banks: readonly Bank[], arrangement: 'series' | 'parallel'): Bank {
  const [first, ...rest] = banks;
  if (!first) throw new RangeError('banks is empty: a bank has at least one battery');
  return rest.reduce<Bank>(
    (whole, bank) =>
      arrangement === 'series'
        ? { ...whole, volts: whole.volts + bank.volts, ah: Math.min(whole.ah, bank.ah) }
        : { ...whole, ah: whole.ah + bank.ah },
    first,
  );
}
