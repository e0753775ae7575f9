import { byDesignation } from '../../document/names';
import type { Evaluated, PointState } from '../../circuit/evaluate';
import type { Graph } from '../../terminals/graph';
import type { Context } from '../context';
import type { NeutralFault } from './neutral-faults';
import { once } from './once';

/** Overcurrent devices before each overcurrent device. */
export const forebears = once(({ sections }: Context): Map<string, Set<string>> => {
  const parents = new Map<string, string[]>();
  for (const { device, next } of sections)
    for (const id of next) parents.set(id, [...(parents.get(id) ?? []), device.id]);
  const all = new Map<string, Set<string>>();
  for (const { device } of sections) {
    const seen = new Set<string>();
    const queue = [...(parents.get(device.id) ?? [])];
    for (const id of queue) {
      if (seen.has(id) || id === device.id) continue;
      seen.add(id);
      queue.push(...(parents.get(id) ?? []));
    }
    all.set(device.id, seen);
  }
  return all;
});

/** The one device whose line core runs in a cable with a single neutral core: the neutral is its own. */
const cableOwners = once((context: Context): Map<string, string> => {
  const { graph } = context;
  const lines = new Map<string, Set<string>>();
  const neutrals = new Map<string, number>();
  for (const section of context.sections)
    for (const number of section.edges) {
      const cable = graph.edges[number]!.wire?.cable;
      if (cable) lines.set(cable, (lines.get(cable) ?? new Set<string>()).add(section.device.id));
    }
  for (const { cable, role } of graph.wires.values())
    if (cable && role === 'neutral') neutrals.set(cable, (neutrals.get(cable) ?? 0) + 1);
  const owners = new Map<string, string>();
  for (const [cable, devices] of lines)
    if (devices.size === 1 && neutrals.get(cable) === 1) owners.set(cable, [...devices][0]!);
  return owners;
});

const placesWithBars = once(
  ({ document }: Context) =>
    new Set(document.parts.filter(({ kind }) => kind === 'neutral-bar').map(({ place }) => place)),
);

/** True when an edge comes into a place from outside: in a cable, or from another place. */
function entersBoard({ graph }: Context, number: number, at: number, place: string | undefined): boolean {
  const { wire, a, b } = graph.edges[number]!;
  return wire !== undefined && (wire.cable !== undefined || graph.partOf[a === at ? b : a]!.place !== place);
}

/** True when a joint stands where a neutral bar would: nothing but short wires lie between it and the next device. */
function servesAsBar({ graph }: Context, state: PointState, joint: number): boolean {
  let at = joint;
  for (let i = pathIndex(graph, state, joint); i >= 0; i--) {
    const edge = graph.edges[state.neutralEdges[i]!]!;
    if (edge.kind !== 'wire') return edge.kind === 'device';
    at = edge.a === at ? edge.b : edge.a;
    if (edge.wire!.cable !== undefined || graph.partOf[at]!.kind === 'neutral-bar') return false;
  }
  return true;
}

/** Index of the edge that leads from a node of a point's way back towards the source. */
function pathIndex(graph: Graph, state: PointState, node: number): number {
  let at = state.neutralEnd;
  for (let i = state.neutralEdges.length - 1; i >= 0; i--) {
    if (at === node) return i;
    const edge = graph.edges[state.neutralEdges[i]!]!;
    at = edge.a === at ? edge.b : edge.a;
  }
  return -1;
}

/**
 * The neutral edges of a point that belong to its way alone: from the point up to the neutral bar of the board that its
 * device stands in, or to the first device. Beyond them ways share a bar rightly.
 */
export function ownEdges(context: Context, state: PointState): number[] {
  const { graph } = context;
  const device = graph.parts.get(state.overcurrent ?? '');
  const place = device?.place;
  const boardHasBar = placesWithBars(context).has(place);
  const edges: number[] = [];
  let at = state.neutralEnd;
  for (const number of [...state.neutralEdges].reverse()) {
    const edge = graph.edges[number]!;
    if (edge.kind === 'device' || edge.kind === 'through' || edge.kind === 'changeover') break;
    edges.push(number);
    at = edge.a === at ? edge.b : edge.a;
    const part = graph.partOf[at]!;
    if (part.kind === 'neutral-bar' && (part.place === place || part.place === undefined || place === undefined)) break;
    if (part.place !== place || part.id === state.part.id) continue;
    if (!boardHasBar && (part.kind === 'joint' || part.kind === 'socket')) break;
    if (part.kind === 'joint' && entersBoard(context, number, at, place) && servesAsBar(context, state, at)) break;
  }
  return edges;
}

