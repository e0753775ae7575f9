import { diff } from '../document/patch';
import { REF_LETTER } from '../document/kinds';
import { canonical, byCode, type Installation, type Part } from '../document/schema';
import { positionsOn } from '../layout/place';
import { isNamed } from './refs';
import type { Command } from './types';

/**
 * Gives designations anew in the order of reading: down the origin first, then along each level from left to right. Bars
 * and boards keep theirs.
 */
export function renumber(doc: Installation): Command {
  const at = positionsOn(doc, 'overview');
  const level = (part: Part) => Math.round((at.get(part.id)?.y ?? 1e6) / 1000);
  const x = (part: Part) => at.get(part.id)?.x ?? 1e6;
  const named = doc.parts.filter((part) => part.ref !== undefined && isNamed(part.kind));
  const kept = new Set(
    doc.parts.flatMap((part) => [
      ...(part.ref && !isNamed(part.kind) ? [part.ref] : []),
      ...(part.board ? [part.board] : []),
    ]),
  );
  named.sort((a, b) => level(a) - level(b) || x(a) - x(b) || byCode(a.id, b.id));
  const next = new Map<string, number>();
  const refs = new Map<string, string>();
  for (const part of named) {
    const letter = REF_LETTER[part.kind];
    let n = next.get(letter) ?? (letter === 'Q' || letter === 'F' ? 0 : letter === 'X' ? 21 : 1);
    while (kept.has(`${letter}${n}`)) n++;
    next.set(letter, n + 1);
    refs.set(part.id, `${letter}${n}`);
  }
  const parts = doc.parts.map((part) => (refs.has(part.id) ? { ...part, ref: refs.get(part.id)! } : part));
  return { label: 'Renumber designations', patch: diff(doc, canonical({ ...doc, parts })) };
}
