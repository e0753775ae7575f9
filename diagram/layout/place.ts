import type { Patch } from '../document/patch';
import { byCode, type Face, type Installation, type Position } from '../document/schema';
import { buildScene } from './build-scene';
import { connectionPages } from './connections-scene';

/** Where every drawn part stands on a face, stored or worked out. */
export function positionsOn(doc: Installation, face: Face): Map<string, Position> {
  const pages = face === 'overview' ? [undefined] : connectionPages(doc).map((page) => page.place);
  const positions = new Map<string, Position>();
  for (const place of pages)
    for (const part of buildScene(doc, face, place === undefined ? {} : { place }).parts)
      positions.set(part.id, doc.sheet?.[face]?.[part.id] ?? { x: part.x, y: part.y, ...(part.turn && { turn: part.turn }) });
  return positions;
}

/** A change that gives every part a position on both faces; what has one keeps it. Empty where nothing is missing. */
export function placeAll(doc: Installation): Patch {
  const set: NonNullable<Patch['set']> = {};
  for (const face of ['overview', 'connections'] as const) {
    const missing = [...positionsOn(doc, face)].filter(([id]) => !doc.sheet?.[face]?.[id]).sort(([a], [b]) => byCode(a, b));
    if (missing.length > 0) set[face] = Object.fromEntries(missing);
  }
  return Object.keys(set).length > 0 ? { set } : {};
}
