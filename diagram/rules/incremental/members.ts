import type { Branches } from '../../circuit/branches';
import type { Installation, Wire } from '../../document/schema';

/** What a branch consists of. */
export interface Members {
  parts: ReadonlySet<string>;
  /** those that end at one of its parts */
  wires: readonly Wire[];
}

/** By key, what the branches of a home, or of a part of it, consist of; and the wires within its trunk. */
export function membersOf(
  { wires }: Installation,
  { branchOf }: Branches,
): { members: Map<string, Members>; trunkWires: Wire[] } {
  const found = new Map<string, { parts: Set<string>; wires: Wire[] }>();
  for (const [id, key] of branchOf) {
    const entry = found.get(key);
    if (entry) entry.parts.add(id);
    else found.set(key, { parts: new Set([id]), wires: [] });
  }
  const trunkWires: Wire[] = [];
  for (const wire of wires) {
    const key = branchOf.get(wire.from[0]) ?? branchOf.get(wire.to[0]);
    (key === undefined ? trunkWires : found.get(key)!.wires).push(wire);
  }
  return { members: found, trunkWires };
}