/** How every point is fed, in each position of its switches that brings it through other devices. */
export const feedsIn = ({ points, otherwise }: Evaluated): Iterable<PointState> =>
  otherwise.size === 0 ? points.values() : [...points.values(), ...[...otherwise.values()].flat()];

/** Ways that use each own edge, the owner of its cable among them; a way before another stands for both. */
function waysOfEdges(context: Context, evaluated: Evaluated): Map<number, Map<string, string[]>> {
  const users = new Map<number, Map<string, string[]>>();
  for (const state of feedsIn(evaluated)) {
    if (!state.fed || !state.overcurrent) continue;
    for (const number of ownEdges(context, state)) {
      const ways = users.get(number) ?? new Map<string, string[]>();
      ways.set(state.overcurrent, [...(ways.get(state.overcurrent) ?? []), state.part.id]);
      users.set(number, ways);
    }
  }
  const before = forebears(context);
  for (const [number, ways] of users) {
    const owner = cableOwners(context).get(context.graph.edges[number]!.wire?.cable ?? '');
    if (owner !== undefined && !ways.has(owner)) ways.set(owner, []);
    for (const [way, ids] of [...ways]) {
      const elder = [...ways.keys()].find((other) => before.get(way)?.has(other));
      if (elder === undefined) continue;
      ways.delete(way);
      ways.set(elder, [...(ways.get(elder) ?? []), ...ids]);
    }
  }
  return users;
}

function ownerOf(context: Context, edges: readonly number[], ways: ReadonlyMap<string, string[]>): string {
  const byCable = edges
    .map((number) => cableOwners(context).get(context.graph.edges[number]!.wire?.cable ?? ''))
    .find((id) => id !== undefined && ways.has(id));
  if (byCable !== undefined) return byCable;
  const devices = [...ways.keys()].map((id) => context.graph.parts.get(id)!).sort(byDesignation);
  return devices.reduce((best, device) => (ways.get(device.id)!.length > ways.get(best.id)!.length ? device : best)).id;
}

/** Points that return through the neutral core of another way, though both hang on one bar. */
export const sharedNeutrals = once((context: Context): NeutralFault[] => {
  const found = new Map<string, NeutralFault>();
  for (const evaluated of context.evaluated) {
    if (evaluated.condition.base !== 'mains') continue;
    const users = waysOfEdges(context, evaluated);
    const shared = new Set([...users].filter(([, ways]) => ways.size > 1).map(([number]) => number));
    if (shared.size === 0) continue;
    for (const state of feedsIn(evaluated)) {
      if (!state.fed || !state.overcurrent) continue;
      const own = ownEdges(context, state);
      const trunk = own.filter((number) => shared.has(number));
      if (trunk.length === 0) continue;
      const ways = users.get(trunk.at(-1)!)!;
      const owner = ownerOf(context, [...trunk].reverse(), ways);
      if (owner === state.overcurrent || forebears(context).get(state.overcurrent)?.has(owner)) continue;
      const lone = own.filter((number) => !shared.has(number)).map((number) => context.graph.edges[number]!.wire?.id);
      const wire = lone.findLast((id) => id !== undefined);
      const key = `${owner} ${state.overcurrent}`;
      const fault = found.get(key) ?? {
        kind: 'borrowed',
        points: [],
        wires: [],
        devices: [owner],
        foreign: true,
        conditions: [],
      };
      if (!fault.points.includes(state.part.id)) fault.points.push(state.part.id);
      if (wire !== undefined && !fault.wires.includes(wire)) fault.wires.push(wire);
      if (!fault.conditions.includes(evaluated.condition.name)) fault.conditions.push(evaluated.condition.name);
      found.set(key, fault);
    }
  }
  return [...found.values()];
});
