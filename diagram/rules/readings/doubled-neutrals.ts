import { isBar } from '../../document/kinds';
import type { Evaluated } from '../../circuit/evaluate';
import { isResidual } from '../../terminals/roles-of-parts';
import { pathTo, reaches } from '../../terminals/reach';
import { spread } from '../../terminals/spread';
import type { Context } from '../context';
import { lineLoops } from './line-loops';
import type { NeutralFault } from './neutral-faults';
import { once } from './once';
import { forebears } from './shared-neutrals';

interface Side {
  /** devices from the source to here, and whether an inverter is among them */
  devices: string[];
  backup: boolean;
  bar: boolean;
  /** points and their ways on this branch of the neutral, up to its bar */
  points: string[];
  ways: Set<string>;
}

function sideOf(context: Context, { stands, points, condition }: Evaluated, node: number): Side | undefined {
  const { graph } = context;
  const stand = stands[0]!;
  const source = condition.sources.findIndex((_, i) => reaches(stand.neutral[i]!, node));
  if (source < 0) return undefined;
  const path = pathTo(graph, stand.neutral[source]!, node).map((number) => graph.edges[number]!);
  const bar = (at: number) => graph.partOf[at]!.kind === 'neutral-bar';
  const branch = spread(
    graph,
    [node],
    (edge, number) => stand.closed[number] !== 0 && edge.kind !== 'device' && edge.kind !== 'through',
    bar,
  );
  const behind = [...points.values()].filter((state) => state.fed && branch.nodes.has(state.neutralEnd));
  return {
    devices: path.flatMap((edge) => (edge.kind === 'device' ? [edge.part!] : [])),
    backup: path.some((edge) => edge.kind === 'through'),
    bar: bar(node),
    points: behind.map(({ part }) => part.id),
    ways: new Set(behind.flatMap(({ overcurrent }) => overcurrent ?? [])),
  };
}

const without = (a: readonly string[], b: readonly string[]) => a.filter((id) => !b.includes(id));

/** What a second joint of two neutrals does; undefined where it is only a ring or a second core of one way. */
function judge(context: Context, a: Side, b: Side): Pick<NeutralFault, 'kind' | 'devices' | 'foreign'> | undefined {
  const isRcd = (id: string) => isResidual(context.graph.parts.get(id)!);
  const apart = [without(a.devices, b.devices), without(b.devices, a.devices)] as const;
  const rcds = apart.map((ids) => ids.filter(isRcd));
  if (rcds[0]!.length + rcds[1]!.length > 0) {
    const devices = [...rcds[0]!, ...rcds[1]!];
    if (a.backup !== b.backup) return { kind: 'behind', devices, foreign: true };
    const both = rcds[0]!.length > 0 && rcds[1]!.length > 0;
    return both ? { kind: 'borrowed', devices, foreign: true } : { kind: 'imbalance', devices, foreign: false };
  }
  if (a.bar || b.bar || a.backup !== b.backup) return undefined;
  // A device behind another one shares its neutral rightly: a spur from a ring by a fuse of its own.
  const before = forebears(context);
  const related = (way: string, other: string) => before.get(way)?.has(other) || before.get(other)?.has(way);
  const foreign = [...b.ways].filter((way) => !a.ways.has(way) && ![...a.ways].some((other) => related(way, other)));
  if (foreign.length === 0 || a.ways.size === 0) return undefined;
  return { kind: 'borrowed', devices: [...a.ways, ...foreign].sort(), foreign: true };
}

const partsAt = ({ graph }: Context, edge: number): string[] =>
  [graph.edges[edge]!.a, graph.edges[edge]!.b]
    .map((node) => graph.partOf[node]!)
    .filter(({ kind }) => !isBar(kind))
    .map(({ id }) => id);

/** Neutrals of two ways, or of two residual-current devices, joined by a second wire. */
export const doubledNeutrals = once((context: Context): NeutralFault[] => {
  const { graph } = context;
  const found = new Map<string, NeutralFault>();
  // A two-pole device or plug that joins the lines joins the neutrals with them: one cause, told by the lines.
  const joined = new Set(lineLoops(context).flatMap(({ edge }) => partsAt(context, edge)));
  for (const evaluated of context.evaluated) {
    if (evaluated.condition.base !== 'mains') continue;
    for (const { edge } of evaluated.neutralLoops) {
      const { a, b, wire } = graph.edges[edge]!;
      if (partsAt(context, edge).some((id) => joined.has(id))) continue;
      const [one, other] = [sideOf(context, evaluated, a), sideOf(context, evaluated, b)];
      if (!one || !other || !wire) continue;
      const verdict = judge(context, one, other);
      if (!verdict) continue;
      const fault = found.get(wire.id) ?? {
        ...verdict,
        link: true,
        points: [graph.partOf[a]!.id, graph.partOf[b]!.id],
        wires: [wire.id],
        conditions: [],
      };
      fault.conditions.push(evaluated.condition.name);
      found.set(wire.id, fault);
    }
  }
  const all = context.evaluated.map(({ condition }) => condition.name);
  return [...found.values()].map((fault) => (fault.kind === 'behind' ? { ...fault, conditions: all } : fault));
});
