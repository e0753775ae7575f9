import { ohmOf, supplySide } from '../../circuit/way-paths';
import type { Context } from '../context';
import { branchesIn } from '../readings/branch-nets';
import { figuresOf } from '../readings/figures';
import { neutralFaults } from '../readings/neutral-faults';
import { once } from '../readings/once';
import { ownEdges } from '../readings/shared-neutrals';

/**
 * True for a drawing that falls into trunk and branches by its conductors too: nothing that must stay apart is joined, no
 * conductor closes a loop, every wire has two ends, the earth is there, no neutral goes astray, and no point hangs on the
 * trunk itself or shares a neutral of it. Only then does a branch show by itself what is wrong with it.
 */
export function isRegular(context: Context, trunk: ReadonlySet<string>): boolean {
  const { graph, evaluated, earth } = context;
  if (graph.loose.length > 0 || !earth.earthed) return false;
  const inTrunk = (node: number) => trunk.has(graph.partOf[node]!.id);
  return (
    evaluated.every(
      ({ condition, crossed, lineLoops, neutralLoops, stands, points }) =>
        crossed.length + lineLoops.length + neutralLoops.length === 0 &&
        stands.every(({ shorted }) => !shorted) &&
        [...points.values()].every(
          (state) =>
            (state.overcurrent === null || !trunk.has(state.overcurrent)) &&
            (condition.base !== 'mains' ||
              !state.fed ||
              ownEdges(context, state).every(
                (number) => !inTrunk(graph.edges[number]!.a) || !inTrunk(graph.edges[number]!.b),
              )),
        ),
    ) && neutralFaults(context).length === 0
  );
}

/** By key of a branch, the wires of the trunk, in a cable, that its points draw over; a branch without any is left out. */
export type Leaning = ReadonlyMap<string, ReadonlySet<string>>;

/** Finds what leans: the current of one such branch moves the volts that others lose. */
export const leaning = once((context: Context): Leaning => {
  const { graph } = context;
  const { trunk, branchOf } = branchesIn(context);
  const outside = supplySide(graph);
  const resists = new Map<number, string>();
  graph.edges.forEach(({ a, b, wire }, number) => {
    if (!wire || outside.has(number) || !trunk.has(graph.partOf[a]!.id) || !trunk.has(graph.partOf[b]!.id)) return;
    if (ohmOf(graph, number) > 0) resists.set(number, wire.id);
  });
  const found = new Map<string, Set<string>>();
  for (const { part, isPoint, lineEdges, neutralEdges } of figuresOf(context).drawn) {
    const key = branchOf.get(part.id);
    if (!isPoint || key === undefined) continue;
    for (const edges of [lineEdges, neutralEdges])
      for (const number of edges) {
        const wire = resists.get(number);
        if (wire !== undefined) found.set(key, (found.get(key) ?? new Set()).add(wire));
      }
  }
  return found;
});
