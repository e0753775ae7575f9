import type { Patch } from '../document/patch';
import { byCode, type Face, type Installation, type Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { turnedSize } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import { canonicalOf } from './build-scene';
import { connectionPositions } from './connections-scene';
import { Ground } from './labels';
import { planOverview } from './overview-plan';
import { overviewPositions } from './overview-positions';
import { around } from './positions';

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

/**
 * Where one part would stand on a face, as if it had no position yet: beside what it is wired to, on free ground.
 * @param near a position to start from instead
 */
export function placePart(doc: Installation, partId: string, face: Face, near?: Position): Position | null {
  const stored = { ...doc.sheet?.[face] };
  delete stored[partId];
  const positions = positionsOn({ ...doc, sheet: { ...doc.sheet, [face]: stored } }, face);
  const found = positions.get(partId);
  if (!found || !near) return found ?? null;
  const part = doc.parts.find(({ id }) => id === partId)!;
  const boxOf = (id: string, at: Position) => {
    const symbol = symbolFor(doc.parts.find((other) => other.id === id) ?? part, face);
    return { x: at.x, y: at.y, ...turnedSize(symbol, at.turn ?? 0) };
  };
  const ground = new Ground();
  for (const [id, at] of positions) if (id !== partId) ground.add(boxOf(id, at));
  const wish = { ...found, x: near.x, y: near.y };
  for (const at of around(wish)) if (ground.overlap(boxOf(partId, at), MODULE - 1) === 0) return at;
  return wish;
}
