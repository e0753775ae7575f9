import { symbolFor } from '../symbols';
import { turnedSize } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import { applyPatch, diff, isEmptyPatch } from '../document/patch';
import { bendsMoved } from '../layout/bends';
import { placeAll, positionsOn } from '../layout/place';
import { byCode, canonical, type Face, type Installation, type Position } from '../document/schema';
import { nameOf } from '../document/names';
import { stays, unlocked } from './lock-parts';
import type { Command, Refusal } from './types';

const snap = (value: number): number => Math.round(value / MODULE) * MODULE;

function moved(
  doc: Installation,
  face: Face,
  place: (id: string, at: Position) => Position,
  ids: readonly string[],
  label: string,
): Command {
  const missing = placeAll(doc);
  const before = isEmptyPatch(missing) ? doc : applyPatch(doc, missing);
  const all = positionsOn(before, face);
  const set: Record<string, Position> = {};
  for (const id of ids) {
    const at = all.get(id);
    if (at && !at.locked) set[id] = place(id, at);
  }
  const next = canonical({ ...before, sheet: { ...before.sheet, [face]: { ...before.sheet?.[face], ...set } } });
  return { label, patch: diff(doc, next), parts: ids };
}

const named = (doc: Installation, ids: readonly string[]): string => {
  const first = doc.parts.find((part) => part.id === ids[0]);
  return ids.length === 1 && first ? nameOf(doc, first) : `${ids.length} parts`;
};

/** Moves parts on one face by whole modules; what was moved by hand is pinned. Lengths in 1/100 mm. */
export function moveParts(doc: Installation, face: Face, ids: readonly string[], dx: number, dy: number): Command {
  const command = moved(
    doc,
    face,
    (_, at) => ({ ...at, x: snap(at.x + dx), y: snap(at.y + dy), pinned: true }),
    ids,
    `Move ${named(doc, ids)}`,
  );
  // runs that were led by hand between parts that move together move with them
  const bends = bendsMoved(doc, face, new Set(unlocked(doc, face, ids)), snap(dx), snap(dy));
  if (Object.keys(bends).length === 0) return command;
  return { ...command, patch: { ...command.patch, set: { ...command.patch.set, bends } } };
}

/** Moves parts of one face each its own way, to the module, and pins them there. Lengths in 1/100 mm. */
export function moveEach(
  doc: Installation,
  face: Face,
  ways: ReadonlyMap<string, { dx: number; dy: number }>,
  label: string,
): Command {
  const place = (id: string, at: Position): Position => {
    const { dx, dy } = ways.get(id)!;
    return { ...at, x: snap(at.x + dx), y: snap(at.y + dy), pinned: true };
  };
  return moved(doc, face, place, [...ways.keys()], label);
}

/** Turns parts by a quarter, clockwise, each about its own middle to the module; their runs follow to the terminals. */
export function turnParts(doc: Installation, face: Face, ids: readonly string[]): Command {
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const place = (id: string, { turn = 0, ...at }: Position): Position => {
    const { width, height } = turnedSize(symbolFor(parts.get(id)!, face), turn);
    const next = ((turn + 1) % 4) as 0 | 1 | 2 | 3;
    const off = (width - height) / 2;
    return { ...at, x: snap(at.x + off), y: snap(at.y - off), ...(next !== 0 && { turn: next }), pinned: true };
  };
  return moved(doc, face, place, ids, `Turn ${named(doc, ids)} by a quarter`);
}

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

/** Stands the parts between the outermost two at equal distances, to the module; the outermost stay. */
export function distributeParts(doc: Installation, face: Face, ids: readonly string[], along: 'row' | 'column'): Command {
  const at = positionsOn(applyPatch(doc, placeAll(doc)), face);
  const axis = along === 'row' ? 'x' : 'y';
  const placed = ids.filter((id) => at.has(id)).sort((a, b) => at.get(a)![axis] - at.get(b)![axis] || byCode(a, b));
  const first = at.get(placed[0] ?? '')?.[axis] ?? 0;
  const last = at.get(placed.at(-1) ?? '')?.[axis] ?? 0;
  const step = (last - first) / Math.max(1, placed.length - 1);
  const order = new Map(placed.map((id, i) => [id, i]));
  const place = (id: string, old: Position): Position => {
    const index = order.get(id)!;
    const inner = index > 0 && index < placed.length - 1;
    return { ...old, ...(inner && { [axis]: snap(first + index * step) }), pinned: true };
  };
  return moved(doc, face, place, ids, `Space ${named(doc, ids)} evenly in a ${along}`);
}

const MM = 100;

/** Where a part stands on a face, as it is written: "125, 62.5", in mm from the sheet's upper left; empty where it is not on it. */
export function placeText(doc: Installation, face: Face, id: string): string {
  const at = positionsOn(applyPatch(doc, placeAll(doc)), face).get(id);
  return at ? `${at.x / MM}, ${at.y / MM}` : '';
}

/** Puts a part exactly where it is written, to the module of 2.5 mm, and pins it there. */
export function placeExactly(doc: Installation, face: Face, id: string, text: string): Command | Refusal {
  const found = /^\s*(-?\d+(?:[.,]\d+)?)\s*(?:mm)?\s*[;, ]\s*(-?\d+(?:[.,]\d+)?)\s*(?:mm)?\s*$/.exec(text);
  if (!found) return { refused: 'Two numbers in mm, across and down. For instance 125, 62.5.' };
  const [x, y] = [found[1]!, found[2]!].map((number) => snap(MM * Number(number.replace(',', '.'))));
  if (unlocked(doc, face, [id]).length === 0) return { refused: stays(doc, [id]) };
  if (Math.abs(x!) > 1e6 || Math.abs(y!) > 1e6) return { refused: 'That lies off every sheet: at most 10 m.' };
  return moved(doc, face, (_, at) => ({ ...at, x: x!, y: y!, pinned: true }), [id], `Move ${named(doc, [id])}`);
}

/** Lets the layout place parts again: what a person pinned is let go. */
export function unpinParts(doc: Installation, face: Face, ids: readonly string[]): Command {
  const positions = { ...doc.sheet?.[face] };
  for (const id of unlocked(doc, face, ids)) if (positions[id]?.pinned) delete positions[id];
  const loose = canonical({ ...doc, sheet: { ...doc.sheet, [face]: positions } });
  return {
    label: `Let ${named(doc, ids)} be placed again`,
    patch: diff(doc, applyPatch(loose, placeAll(loose))),
    parts: ids,
  };
}
