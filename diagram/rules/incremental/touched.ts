import type { Installation, Wire } from '../../document/schema';
import { Beyond } from './beyond';
import { isOfTrunk, type Branches } from './branches';
import type { Difference } from './difference';

/** The parts of the branches that an edit touches, before it and after it. */
export interface Touched {
  before: ReadonlySet<string>;
  after: ReadonlySet<string>;
}

/** Every wire, of before and after, that an edit changed or that lies in a cable it changed. */
function wiresOf(before: Installation, after: Installation, { wires, cables }: Difference): Wire[] {
  const changed = new Set(wires);
  const lists = [before.wires, after.wires];
  const inCables = new Set(cables);
  for (const list of lists)
    for (const { id, cable } of list) if (cable !== undefined && changed.has(id)) inCables.add(cable);
  const found = lists.flatMap((list) =>
    list.filter(({ id, cable }) => changed.has(id) || (cable !== undefined && inCables.has(cable))),
  );
  const used = new Set(found.map(({ cable }) => cable));
  for (const id of cables) if (!used.has(id)) throw new Beyond(`what the cable ${id} belongs to`);
  return found;
}

/** Finds the branches that an edit touches. @throws Beyond where it touches the trunk, or what is no branch */
export function touchedBy(
  before: Installation,
  after: Installation,
  difference: Difference,
  { trunk, branchOf }: Branches,
): Touched {
  if (difference.common) throw new Beyond('what hangs on the data of the home');
  const now = new Map(after.parts.map((part) => [part.id, part]));
  const keys = new Set<string>();
  const fresh = new Set<string>();
  const touch = (id: string) => {
    const key = branchOf.get(id);
    const part = now.get(id);
    if (part && isOfTrunk(part) && !trunk.has(id)) throw new Beyond(`what hangs on ${id}`);
    if (key !== undefined) keys.add(key);
    else if (part && !trunk.has(id)) fresh.add(id);
    else throw new Beyond(`what hangs on ${id}`);
  };
  difference.parts.forEach(touch);
  for (const { id, from, to } of wiresOf(before, after, difference)) {
    const outside = [from, to].filter(([part]) => !trunk.has(part));
    if (outside.length === 0) throw new Beyond(`what hangs on the wire ${id}`);
    for (const [part] of outside) touch(part);
  }
  const own = new Set<string>();
  for (const [id, key] of branchOf) if (keys.has(key)) own.add(id);
  return { before: own, after: new Set([...[...own].filter((id) => now.has(id)), ...fresh]) };
}

/** The home with its trunk and some branches alone. */
export function excerptOf(doc: Installation, trunk: ReadonlySet<string>, parts: ReadonlySet<string>): Installation {
  const has = (id: string) => trunk.has(id) || parts.has(id);
  const wires = doc.wires.filter(({ from, to }) => has(from[0]) && has(to[0]));
  const cables = new Set(wires.map(({ cable }) => cable));
  const { sheet: _sheet, survey: _survey, ...rest } = doc;
  return {
    ...rest,
    parts: doc.parts.filter(({ id }) => has(id)),
    wires,
    cables: doc.cables.filter(({ id }) => cables.has(id)),
  };
}
