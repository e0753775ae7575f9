import type { Insulation, Material } from '../practices/types';
import { LIMIT_C, conductorOhm } from './conductor';
import { requireNonNegative, requirePositive } from './requirements';

/** One stretch of the path from the origin to a load, with the current that flows in it. */
export interface Segment {
  /** what it is called on the plot */
  name: string;
  csaMm2: number;
  /** m, one way */
  lengthM: number;
  material: Material;
  insulation: Insulation;
  /** A, after diversity */
  currentA: number;
  /** conductors in which the current flows: 2 for line and neutral, 1 for one leg */
  legs?: 1 | 2;
  /** degC of the conductor; the limit of its insulation where not given */
  temperatureC?: number;
}

export interface SegmentDrop {
  name: string;
  lengthM: number;
  dropV: number;
  /** from the origin to the end of this segment */
  totalV: number;
  totalPercent: number;
  totalM: number;
}

/**
 * Volt drop of one segment: dU = legs R20 (1 + alpha (t - 20)) L I. Reactance is left out: below 35 mm2 it adds less
 * than 2 % at any power factor of a home.
 * @returns V
 * @throws RangeError naming the field
 * @source IEC 60364-5-52 annex G; the mV/A/m of BS 7671 Table 4D2B agree within 2.5 %
 */
export function segmentDropV(segment: Omit<Segment, 'name'>): number {
  requireNonNegative('currentA', segment.currentA);
  const ohm = conductorOhm({ ...segment, temperatureC: segment.temperatureC ?? LIMIT_C[segment.insulation] });
  return (segment.legs ?? 2) * ohm * segment.currentA;
}

/**
 * Cumulative drop along a path, segment by segment, from the origin.
 * @param voltage V, nominal
 * @throws RangeError naming the field
 */
export function dropAlong(segments: readonly Segment[], voltage: number): SegmentDrop[] {
  requirePositive('voltage', voltage);
  let totalV = 0;
  let totalM = 0;
  return segments.map((segment) => {
    const dropV = segmentDropV(segment);
    totalV += dropV;
    totalM += segment.lengthM;
    return {
      name: segment.name,
      lengthM: segment.lengthM,
      dropV,
      totalV,
      totalPercent: (100 * totalV) / voltage,
      totalM,
    };
  });
}

/**
 * The practice's limit for a run of this length: beyond 100 m it rises by 0.005 % a metre, by 0.5 % at most.
 * @returns percent of nominal
 * @throws RangeError naming lengthM
 */
export function dropLimitPercent(
  base: number,
  lengthM: number,
  longRun: { fromM: number; perMetre: number; atMost: number },
): number {
  requireNonNegative('lengthM', lengthM);
  return base + Math.min(longRun.atMost, Math.max(0, lengthM - longRun.fromM) * longRun.perMetre);
}

/**
 * dU = mV/A/m x I x L / 1000, as handbooks reckon it from the printed table. @returns V @throws RangeError naming the
 * field
 */
export function tableDropV(input: { milliVoltPerAmpereMetre: number; currentA: number; lengthM: number }): number {
  requirePositive('milliVoltPerAmpereMetre', input.milliVoltPerAmpereMetre);
  requireNonNegative('currentA', input.currentA);
  requireNonNegative('lengthM', input.lengthM);
  return (input.milliVoltPerAmpereMetre * input.currentA * input.lengthM) / 1000;
}
