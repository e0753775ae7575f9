import type { Kind, Part } from '../../document/schema';
import type { Graph } from '../../terminals/graph';
import { isOvercurrent } from '../../terminals/roles-of-parts';

/** A home as a trunk with branches. */
export interface Branches {
  /** ids of the parts that the branches hang on: service, bars, residual-current devices, backup */
  trunk: ReadonlySet<string>;
  /** every other part with the key of its branch: parts joined to one another, or by a shared cable, are of one branch */
  branchOf: ReadonlyMap<string, string>;
}

const TRUNK: ReadonlySet<Kind> = new Set<Kind>([
  'supply',
  'fuse',
  'meter',
  'isolator',
  'rcd',
  'spd',
  'line-bar',
  'neutral-bar',
  'earth-bar',
  'electrode',
  'changeover',
  'inverter',
  'battery',
  'bond',
]);

export const isOfTrunk = (part: Part): boolean => TRUNK.has(part.kind);

/** Disjoint sets of numbers. */
function sets(size: number) {
  const leader = Int32Array.from({ length: size }, (_, i) => i);
  const find = (at: number): number => {
    while (leader[at] !== at) at = leader[at] = leader[leader[at]!]!;
    return at;
  };
  return { find, join: (a: number, b: number) => void (leader[find(b)] = find(a)) };
}

/**
 * Parts that must go to the trunk as well: those of a conductor, outside the trunk, that joins two terminals of it. What is
 * left meets the trunk with each conductor at one terminal only, so that it changes no path but its own.
 */
export function carriers(graph: Graph, trunk: ReadonlySet<string>): string[] {
  const inside = graph.partOf.map(({ id }) => trunk.has(id));
  const { find, join } = sets(graph.size);
  for (const { a, b } of graph.edges) if (!inside[a] && !inside[b]) join(a, b);
  const met = new Map<number, number>();
  const carrying = new Set<number>();
  for (const { a, b } of graph.edges) {
    if (inside[a] === inside[b]) continue;
    const [outer, at] = inside[a] ? [find(b), a] : [find(a), b];
    if ((met.get(outer) ?? at) !== at) carrying.add(outer);
    met.set(outer, at);
  }
  if (carrying.size === 0) return [];
  const of = (wanted: (part: Part) => boolean, conductors: ReadonlySet<number>) =>
    graph.partOf.filter((part, node) => !inside[node] && wanted(part) && conductors.has(find(node)));
  // A feeder's device is enough: what follows it hangs on it then.
  const devices = of(isOvercurrent, carrying);
  const told = new Set(devices);
  const rest = new Set(carrying);
  graph.partOf.forEach((part, node) => told.has(part) && rest.delete(find(node)));
  return [...new Set([...devices, ...of(() => true, rest)].map(({ id }) => id))];
}

/** The branches outside a trunk. */
export function branchesOf(graph: Graph, trunk: ReadonlySet<string>): Map<string, string> {
  const parts = graph.document.parts.filter(({ id }) => !trunk.has(id));
  const number = new Map(parts.map(({ id }, i) => [id, i]));
  const { find, join } = sets(parts.length);
  const inCable = new Map<string, number>();
  for (const { a, b, wire } of graph.edges) {
    const ends = [a, b].map((node) => number.get(graph.partOf[node]!.id)).filter((end) => end !== undefined);
    if (ends.length === 2) join(ends[0]!, ends[1]!);
    if (wire?.cable === undefined || ends.length === 0) continue;
    const before = inCable.get(wire.cable);
    if (before === undefined) inCable.set(wire.cable, ends[0]!);
    else join(before, ends[0]!);
  }
  return new Map(parts.map(({ id }, i) => [id, parts[find(i)]!.id]));
}

/** Finds trunk and branches of a home. */
export function findBranches(graph: Graph): Branches {
  const trunk = new Set(graph.document.parts.filter(isOfTrunk).map(({ id }) => id));
  for (let more = carriers(graph, trunk); more.length > 0; more = carriers(graph, trunk)) for (const id of more) trunk.add(id);
  return { trunk, branchOf: branchesOf(graph, trunk) };
}
