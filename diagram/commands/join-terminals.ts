import { diff } from '../document/patch';
import {
  canonical,
  type Cable,
  type End,
  type Installation,
  type Part,
  type Role,
  type Wire,
} from '../document/schema';
import { isBar } from '../document/kinds';
import { nameOf } from '../document/names';
import { practices } from '../practices';
import { USUAL_RUN } from '../survey/columns';
import { TERMINAL_HOLDS, conductorAt, sameEnd, screwsOf, wiresAt } from './ends';
import { ROLE_OF, endKey, walkFromSources, type Walk } from './walk';
import type { Command, NewId, Refusal } from './types';

const isTraveller = (part: Part, mark: string): boolean =>
  part.kind === 'switch-cross' || (part.kind === 'switch-2way' && mark !== 'C');

/** The role of a wire between two terminals: what the nets carry, else what the terminals are made for. */
export function roleBetween(doc: Installation, walk: Walk, a: End, b: End): Role {
  const part = (end: End) => doc.parts.find((candidate) => candidate.id === end[0]);
  const [left, right] = [part(a), part(b)];
  if (!left || !right) return 'line';
  if (isTraveller(left, a[1]) && isTraveller(right, b[1])) return 'strapper';
  const conductors = [conductorAt(doc, walk, left, a[1]), conductorAt(doc, walk, right, b[1])];
  for (const conductor of ['E', '+', '-', 'N'] as const) if (conductors.includes(conductor)) return ROLE_OF[conductor];
  const steps = [walk.get(endKey(a)), walk.get(endKey(b))];
  return steps.some((step) => step?.switched) ? 'switched' : 'line';
}

const between = (wire: Wire, places: (id: string) => string | undefined): string =>
  [places(wire.from[0]) ?? '', places(wire.to[0]) ?? ''].sort().join(' ');

/** A cable that already runs between the same places to one of the two parts and has no such core yet. */
function cableBeside(doc: Installation, a: End, b: End, role: Role): string | undefined {
  const place = new Map(doc.parts.map((part) => [part.id, part.place]));
  const key = [place.get(a[0]) ?? '', place.get(b[0]) ?? ''].sort().join(' ');
  const cores = new Map<string, number>();
  for (const wire of doc.wires)
    if (wire.cable && wire.role === role) cores.set(wire.cable, (cores.get(wire.cable) ?? 0) + 1);
  // A pair of strappers lies in one cable; of every other role a cable has one core.
  const most = role === 'strapper' ? 2 : 1;
  return doc.wires.find(
    (wire) =>
      wire.cable &&
      (cores.get(wire.cable) ?? 0) < most &&
      between(wire, (id) => place.get(id)) === key &&
      [wire.from[0], wire.to[0]].some((id) => id === a[0] || id === b[0]),
  )?.cable;
}

/** A new cable like the one that feeds either end, else the least that the practice drafts. */
function newCable(doc: Installation, walk: Walk, a: End, b: End, id: string): Cable {
  const { draft, cpcMm2 } = practices[doc.practice];
  for (const start of [a, b])
    for (let end: End | null = start; end; ) {
      const step = walk.get(endKey(end));
      const like =
        step?.wire && doc.cables.find((cable) => cable.id === doc.wires.find((wire) => wire.id === step.wire)?.cable);
      if (like) return { ...like, id, length: USUAL_RUN, cores: 1 };
      end = step?.from ?? null;
    }
  const csa = draft.lighting.csaMm2;
  return {
    id,
    csa,
    cpc: cpcMm2.value[csa] ?? csa,
    material: draft.material,
    insulation: draft.insulation,
    method: draft.method,
    length: USUAL_RUN,
    cores: 1,
  };
}

/** A bar's screw that holds a wire already gives way to its next free one. */
function freeEnd(doc: Installation, end: End): End {
  const part = doc.parts.find((candidate) => candidate.id === end[0]);
  if (!part || !isBar(part.kind) || wiresAt(doc, end).length === 0) return end;
  for (let n = 1; ; n++) if (wiresAt(doc, [part.id, String(n)]).length === 0) return [part.id, String(n)];
}

/**
 * Draws one wire between two terminals, with the role that the nets say and a cable where they stand in different places.
 * @returns a refusal where a terminal is full, or both are one
 */
export function joinTerminals(doc: Installation, a: End, b: End, newId: NewId): Command | Refusal {
  if (sameEnd(a, b)) return { refused: 'A wire needs two terminals.' };
  const ends = [freeEnd(doc, a), freeEnd(doc, b)] as const;
  const named = ends.map((end) => {
    const part = doc.parts.find((candidate) => candidate.id === end[0]);
    return part ? `${nameOf(doc, part)}.${end[1]}` : '';
  });
  if (named.includes('')) return { refused: 'That terminal is no longer drawn.' };
  for (const [i, end] of ends.entries()) {
    const part = doc.parts.find((candidate) => candidate.id === end[0])!;
    if (!isBar(part.kind) && wiresAt(doc, end).length >= TERMINAL_HOLDS)
      return { refused: `Two conductors are at ${named[i]} already: a joint?` };
  }
  if (
    doc.wires.some(
      (wire) =>
        (sameEnd(wire.from, ends[0]) && sameEnd(wire.to, ends[1])) ||
        (sameEnd(wire.from, ends[1]) && sameEnd(wire.to, ends[0])),
    )
  )
    return { refused: `${named[0]} and ${named[1]} are joined already.` };
  const walk = walkFromSources(doc);
  const depth = (end: End): number => {
    const part = doc.parts.find((candidate) => candidate.id === end[0])!;
    const marks = isBar(part.kind) ? screwsOf(doc, part.id).used : [end[1]];
    return Math.min(Infinity, ...marks.map((mark) => walk.get(endKey([part.id, mark]))?.depth ?? Infinity));
  };
  const [from, to] = depth(ends[1]) < depth(ends[0]) ? [ends[1], ends[0]] : [ends[0], ends[1]];
  const role = roleBetween(doc, walk, from, to);
  const places = [from, to].map(([id]) => doc.parts.find((part) => part.id === id)?.place);
  const apart = places[0] !== places[1];
  const beside = apart ? cableBeside(doc, from, to, role) : undefined;
  const cable = apart && !beside ? newCable(doc, walk, from, to, newId()) : undefined;
  const colour = practices[doc.practice].colourSchemes[0].colours[role].value[0];
  const lies = beside ?? cable?.id;
  const wire: Wire = { id: newId(), from, to, role, ...(lies && { cable: lies }), colour };
  const next = canonical({ ...doc, wires: [...doc.wires, wire], cables: cable ? [...doc.cables, cable] : doc.cables });
  return { label: `Wire ${named[0]} to ${named[1]}`, patch: diff(doc, next), next: b };
}

/** Terminals that a wire from `end` may go to without joining different conductors, in a fixed order: nearest kin first. */
export function allowedFrom(doc: Installation, end: End, candidates: readonly End[]): End[] {
  const walk = walkFromSources(doc);
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const own = parts.get(end[0]);
  if (!own) return [];
  const mine = conductorAt(doc, walk, own, end[1]);
  return candidates.filter((other) => {
    const part = parts.get(other[0]);
    if (!part || part.id === own.id) return false;
    const theirs = conductorAt(doc, walk, part, other[1]);
    const full = !isBar(part.kind) && wiresAt(doc, other).length >= TERMINAL_HOLDS;
    return !full && (mine === null || theirs === null || mine === theirs);
  });
}
