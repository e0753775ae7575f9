import type { Kind, Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { isOvercurrent } from '../terminals/roles-of-parts';

/** By id, the key of a part's branch; parts of the trunk have none. */
export type BranchOf = ReadonlyMap<string, string>;

/** A home as a trunk with branches. */
export interface Branches {
  /** ids of the parts that the branches hang on: service, bars, residual-current devices, backup */
  trunk: ReadonlySet<string>;
  /** parts joined to one another outside the trunk, or by a shared cable, are of one branch */
  branchOf: BranchOf;
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
 * The conductors outside a trunk that join two terminals of it. What is left meets the trunk with each conductor at one
 * terminal only, so that it changes no path but its own.
 */
function carrying(graph: Graph, trunk: ReadonlySet<string>) {
  const inside = graph.partOf.map(({ id }) => trunk.has(id));
  const { find, join } = sets(graph.size);
  for (const { a, b } of graph.edges) if (!inside[a] && !inside[b]) join(a, b);
  const met = new Map<number, number>();
  const conductors = new Set<number>();
  for (const { a, b } of graph.edges) {
    if (inside[a] === inside[b]) continue;
    const [outer, at] = inside[a] ? [find(b), a] : [find(a), b];
    if ((met.get(outer) ?? at) !== at) conductors.add(outer);
    met.set(outer, at);
  }
  return { inside, conductorOf: find, conductors };
}

/** Parts that must go to the trunk as well: those of a conductor that joins two terminals of it. */
function carriers(graph: Graph, trunk: ReadonlySet<string>): string[] {
  const { inside, conductorOf, conductors } = carrying(graph, trunk);
  if (conductors.size === 0) return [];
  const of = (wanted: (part: Part) => boolean, among: ReadonlySet<number>) =>
    graph.partOf.filter((part, node) => !inside[node] && wanted(part) && among.has(conductorOf(node)));
  // A feeder's device is enough: what follows it hangs on it then.
  const devices = of(isOvercurrent, conductors);
  const told = new Set(devices);
  const rest = new Set(conductors);
  graph.partOf.forEach((part, node) => told.has(part) && rest.delete(conductorOf(node)));
  return [...new Set([...devices, ...of(() => true, rest)].map(({ id }) => id))];
}

/** The branches outside a trunk. */
export function branchesOf(graph: Graph, trunk: ReadonlySet<string>): Map<string, string> {
  const parts = graph.document.parts.filter(({ id }) => !trunk.has(id));
  const number = new Map(parts.map(({ id }, i) => [id, i]));
  const { find, join } = sets(parts.length);
  const inCable = new Map<string, number>();
  for (const { a, b, wire } of graph.edges) {
    const [one, other] = [number.get(graph.partOf[a]!.id), number.get(graph.partOf[b]!.id)];
    if (one !== undefined && other !== undefined) join(one, other);
    const end = one ?? other;
    if (wire?.cable === undefined || end === undefined) continue;
    const before = inCable.get(wire.cable);
    if (before === undefined) inCable.set(wire.cable, end);
    else join(before, end);
  }
  return new Map(parts.map(({ id }, i) => [id, parts[find(i)]!.id]));
}

/** Finds trunk and branches of a home. @param known ids of what must be of the trunk; by its kind, where not given */
export function findBranches(graph: Graph, known?: ReadonlySet<string>): Branches {
  const trunk = new Set(known ?? graph.document.parts.filter(isOfTrunk).map(({ id }) => id));
  for (let more = carriers(graph, trunk); more.length > 0; more = carriers(graph, trunk))
    for (const id of more) trunk.add(id);
  return { trunk, branchOf: branchesOf(graph, trunk) };
}

/**
 * The limbs of a trunk: a residual-current device with the bars that hang on it alone. Like a branch, a limb meets the
 * rest of the trunk with each conductor at one terminal only.
 * @returns by id of a part of a limb the limb's device
 */
export function findLimbs(graph: Graph, { trunk }: Branches): ReadonlyMap<string, string> {
  const isBar = ({ kind }: Part) => kind === 'line-bar' || kind === 'neutral-bar';
  const isDevice = ({ id, kind }: Part) => kind === 'rcd' && trunk.has(id);
  // Bars joined to one another stand or fall together: what they meet is asked of all of them.
  const { find, join } = sets(graph.size);
  for (const { a, b } of graph.edges) if (isBar(graph.partOf[a]!) && isBar(graph.partOf[b]!)) join(a, b);
  const hangOn = new Map<number, Set<string>>();
  const meet = (bar: number, other: number) => {
    const part = graph.partOf[other]!;
    if (!isBar(graph.partOf[bar]!) || isBar(part) || !trunk.has(part.id)) return;
    hangOn.set(find(bar), (hangOn.get(find(bar)) ?? new Set()).add(part.id));
  };
  for (const { a, b } of graph.edges) {
    meet(a, b);
    meet(b, a);
  }
  const limbOf = new Map<string, string>();
  graph.partOf.forEach((part, node) => {
    if (isDevice(part)) limbOf.set(part.id, part.id);
    const [device, ...others] = isBar(part) ? (hangOn.get(find(node)) ?? []) : [];
    if (device !== undefined && others.length === 0 && isDevice(graph.parts.get(device)!)) limbOf.set(part.id, device);
  });
  const { conductorOf, conductors } = carrying(graph, new Set([...trunk].filter((id) => !limbOf.has(id))));
  const stiff = new Set(
    graph.partOf.flatMap(({ id }, node) =>
      limbOf.has(id) && conductors.has(conductorOf(node)) ? [limbOf.get(id)!] : [],
    ),
  );
  return new Map([...limbOf].filter(([, limb]) => !stiff.has(limb)));
}
