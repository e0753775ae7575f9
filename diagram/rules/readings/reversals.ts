import { byDesignation } from '../../document/names';
import { natureOfRole, type Nature } from '../../circuit/natures';
import type { Context } from '../context';
import { once } from './once';

/** Points fed the wrong way round by one crossing of wires. */
export interface Reversal {
  /** by designation */
  points: string[];
  /** the two wires that change places */
  wires: string[];
  conditions: string[];
}

/** The last wire, from the source on, that is still drawn as what it is; the crossing lies at its far end. */
function lastRight(context: Context, path: readonly number[], nature: Nature): string | undefined {
  let last: string | undefined;
  for (const number of path) {
    const { wire } = context.graph.edges[number]!;
    if (!wire) continue;
    if (natureOfRole(wire.role) !== nature) break;
    last = wire.id;
  }
  return last;
}

/** Points fed the wrong way round, together where one crossing turns several; a point stays where it was found first. */
export const reversals = once((context: Context): Reversal[] => {
  const found = new Map<string, { points: Set<string>; wires: string[]; conditions: Set<string> }>();
  const groupOf = new Map<string, string>();
  for (const { condition, points } of context.evaluated) {
    for (const state of points.values()) {
      if (!state.reversed) continue;
      const id = state.part.id;
      const wires = [lastRight(context, state.lineEdges, 'L'), lastRight(context, state.neutralEdges, 'N')].filter(
        (wire) => wire !== undefined,
      );
      const key = groupOf.get(id) ?? (wires.length === 2 ? wires.join(' ') : id);
      const entry = found.get(key) ?? { points: new Set(), wires, conditions: new Set() };
      entry.points.add(id);
      entry.conditions.add(condition.name);
      groupOf.set(id, key);
      found.set(key, entry);
    }
  }
  return [...found.values()].map(({ points, wires, conditions }) => ({
    points: [...points]
      .map((id) => context.graph.parts.get(id)!)
      .sort(byDesignation)
      .map(({ id }) => id),
    wires,
    conditions: [...conditions],
  }));
});

/** Ids of points that are the wrong way round in some condition. */
export const reversedPoints = once(
  (context: Context): ReadonlySet<string> => new Set(reversals(context).flatMap(({ points }) => points)),
);

/** Nodes on the way out and back of points that are the wrong way round: there line and neutral are each other's. */
export const reversedNodes = once((context: Context): ReadonlySet<number> => {
  const nodes = new Set<number>();
  for (const { points } of context.evaluated)
    for (const state of points.values()) {
      if (!state.reversed) continue;
      for (const number of [...state.lineEdges, ...state.neutralEdges]) {
        nodes.add(context.graph.edges[number]!.a);
        nodes.add(context.graph.edges[number]!.b);
      }
    }
  return nodes;
});
