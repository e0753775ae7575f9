import type { FloorPlan } from './schema';

/** What lengths on a floor plan are in the home, once one of them has been measured. */

export interface Place {
  /** 1/100 mm of the plan */
  x: number;
  y: number;
}

/** 1/100 mm of the plan. */
export const apart = (a: Place, b: Place): number => Math.hypot(a.x - b.x, a.y - b.y);

/** m in the home for 1/100 mm of the plan; null where nobody has measured it yet. */
export function metresPerUnit({ scale }: Pick<FloorPlan, 'scale'>): number | null {
  const length = scale ? apart(scale.a, scale.b) : 0;
  return scale && length > 0 ? scale.metres / length : null;
}

/** "1:118", as the plan lies on the paper at full size; null where it is not measured. */
export function scaleText(plan: Pick<FloorPlan, 'scale'>, factor = 1): string | null {
  const perUnit = metresPerUnit(plan);
  return perUnit === null ? null : `1:${Number(((perUnit * 100_000) / factor).toPrecision(3))}`;
}

/** m along a line through places on a plan; null where the plan is not measured. */
export function metresAlong(plan: Pick<FloorPlan, 'scale'>, line: readonly Place[]): number | null {
  const perUnit = metresPerUnit(plan);
  if (perUnit === null) return null;
  return line.slice(1).reduce((sum, place, i) => sum + apart(line[i]!, place), 0) * perUnit;
}

/** A number as somebody types it, with a point or a comma; null for what is none. */
export function metresIn(text: string): number | null {
  const found = /^\s*(\d+(?:[.,]\d+)?)\s*m?\s*$/.exec(text);
  return found ? Number(found[1]!.replace(',', '.')) : null;
}

