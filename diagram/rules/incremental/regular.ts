import type { Drawn } from '../../circuit/drawn';
import { ohmOf, supplySide } from '../../circuit/way-paths';
import type { Context } from '../context';
import { figuresOf } from '../readings/figures';
import { ownEdges } from '../readings/shared-neutrals';

/**
 * True for a drawing that falls into trunk and branches by its conductors too: nothing that must stay apart is joined, no
 * conductor closes a loop, every wire has two ends, the earth is there, and no point hangs on the trunk itself or shares a
 * neutral of it. Only then does a branch show by itself what is wrong with it.
 */
export function isRegular(context: Context, trunk: ReadonlySet<string>): boolean {
  const { graph, evaluated, earth } = context;
  if (graph.loose.length > 0 || !earth.earthed) return false;
  const inTrunk = (node: number) => trunk.has(graph.partOf[node]!.id);
  return evaluated.every(
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
  );
}

/**
 * What draws over a cable of the trunk, by its line, its neutral or its earth: the current of one such branch moves the
 * figures of the others.
 */
export function leaning(context: Context, trunk: ReadonlySet<string>): Set<string> {
  const { graph } = context;
  const { drawn, earth } = figuresOf(context);
  const outside = supplySide(graph);
  const resists = graph.edges.map(
    ({ a, b }, number) =>
      trunk.has(graph.partOf[a]!.id) &&
      trunk.has(graph.partOf[b]!.id) &&
      !outside.has(number) &&
      ohmOf(graph, number) > 0,
  );
  const leans = ({ part, lineEdges, neutralEdges }: Drawn) =>
    [lineEdges, neutralEdges, earth.path(graph.node(part.id, 'E')) ?? []].some((edges) =>
      edges.some((number) => resists[number]),
    );
  return new Set(drawn.filter((each) => each.isPoint && leans(each)).map(({ part }) => part.id));
}
