import { isOfTrunk } from '../../circuit/branches';
import { findById, type Installation, type Wire } from '../../document/schema';
import { Beyond } from './beyond';
import type { Difference } from './difference';
import type { Shape } from './shape';

/** The branches that an edit touches, by their keys before it; their parts, and the wires at those, before and after it. */
export interface Touched {
  keys: ReadonlySet<string>;
  before: ReadonlySet<string>;
  after: ReadonlySet<string>;
  wires: { before: readonly Wire[]; after: readonly Wire[] };
}

const findAll = <T extends { id: string }>(list: readonly T[], ids: readonly string[]): T[] =>
  ids.flatMap((id) => findById(list, id) ?? []);

/** Every wire, of before and after, that an edit changed or that lies in a cable it changed. */
function wiresOf(before: Installation, after: Installation, { wires, cables }: Difference): Wire[] {
  const found = [...findAll(before.wires, wires), ...findAll(after.wires, wires)];
  const inCables = new Set([...cables, ...found.flatMap(({ cable }) => cable ?? [])]);
  if (inCables.size > 0)
    for (const wire of after.wires) if (wire.cable !== undefined && inCables.has(wire.cable)) found.push(wire);
  const used = new Set(found.map(({ cable }) => cable));
  for (const id of cables) if (!used.has(id)) throw new Beyond(`what the cable ${id} belongs to`);
  return found;
}

/** Adds the branches that draw over the same cables of the trunk: what one takes is felt by all of them. */
function addLeaning(keys: Set<string>, { leaning }: Shape): void {
  const over = new Set<string>();
  for (const key of keys) {
    for (const wire of leaning.get(key) ?? []) over.add(wire);
    for (const [other, wires] of leaning) if (!keys.has(other) && [...wires].some((wire) => over.has(wire))) keys.add(other);
  }
}

/** Finds the branches that an edit touches. @throws Beyond where it touches the trunk, or what is no branch */
export function touchedBy(before: Installation, after: Installation, difference: Difference, shape: Shape): Touched {
  if (difference.common) throw new Beyond('what hangs on the data of the home');
  const { trunk, branchOf } = shape;
  const changed = new Set(difference.parts);
  const anew = new Map(findAll(after.parts, difference.parts).map((part) => [part.id, part]));
  const keys = new Set<string>();
  const fresh = new Set<string>();
  const touch = (id: string) => {
    const key = branchOf.get(id);
    const part = anew.get(id);
    if (part && isOfTrunk(part) && !trunk.has(id)) throw new Beyond(`what hangs on ${id}`);
    if (key !== undefined) keys.add(key);
    else if (part && !trunk.has(id)) fresh.add(id);
    else throw new Beyond(`what hangs on ${id}`);
  };
  difference.parts.forEach(touch);
  // A plug joins its outlet without a wire: with one of the two comes the other.
  for (const { parts } of [before, after])
    for (const part of parts) {
      if (part.kind !== 'plug' || part.in === undefined) continue;
      const ends = [part.id, part.in].filter((id) => branchOf.has(id) || anew.has(id));
      if (changed.has(part.id) || changed.has(part.in)) ends.forEach(touch);
    }
  for (const { id, from, to } of wiresOf(before, after, difference)) {
    const outside = [from, to].filter(([part]) => !trunk.has(part));
    if (outside.length === 0) throw new Beyond(`what hangs on the wire ${id}`);
    for (const [part] of outside) touch(part);
  }
  addLeaning(keys, shape);
  const touched = [...keys].map((key) => shape.members.get(key)!);
  const own = new Set(touched.flatMap(({ parts }) => [...parts]));
  const wires = touched.flatMap((members) => members.wires);
  const changedWires = new Set(difference.wires);
  return {
    keys,
    before: own,
    after: new Set([...[...own].filter((id) => !changed.has(id) || anew.has(id)), ...fresh]),
    wires: {
      before: wires,
      after: [...wires.filter(({ id }) => !changedWires.has(id)), ...findAll(after.wires, difference.wires)],
    },
  };
}
