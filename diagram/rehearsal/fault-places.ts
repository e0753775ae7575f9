import type { Fault, FaultKind } from '../circuit/fault-types';
import { hasTerminal, isBar } from '../document/kinds';
import type { Part } from '../document/schema';

/** What each fault is called where one chooses it. */
export const FAULT_NAMES: Readonly<Record<FaultKind, string>> = {
  'line-to-case': 'line to case',
  'line-to-neutral': 'line to neutral',
  'neutral-open': 'neutral open',
  'neutral-to-earth': 'neutral to earth',
};

/** The faults that can be put in at a part: those whose terminals it has. A class 2 part has no case that could be touched. */
export function faultsAt(part: Part): FaultKind[] {
  if (isBar(part.kind) || part.kind === 'battery' || part.kind === 'spd') return [];
  if (part.kind === 'supply') return ['neutral-open'];
  const has = (mark: string) => hasTerminal(part, mark) || hasTerminal(part, `out.${mark}`);
  const cased = has('E') && !('class' in part && part.class === 2);
  const kinds: FaultKind[] = [];
  if (has('L') && cased) kinds.push('line-to-case');
  if (has('L') && has('N')) kinds.push('line-to-neutral');
  if (has('N')) kinds.push('neutral-open');
  if (has('N') && cased) kinds.push('neutral-to-earth');
  return kinds;
}

/** A fault as the address of a page writes it: kind, part and, where one wire opens, that wire. */
export const faultText = ({ kind, at, wire }: Fault): string => [kind, at, ...(wire ? [wire] : [])].join('~');

/** @returns null where the text is no fault */
export function faultOf(text: string): Fault | null {
  const [kind, at, wire] = text.split('~');
  if (!kind || !at || !(kind in FAULT_NAMES)) return null;
  return { kind: kind as FaultKind, at, ...(wire && { wire }) };
}
