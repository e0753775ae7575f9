import { natureOfNode, natureOfRole, type Nature } from '../../circuit/natures';
import type { Edge } from '../../terminals/graph';
import { isPoint } from '../../terminals/roles-of-parts';
import { spread } from '../../terminals/spread';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { onMains } from './figures';
import { once } from './once';
import { potentialsIn } from './potentials';
import { barsWhere, moveTo, withEnd } from './rewire';
import { say } from './words';

/** A conductor that is landed on the wrong terminal at its head: all that hangs on it is something else than drawn. */
export interface Misled {
  /** the wire whose end is wrong, and the part at which it is */
  wire: string;
  at: string;
  drawn: 'L' | 'N';
  /** what it is on mains */
  is: Nature;
  /** the stretch behind it, drawn as one thing and joined to another */
  nodes: ReadonlySet<number>;
  wires: ReadonlySet<string>;
}

/** Line conductors led from neutral or earth, and neutrals led from line: by the one wire that is landed wrongly. */
export const misledStretches = once((context: Context): Misled[] => {
  const { graph, evaluated } = context;
  const mains = onMains(context);
  const found = potentialsIn(context, mains);
  const at: Record<'L' | 'N' | 'E', Uint8Array> = { L: found.line, N: found.neutral, E: found.earth };
  const isOnly = (node: number): Nature | undefined => {
    const natures = (['L', 'N', 'E'] as const).filter((nature) => at[nature][node] === 1);
    return natures.length === 1 ? natures[0] : undefined;
  };
  const isFed = (id: string) =>
    evaluated.some(({ condition, points }) => condition.base === 'mains' && points.get(id)!.fed);

  const stretches: Misled[] = [];
  graph.edges.forEach(({ wire, a, b }) => {
    const drawn = wire && natureOfRole(wire.role);
    if (!wire || (drawn !== 'L' && drawn !== 'N')) return;
    for (const [end, other] of [
      [a, b],
      [b, a],
    ] as const) {
      const nature = natureOfNode(graph, end);
      const is = isOnly(end);
      if (nature === undefined || nature === drawn || is === undefined || is === drawn) continue;
      // A neutral that ends on earth is a way back of a sort: it is told as such.
      if (drawn === 'N' && is !== 'L') continue;
      if ((natureOfNode(graph, other) ?? drawn) !== drawn) continue;
      const follows = (edge: Edge) =>
        edge.wire ? natureOfRole(edge.wire.role) === drawn : edge.kind !== 'bond' && edge.kind !== 'ground';
      const stops = (node: number) => at[drawn][node] === 1 || (natureOfNode(graph, node) ?? drawn) !== drawn;
      const { nodes, edges } = spread(graph, [other], follows, stops);
      const points = [...nodes].flatMap((node) => {
        const part = graph.partOf[node]!;
        return isPoint(part) && graph.markOf[node] === drawn ? [part.id] : [];
      });
      if (points.length === 0 || points.some(isFed)) continue;
      const wires = new Set([...edges].flatMap((number) => graph.edges[number]!.wire?.id ?? []));
      stretches.push({ wire: wire.id, at: graph.partOf[end]!.id, drawn, is, nodes, wires: wires.add(wire.id) });
    }
  });
  return stretches;
});

/**
 * "Move the line to SUP": the wrong end led to where such a conductor begins, at the same part or on a live bar beside
 * it.
 */
export function misledRemedies(context: Context, { wire: id, at, drawn, is }: Misled): Remedy[] {
  const { graph, document } = context;
  const wire = graph.wires.get(id)!;
  const end = [wire.from, wire.to].find(([part, mark]) => part === at && isWrong(graph, part, mark, drawn))!;
  const what = drawn === 'L' ? 'the line' : 'the neutral';
  const wired = (mark: string) =>
    document.wires.some(({ from, to }) => [from, to].some((each) => each[0] === at && each[1] === mark));
  const part = graph.parts.get(at)!;
  if (part.kind === 'supply' && !wired(drawn))
    return [
      {
        label: `Move ${what} from ${is} to ${drawn} of ${say(context, at)}`,
        patch: { set: { wires: [withEnd(wire, end, [at, drawn])] } },
      },
    ];
  const alive = potentialsIn(context, onMains(context))[drawn === 'L' ? 'line' : 'neutral'];
  const kind = drawn === 'L' ? 'line-bar' : 'neutral-bar';
  return barsWhere(context, (bar, node) => bar.kind === kind && bar.place === part.place && alive[node] === 1).flatMap(
    (bar) => moveTo(context, what, [{ wire, at: end }], bar.id),
  );
}

const isWrong = (graph: Context['graph'], part: string, mark: string, drawn: 'L' | 'N'): boolean =>
  natureOfNode(graph, graph.node(part, mark)!) !== drawn;
