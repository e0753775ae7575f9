import { byCode, type Installation } from '../../document/schema';

/** What differs between two drawings of a home, by id; an item that came, went or changed counts the same. */
export interface Difference {
  parts: string[];
  wires: string[];
  cables: string[];
  /** something that every part of the home may hang on: the supply, a place, the practice ... */
  common: boolean;
}

const COMMON = ['practice', 'supply', 'ambient', 'places', 'notices', 'silenced'] as const;

const same = (a: unknown, b: unknown): boolean => a === b || JSON.stringify(a) === JSON.stringify(b);

/** Ids that differ between two lists in order of id. Items that did not change are the same objects, so that this is cheap. */
function differing(before: readonly { id: string }[], after: readonly { id: string }[]): string[] {
  const ids: string[] = [];
  if (before === after) return ids;
  let i = 0;
  let j = 0;
  while (i < before.length || j < after.length) {
    const a = before[i];
    const b = after[j];
    const order = a && b ? (a === b ? 0 : byCode(a.id, b.id)) : a ? -1 : 1;
    if (order !== 0 || !same(a, b)) ids.push((order <= 0 ? a : b)!.id);
    if (order <= 0) i++;
    if (order >= 0) j++;
  }
  return ids;
}

/** Compares two documents in canonical order; title, survey and sheet change no result and are left out. */
export function differenceOf(before: Installation, after: Installation): Difference {
  return {
    parts: differing(before.parts, after.parts),
    wires: differing(before.wires, after.wires),
    cables: differing(before.cables, after.cables),
    common: COMMON.some((field) => !same(before[field], after[field])),
  };
}

export const isNone = ({ parts, wires, cables, common }: Difference): boolean =>
  !common && parts.length + wires.length + cables.length === 0;

/** The same without some of the parts. */
export const without = (difference: Difference, parts: ReadonlyMap<string, unknown>): Difference =>
  parts.size === 0 ? difference : { ...difference, parts: difference.parts.filter((id) => !parts.has(id)) };
