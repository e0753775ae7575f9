import { isBar, terminalsOf } from '../document/kinds';
import type { End, Installation, Part } from '../document/schema';
import { conductorOfMark, endKey, type Conductor, type Walk } from './walk';

/** Terminals as a person may choose them. */

/** How many conductors an accessory's terminal takes. */
export const TERMINAL_HOLDS = 2;

export const sameEnd = (a: End, b: End): boolean => a[0] === b[0] && a[1] === b[1];

/** Screws of a bar in use, sorted by number, and the next free one. */
export function screwsOf(doc: Installation, bar: string): { used: string[]; free: string } {
  const taken = new Set<string>();
  for (const { from, to } of doc.wires) for (const [part, mark] of [from, to]) if (part === bar) taken.add(mark);
  let n = 1;
  while (taken.has(String(n))) n++;
  return { used: [...taken].sort((a, b) => Number(a) - Number(b)), free: String(n) };
}

/** Marks at which something may be hung: all terminals of a part; of a bar those in use and one free screw. */
export function marksOf(doc: Installation, part: Part): string[] {
  if (!isBar(part.kind)) return [...terminalsOf(part)];
  const { used, free } = screwsOf(doc, part.id);
  return [...used, free].sort((a, b) => Number(a) - Number(b));
}

/** Wires at a terminal. */
export const wiresAt = (doc: Installation, end: End) =>
  doc.wires.filter((wire) => sameEnd(wire.from, end) || sameEnd(wire.to, end));

/** What a terminal carries: from its source, else by the bar it belongs to, else what it is made for. */
export function conductorAt(doc: Installation, walk: Walk, part: Part, mark: string): Conductor | null {
  const step = walk.get(endKey([part.id, mark]));
  if (step) return step.conductor;
  if (isBar(part.kind)) {
    const reached = screwsOf(doc, part.id)
      .used.map((screw) => walk.get(endKey([part.id, screw])))
      .find((found) => found !== undefined);
    if (reached) return reached.conductor;
  }
  return conductorOfMark(part, mark);
}
