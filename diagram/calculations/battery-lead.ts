import type { Insulation, Material, Method, Practice } from '../practices/types';
import { capacity } from './capacity';
import { LIMIT_C, conductorOhm } from './conductor';
import { requireNonNegative, requirePositive } from './requirements';

/**
 * Volts at the far end of a lead that feeds a constant power, as an inverter is: U = (U0 + sqrt(U0^2 - 4 P R)) / 2.
 * @param lead.loopOhm ohm, both leads
 * @returns V at the inverter and A in the lead
 * @throws RangeError naming the field; also where the lead cannot carry the power at all
 */
export function constantPowerDrop(lead: { volts: number; watts: number; loopOhm: number }): {
  volts: number;
  currentA: number;
} {
  requirePositive('volts', lead.volts);
  requireNonNegative('watts', lead.watts);
  requireNonNegative('loopOhm', lead.loopOhm);
  const root = lead.volts ** 2 - 4 * lead.watts * lead.loopOhm;
  if (root < 0) throw new RangeError(`loopOhm is ${lead.loopOhm}: no voltage carries ${lead.watts} W through it`);
  const volts = (lead.volts + Math.sqrt(root)) / 2;
  return { volts, currentA: lead.watts / volts };
}

/** dc fuses on sale, A: common practice, no source. */
export const DC_FUSES_A = [10, 16, 20, 25, 32, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 400] as const;
/** The fuse stands above the greatest steady current by a quarter: common practice, no source. */
const FUSE_MARGIN = 1.25;
/** mm2 of battery leads on sale */
export const LEADS_MM2 = [4, 6, 10, 16, 25, 35, 50, 70, 95] as const;
/** percent of the bank's volts, both leads: the rule `thin-battery-lead` */
export const LEAD_DROP_PERCENT = 2;

export interface BatteryLead {
  csaMm2: number;
  fuseA: number;
  dropPercent: number;
}

/**
 * The fuse for a current: the next on sale above it and a quarter; null where none is large enough. @throws RangeError
 * naming currentA
 */
export function batteryFuseA(currentA: number): number | null {
  requirePositive('currentA', currentA);
  return DC_FUSES_A.find((rating) => rating >= FUSE_MARGIN * currentA) ?? null;
}

/**
 * The thinnest battery lead and the fuse for it: the lead carries at least the fuse and drops at most 2 % of the bank's
 * volts.
 * @param need.currentA A at full output and cutoff
 * @param need.lengthM  m, one way
 * @returns null where no size on sale does
 * @throws RangeError naming the field
 */
export function batteryLead(need: {
  practice: Practice;
  currentA: number;
  bankVolts: number;
  lengthM: number;
  method: Method;
  material: Material;
  insulation: Insulation;
  ambientC: number;
}): BatteryLead | null {
  requirePositive('bankVolts', need.bankVolts);
  requireNonNegative('lengthM', need.lengthM);
  const fuseA = batteryFuseA(need.currentA);
  if (fuseA === null) return null;
  for (const csaMm2 of LEADS_MM2) {
    const carried = capacity(need.practice, csaMm2, { ...need, grouped: 1 });
    const ohm =
      2 *
      conductorOhm({ csaMm2, lengthM: need.lengthM, temperatureC: LIMIT_C[need.insulation], material: need.material });
    const dropPercent = (100 * need.currentA * ohm) / need.bankVolts;
    if (carried && carried.izA >= fuseA && dropPercent <= LEAD_DROP_PERCENT) return { csaMm2, fuseA, dropPercent };
  }
  return null;
}
