import { polesOf } from '../../document/kinds';
import type { Part } from '../../document/schema';
import type { Evaluated, PointState } from '../../circuit/evaluate';
import { isResidual } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** Devices that open line and neutral together. */
const opensBoth = (part: Part): boolean =>
  part.kind === 'rcd' ||
  part.kind === 'rcbo' ||
  ((part.kind === 'mcb' || part.kind === 'isolator') && polesOf(part) === 2);

/** How the way back of a point differs from its way out. */
export interface WayBack {
  /** two-pole devices and plugs that its neutral passes and its line does not */
  foreign: string[];
  /** residual-current devices that its line passes and its neutral does not */
  missed: string[];
  /** residual-current devices whose two poles are passed from opposite ends: there the two currents add up */
  turned: string[];
}

/** By device, whether a path from the source enters its pole at the end with the lower mark. */
function entries({ graph }: Context, from: number, edges: readonly number[]): Map<string, boolean> {
  const found = new Map<string, boolean>();
  let at = from;
  for (const number of edges) {
    const { a, b, part, kind } = graph.edges[number]!;
    if (kind === 'device') found.set(part!, at === a);
    at = at === a ? b : a;
  }
  return found;
}

/** Compares the two ways of a point that is fed. */
export function compareWays(context: Context, state: PointState): WayBack {
  const { graph } = context;
  const { source } = state;
  const out = source ? entries(context, source.line, state.lineEdges) : new Map<string, boolean>();
  const back = source ? entries(context, source.neutral, state.neutralEdges) : new Map<string, boolean>();
  const part = (id: string) => graph.parts.get(id)!;
  const plugs = (edges: readonly number[]) =>
    edges.flatMap((number) => (graph.edges[number]!.kind === 'plug' ? [graph.edges[number]!.part!] : []));
  const line = new Set([...state.lineDevices, ...plugs(state.lineEdges)]);
  const neutral = new Set([...state.neutralDevices, ...plugs(state.neutralEdges)]);
  return {
    foreign: [...neutral].filter((id) => !line.has(id) && (part(id).kind === 'plug' || opensBoth(part(id)))),
    missed: [...line].filter((id) => !neutral.has(id) && isResidual(part(id))),
    turned: [...out].flatMap(([id, entered]) =>
      back.has(id) && back.get(id) !== entered && isResidual(part(id)) ? [id] : [],
    ),
  };
}

/** Points that use each edge of the neutral in a condition. */
const neutralUsers = once(() => new Map<Evaluated, Map<number, Set<string>>>());

function usersOf(context: Context, evaluated: Evaluated): Map<number, Set<string>> {
  const known = neutralUsers(context);
  let users = known.get(evaluated);
  if (users) return users;
  users = new Map();
  for (const state of evaluated.points.values()) {
    for (const edge of state.neutralEdges) {
      const set = users.get(edge) ?? new Set<string>();
      set.add(state.part.id);
      users.set(edge, set);
    }
  }
  known.set(evaluated, users);
  return users;
}

/**
 * The wires nearest to the source that only these points use, below the first neutral bar or two-pole device on their
 * way: where their neutral was led astray.
 */
export function strayWires(context: Context, evaluated: Evaluated, points: readonly string[]): string[] {
  const { graph } = context;
  const users = usersOf(context, evaluated);
  const own = new Set(points);
  const wires = new Set<string>();
  for (const id of points) {
    const { neutralEdges, neutralEnd } = evaluated.points.get(id)!;
    let at = neutralEnd;
    let last: string | undefined;
    for (const number of [...neutralEdges].reverse()) {
      const edge = graph.edges[number]!;
      if (edge.kind === 'device' || [...users.get(number)!].some((user) => !own.has(user))) break;
      if (edge.wire) last = edge.wire.id;
      at = edge.a === at ? edge.b : edge.a;
      if (graph.partOf[at]!.kind === 'neutral-bar') break;
    }
    if (last !== undefined) wires.add(last);
  }
  return [...wires].sort();
}
