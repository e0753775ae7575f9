import { applyPatch, diff, type Patch } from '../document/patch';
import { canonical, type Installation, type Position } from '../document/schema';
import { placeAll } from '../layout/place';

/** Line bars from which nothing hangs yet: they take their place with the first thing that does. */
function bareBars(doc: Installation): Set<string> {
  const wires = new Map<string, number>();
  for (const { from, to } of doc.wires) for (const [part] of [from, to]) wires.set(part, (wires.get(part) ?? 0) + 1);
  return new Set(
    doc.parts.filter((part) => part.kind === 'line-bar' && (wires.get(part.id) ?? 0) < 2).map((part) => part.id),
  );
}

/** Only positions that are to last: of parts that are drawn, and of bars that something hangs from. */
function lasting(doc: Installation): Installation {
  const ids = new Set(doc.parts.map((part) => part.id));
  const bare = bareBars(doc);
  const kept = (positions: Record<string, Position> = {}) =>
    Object.fromEntries(
      Object.entries(positions).filter(([id, { pinned }]) => ids.has(id) && (pinned === true || !bare.has(id))),
    );
  return canonical({
    ...doc,
    sheet: { ...doc.sheet, overview: kept(doc.sheet?.overview), connections: kept(doc.sheet?.connections) },
  });
}

/**
 * The change with places on the sheet for what it adds. What stood on the sheet stays where it stood: positions that were
 * only worked out so far are written down first.
 */
export function withPlaces(doc: Installation, patch: Patch): Patch {
  const before = lasting(applyPatch(doc, placeAll(doc)));
  const after = applyPatch(before, patch);
  return diff(doc, lasting(applyPatch(after, placeAll(after))));
}
