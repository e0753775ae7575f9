import type { CapacityTable, Insulation, Material, Method, Practice } from '../practices/types';
import { interpolated, nextAbove, printedAt } from './read-table';
import { requireCount, requireNonNegative, requirePositive, requireWithin } from './requirements';
import { LIMIT_C } from './conductor';

export interface Laying {
  method: Method;
  material: Material;
  insulation: Insulation;
  /** degC of the air, or of the ground for D1 */
  ambientC: number;
  /** loaded circuits together, this one counted */
  grouped: number;
  /** mm of the run totally surrounded by thermal insulation */
  insulatedMm?: number;
}

export interface Capacity {
  /** A, as the table prints it, before correction */
  tableA: number;
  /** A, Iz = It Ca Cg Ci Cf */
  izA: number;
  ambientFactor: number;
  groupingFactor: number;
  insulationFactor: number;
  table: string;
  source: string;
  memory: boolean;
}

/** The practice's table for this way of laying; null where it has none. */
export function capacityTable(
  practice: Practice,
  laying: Pick<Laying, 'method' | 'material' | 'insulation'>,
): CapacityTable | null {
  return (
    practice.capacity.find(
      (table) =>
        table.method === laying.method && table.material === laying.material && table.insulation === laying.insulation,
    ) ?? null
  );
}

/**
 * Ca. Printed values at the printed temperatures, a straight line between them, and beyond the table the formula
 * sqrt((limit - T) / (limit - reference)); 0 at the limiting temperature itself.
 * @throws RangeError naming ambientC
 */
export function ambientFactor(practice: Practice, laying: Pick<Laying, 'method' | 'insulation' | 'ambientC'>): number {
  requireWithin('ambientC', laying.ambientC, -40, 100);
  const ground = laying.method === 'D1';
  const table = practice.ambient[laying.insulation][ground ? 'ground' : 'air'];
  const last = table.rows[table.rows.length - 1]!.at;
  if (laying.ambientC <= last) return interpolated(table, laying.ambientC);
  const limit = LIMIT_C[laying.insulation];
  return Math.sqrt(Math.max(0, limit - laying.ambientC) / (limit - (ground ? 20 : 30)));
}

/**
 * Cg. Side by side on a surface for method C, which is laid so by its definition; bunched for every other. A number of
 * circuits that is not printed takes the next printed one; past the table the last value falls with the root of the
 * number.
 * @throws RangeError naming grouped
 */
export function groupingFactor(practice: Practice, laying: Pick<Laying, 'method' | 'grouped'>): number {
  requireCount('grouped', laying.grouped);
  const table = laying.method === 'C' ? practice.grouping.singleLayer : practice.grouping.bunched;
  const last = table.rows[table.rows.length - 1]!;
  if (laying.grouped <= last.at) return nextAbove(table, laying.grouped);
  return laying.method === 'C' ? last.value : last.value * Math.sqrt(last.at / laying.grouped);
}

/** Ci, by mm of the run surrounded: a straight line between printed rows, 0.5 from half a metre. */
export function insulationFactor(practice: Practice, insulatedMm: number): number {
  requireNonNegative('insulatedMm', insulatedMm);
  return interpolated(practice.insulated, insulatedMm);
}

/**
 * Iz = It Ca Cg Ci, the current that a cable carries for ever as it is laid; Cf is 1, as no rewirable fuse is used.
 * @param csaMm2 mm2, > 0
 * @returns null where the practice has no table for this laying, or the table no row of this size
 * @throws RangeError naming the field
 * @source IEC 60364-5-52 523, annex B; BS 7671 Appendix 4
 */
export function capacity(practice: Practice, csaMm2: number, laying: Laying): Capacity | null {
  requirePositive('csaMm2', csaMm2);
  const factors = {
    ambientFactor: ambientFactor(practice, laying),
    groupingFactor: groupingFactor(practice, laying),
    insulationFactor: insulationFactor(practice, laying.insulatedMm ?? 0),
  };
  const table = capacityTable(practice, laying);
  const tableA = table && printedAt(table, csaMm2);
  if (!table || tableA === null) return null;
  return {
    tableA,
    izA: tableA * factors.ambientFactor * factors.groupingFactor * factors.insulationFactor,
    ...factors,
    table: table.title,
    source: table.source,
    memory: table.rows.find((row) => row.at === csaMm2)!.memory,
  };
}

/**
 * It >= In / (Ca Cg Ci Cf): what the table must print for a device of `deviceA`. @throws RangeError naming the field
 */
export function neededTableA(
  deviceA: number,
  factors: { ambient?: number; grouping?: number; insulation?: number; fuse?: number },
): number {
  requirePositive('deviceA', deviceA);
  let product = 1;
  for (const [name, factor] of Object.entries(factors)) {
    requirePositive(name, factor);
    product *= factor;
  }
  return deviceA / product;
}

/** Ib <= In <= Iz and I2 <= 1.45 Iz: IEC 60364-4-43 433.1, BS 7671 433.1.1 (from memory). */
export interface Coordination {
  designWithinDevice: boolean;
  deviceWithinCable: boolean;
  overloadWithinCable: boolean;
}

/**
 * @param conventionalTrip I2 / In: 1.45 for an mcb or rcbo, 1.6 for a gG fuse of 16 A and more
 * @throws RangeError naming the field
 */
export function coordination(input: {
  ibA: number;
  inA: number;
  izA: number;
  conventionalTrip?: number;
}): Coordination {
  requireNonNegative('ibA', input.ibA);
  requirePositive('inA', input.inA);
  requirePositive('izA', input.izA);
  const i2 = (input.conventionalTrip ?? 1.45) * input.inA;
  return {
    designWithinDevice: input.ibA <= input.inA,
    deviceWithinCable: input.inA <= input.izA,
    overloadWithinCable: i2 <= 1.45 * input.izA * (1 + 1e-9),
  };
}
