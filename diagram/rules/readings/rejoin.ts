import type { End } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { potentials } from './potentials';
import { barsWhere, cableFrom, freeNumber, joinTo } from './rewire';

/** At most so many joints and bars are tried for one gap. */
const MOST = 6;

/**
 * "Join JN11 to NB": the stretch that ends open is joined to a joint of the same place that has what it lacks, or to a bar of the
 * board in the cable of its line. Whether one is right shows when the home is examined with it.
 */
export function rejoin(
  context: Context,
  role: 'line' | 'neutral',
  { points, gap }: { points: readonly string[]; gap: readonly string[] },
): Remedy[] {
  const { graph } = context;
  const alive = role === 'line' ? potentials(context).line : potentials(context).neutral;
  const from = openEnd(context, role, gap[0] ?? points[0]!);
  if (!from) return [];
  const place = graph.parts.get(from[0])!.place;
  const near = barsWhere(context, (part, node) => part.place === place && alive[node] === 1);
  const barKind = role === 'line' ? 'line-bar' : 'neutral-bar';
  const bars = barsWhere(context, (part, node) => part.kind === barKind && part.place !== place && alive[node] === 1);
  const state = context.evaluated[0]!.points.get(points[0]!);
  const inCable =
    role === 'line'
      ? []
      : bars.flatMap((bar) => {
          const cable = cableFrom(context, state, bar.place);
          return cable ? joinTo(context, role, from, bar.id, cable) : [];
        });
  const inPlace = near.flatMap(({ id }) => joinTo(context, role, from, id));
  return (inPlace.length > 0 ? inPlace : inCable).slice(0, MOST);
}

/** The free terminal of a part at which the stretch ends. */
function openEnd(context: Context, role: 'line' | 'neutral', id: string): End | undefined {
  const { graph, document } = context;
  const part = graph.parts.get(id)!;
  if (graph.node(id, '1') !== undefined && (part.kind === 'joint' || part.kind.endsWith('-bar')))
    return [id, String(freeNumber(context, id))];
  const wired = new Set(
    document.wires.flatMap(({ from, to }) => [from, to]).flatMap(([each, mark]) => (each === id ? [mark] : [])),
  );
  const marks = role === 'line' ? ['L', '1', '2', 'C', 'in.L'] : ['N', '3', '4', '2', 'in.N'];
  const mark = marks.find((each) => graph.node(id, each) !== undefined && !wired.has(each));
  return mark === undefined ? undefined : [id, mark];
}
