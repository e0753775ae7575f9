import type { Insulation, Material, Method, Practice } from '../practices/types';
import { adiabaticMm2, kFactor, letThroughA2s } from './adiabatic';
import { capacity, capacityTable } from './capacity';
import { LIMIT_C, conductorOhm } from './conductor';
import { maximumLoopOhm } from './loop-impedance';
import { requireNonNegative, requirePositive } from './requirements';
import type { OvercurrentDevice } from './trip-curve';
import { segmentDropV } from './volt-drop';

export type Criterion = 'capacity' | 'drop' | 'zs' | 'adiabatic' | 'least';

export interface CableNeed {
  practice: Practice;
  device: OvercurrentDevice;
  /** A, design current after diversity */
  ibA: number;
  method: Method;
  material: Material;
  insulation: Insulation;
  /** degC */
  ambientC: number;
  grouped: number;
  /** mm of the run in thermal insulation */
  insulatedMm?: number;
  /** m, one way */
  lengthM: number;
  /** V, line to neutral */
  voltage: number;
  /** percent of nominal that this run may take, what is lost before it already taken off */
  dropLimitPercent: number;
  /** ohm, earth fault loop at the start of the run; absent where not known */
  zsBeforeOhm?: number;
  /** s, in which the overcurrent device must clear; absent where an rcd does it */
  disconnectS?: number;
  /** mm2, no smaller size is taken */
  leastMm2?: number;
}

export interface CableSize {
  csaMm2: number;
  cpcMm2: number;
  /** the criterion that asked for this size; `least` where the smallest size on sale met all */
  decidedBy: Criterion;
  tableA: number;
  izA: number;
  /** percent in this run */
  dropPercent: number;
  /** ohm at its far end, hot; null without the loop before it */
  zsOhm: number | null;
  zsMaxOhm: number | null;
  /** mm2 that a fault at the far end asks of the protective core; null without the loop before it */
  adiabaticMm2: number | null;
  /** what each smaller size failed, in rising order */
  tried: { csaMm2: number; failed: Criterion[] }[];
}

function judge(
  need: CableNeed,
  csaMm2: number,
): { size: Omit<CableSize, 'decidedBy' | 'tried'>; failed: Criterion[] } | null {
  const { practice, device, lengthM, material, insulation, voltage } = need;
  const carried = capacity(practice, csaMm2, need);
  if (!carried) return null;
  const cpcMm2 = practice.cpcMm2.value[csaMm2] ?? csaMm2;
  const temperatureC = LIMIT_C[insulation];
  const dropPercent = (100 * segmentDropV({ csaMm2, lengthM, material, insulation, currentA: need.ibA })) / voltage;
  const failed: Criterion[] = [];
  if (carried.izA < device.ratingA || need.ibA > carried.izA) failed.push('capacity');
  if (dropPercent > need.dropLimitPercent) failed.push('drop');
  let zsOhm: number | null = null;
  let zsMaxOhm: number | null = null;
  let thermalMm2: number | null = null;
  if (need.zsBeforeOhm !== undefined) {
    const ohm = (mm2: number) => conductorOhm({ csaMm2: mm2, lengthM, temperatureC, material });
    zsOhm = need.zsBeforeOhm + ohm(csaMm2) + ohm(cpcMm2);
    if (need.disconnectS !== undefined) {
      zsMaxOhm = maximumLoopOhm({ device, voltage, withinS: need.disconnectS, cMin: practice.cMin.value });
      if (zsOhm > zsMaxOhm) failed.push('zs');
      const energy = zsOhm > zsMaxOhm ? Infinity : letThroughA2s(device, voltage / zsOhm);
      // A loop too long to trip the device is the failing of `zs`; the heat of a fault that never clears is not added
      // to it.
      if (Number.isFinite(energy)) {
        thermalMm2 = adiabaticMm2(energy, kFactor(material, insulation, true));
        if (cpcMm2 < thermalMm2) failed.push('adiabatic');
      }
    }
  }
  return {
    size: {
      csaMm2,
      cpcMm2,
      tableA: carried.tableA,
      izA: carried.izA,
      dropPercent,
      zsOhm,
      zsMaxOhm,
      adiabaticMm2: thermalMm2,
    },
    failed,
  };
}

/**
 * The smallest cable on sale that meets capacity (Ib <= In <= Iz), volt drop, loop impedance and the adiabatic need
 * together, and the criterion that asked for it: the first, in that order, that the next smaller size failed.
 * @returns null where no size on sale does, or the practice has no table for this way of laying
 * @throws RangeError naming the field
 */
export function sizeCable(need: CableNeed): CableSize | null {
  requireNonNegative('ibA', need.ibA);
  requirePositive('ratingA', need.device.ratingA);
  requirePositive('voltage', need.voltage);
  requireNonNegative('lengthM', need.lengthM);
  requirePositive('dropLimitPercent', need.dropLimitPercent);
  if (need.zsBeforeOhm !== undefined) requireNonNegative('zsBeforeOhm', need.zsBeforeOhm);
  if (!capacityTable(need.practice, need)) return null;
  const tried: CableSize['tried'] = [];
  for (const csaMm2 of need.practice.csaMm2) {
    if (csaMm2 < (need.leastMm2 ?? 0)) continue;
    const judged = judge(need, csaMm2);
    if (!judged) continue;
    if (judged.failed.length === 0) {
      const decidedBy = tried.length > 0 ? tried[tried.length - 1]!.failed[0]! : 'least';
      return { ...judged.size, decidedBy, tried };
    }
    tried.push({ csaMm2, failed: judged.failed });
  }
  return null;
}
