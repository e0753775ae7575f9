import type { Patch } from '../document/patch';
import { byCode, type Face, type Installation, type Position } from '../document/schema';
import { canonicalOf } from './build-scene';
import { connectionPositions } from './connections-scene';
import { planOverview } from './overview-plan';
import { overviewPositions } from './overview-positions';

/** Where every drawn part stands on a face: stored, or worked out. No routing is done for it. */
export function positionsOn(doc: Installation, face: Face): Map<string, Position> {
  const sorted = canonicalOf(doc);
  if (face === 'connections') return connectionPositions(sorted);
  return new Map(overviewPositions(planOverview(sorted), doc.sheet?.overview ?? {}));
}

/** A change that gives every part a position on both faces; what has one keeps it. Empty where nothing is missing. */
export function placeAll(doc: Installation): Patch {
  const set: NonNullable<Patch['set']> = {};
  for (const face of ['overview', 'connections'] as const) {
    const missing = [...positionsOn(doc, face)]
      .filter(([id]) => !doc.sheet?.[face]?.[id])
      .sort(([a], [b]) => byCode(a, b));
    if (missing.length > 0) set[face] = Object.fromEntries(missing);
  }
  return Object.keys(set).length > 0 ? { set } : {};
}
