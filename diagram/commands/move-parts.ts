import { MODULE } from '../symbols/types';
import { diff } from '../document/patch';
import { applyPatch } from '../document/patch';
import { placeAll, positionsOn } from '../layout/place';
import { canonical, type Face, type Installation, type Position } from '../document/schema';
import { nameOf } from '../document/names';
import type { Command } from './types';

const snap = (value: number): number => Math.round(value / MODULE) * MODULE;

function moved(
  doc: Installation,
  face: Face,
  place: (id: string, at: Position) => Position,
  ids: readonly string[],
  label: string,
): Command {
  const before = applyPatch(doc, placeAll(doc));
  const all = positionsOn(before, face);
  const set: Record<string, Position> = {};
  for (const id of ids) {
    const at = all.get(id);
    if (at) set[id] = place(id, at);
  }
  const next = canonical({ ...before, sheet: { ...before.sheet, [face]: { ...before.sheet?.[face], ...set } } });
  return { label, patch: diff(doc, next), parts: ids };
}

const named = (doc: Installation, ids: readonly string[]): string => {
  const first = doc.parts.find((part) => part.id === ids[0]);
  return ids.length === 1 && first ? nameOf(doc, first) : `${ids.length} parts`;
};

/** Moves parts on one face by whole modules; what was moved by hand is pinned. Lengths in 1/100 mm. */
export const moveParts = (doc: Installation, face: Face, ids: readonly string[], dx: number, dy: number): Command =>
  moved(
    doc,
    face,
    (_, at) => ({ ...at, x: snap(at.x + dx), y: snap(at.y + dy), pinned: true }),
    ids,
    `Move ${named(doc, ids)}`,
  );

/** Lines parts up with the first of them, in a row or in a column. */
export function alignParts(doc: Installation, face: Face, ids: readonly string[], along: 'row' | 'column'): Command {
  const first = positionsOn(doc, face).get(ids[0] ?? '');
  const place = (_: string, at: Position): Position => ({
    ...at,
    ...(along === 'row' ? { y: first?.y ?? at.y } : { x: first?.x ?? at.x }),
    pinned: true,
  });
  return moved(doc, face, place, ids, `Align ${named(doc, ids)} in a ${along}`);
}

/** Lets the layout place parts again: what a person pinned is let go. */
export function unpinParts(doc: Installation, face: Face, ids: readonly string[]): Command {
  const positions = { ...doc.sheet?.[face] };
  for (const id of ids) if (positions[id]?.pinned) delete positions[id];
  const loose = canonical({ ...doc, sheet: { ...doc.sheet, [face]: positions } });
  return {
    label: `Let ${named(doc, ids)} be placed again`,
    patch: diff(doc, applyPatch(loose, placeAll(loose))),
    parts: ids,
  };
}
