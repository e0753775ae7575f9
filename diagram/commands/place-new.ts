import { applyPatch, diff, type Patch } from '../document/patch';
import { canonical, type Installation, type Position } from '../document/schema';
import { placeAll } from '../layout/place';

/** Positions of parts that are gone go too. */
function withoutStrays(doc: Installation): Installation {
  const ids = new Set(doc.parts.map((part) => part.id));
  const kept = (positions: Record<string, Position> = {}) =>
    Object.fromEntries(Object.entries(positions).filter(([id]) => ids.has(id)));
  return canonical({
    ...doc,
    sheet: { overview: kept(doc.sheet?.overview), connections: kept(doc.sheet?.connections) },
  });
}

/**
 * The change with places on the sheet for what it adds. What stood on the sheet stays where it stood: positions that were
 * only worked out so far are written down first.
 */
export function withPlaces(doc: Installation, patch: Patch): Patch {
  const before = applyPatch(doc, placeAll(doc));
  const after = withoutStrays(applyPatch(before, patch));
  return diff(doc, applyPatch(after, placeAll(after)));
}
