import { byCode } from '../document/schema';
import type { Practice } from '../practices/types';
import type { Graph } from '../terminals/graph';
import { spread } from '../terminals/spread';
import type { Drawn } from './drawn';
import { OhmNet, type OhmBranch } from './ohm-net';
import { edgeOhm } from './resistance';
import { demandOf, type WayLoad } from './way-demand';

/** degC, cold conductors: the greatest fault current */
export const COLD_C = 20;

/** True for a wire between two places whose cable is not drawn: its resistance is not known. */
export function lacksCable(graph: Graph, number: number): boolean {
  const { wire } = graph.edges[number]!;
  if (!wire || (wire.cable !== undefined && graph.cables.has(wire.cable))) return false;
  const [from, to] = [wire.from, wire.to].map(([id]) => graph.parts.get(id)?.place);
  return from !== undefined && to !== undefined && from !== to;
}

/** Ohm of an edge; none for contacts and for wires inside a board. */
export function ohmOf(graph: Graph, number: number, temperatureC?: number): number {
  const edge = graph.edges[number]!;
  const cabled = edge.wire?.cable !== undefined && graph.cables.has(edge.wire.cable);
  return cabled ? edgeOhm(graph, edge, temperatureC) : 0;
}

/** m of an edge; 0 without a cable. */
function lengthOf(graph: Graph, number: number): number {
  const { wire } = graph.edges[number]!;
  return (wire?.cable === undefined ? undefined : graph.cables.get(wire.cable)?.length) ?? 0;
}

/** Edges on the supplier's side of the meter: their resistance is within the external loops. */
export function supplySide(graph: Graph): ReadonlySet<number> {
  const supplies = [...graph.parts.values()].filter(({ kind }) => kind === 'supply');
  const poles = supplies.flatMap(({ id }) => ['L', 'N'].map((mark) => graph.node(id, mark)!));
  const isMeter = (part: string | undefined) => part !== undefined && graph.parts.get(part)?.kind === 'meter';
  if (![...graph.parts.values()].some(({ kind }) => kind === 'meter')) return new Set();
  return spread(graph, poles, (edge) => !isMeter(edge.part) && edge.wire?.role !== 'earth').edges;
}

const isSelector = (graph: Graph, node: number): boolean => {
  const { kind } = graph.partOf[node]!;
  return kind === 'switch-2way' || kind === 'switch-cross';
};

/** The paths of one pole, and the wires that close rings among them. */
function branchesOf(
  { graph, apart }: FedInput,
  paths: readonly (readonly number[])[],
  outside: ReadonlySet<number>,
  temperatureC?: number,
): OhmBranch[] {
  const used = new Set(paths.flat());
  const nodes = new Set([...used].flatMap((number) => [graph.edges[number]!.a, graph.edges[number]!.b]));
  graph.edges.forEach(({ a, b, wire }, number) => {
    if (!wire || wire.role === 'strapper' || wire.role === 'earth' || apart.has(number)) return;
    if (nodes.has(a) && nodes.has(b) && !isSelector(graph, a) && !isSelector(graph, b)) used.add(number);
  });
  return [...used].map((number) => {
    const { a, b } = graph.edges[number]!;
    return { a, b, ohm: outside.has(number) ? 0 : ohmOf(graph, number, temperatureC) };
  });
}

/** How something that draws current is fed. */
export interface Fed {
  /** ohm of the line from the origin, hot; null where a cable of it is not known or nothing feeds it */
  r1: number | null;
  /** V lost in line and neutral at the design currents; null where one of them is not known */
  dropV: number | null;
  /** m of cable that the line passes */
  lengthM: number;
  /** V lost in each edge of its path, from the origin on */
  losses: ReadonlyMap<number, number>;
}

export interface FedInput {
  graph: Graph;
  practice: Practice;
  drawn: readonly Drawn[];
  loads: ReadonlyMap<string, WayLoad>;
  /** wires that join what must stay apart: they close no ring */
  apart: ReadonlySet<number>;
}

export interface Paths {
  /** by id of what draws */
  fed: ReadonlyMap<string, Fed>;
  /** ohm of cold line conductors from the mains' origin to a node; undefined where no load is fed over it */
  coldOhm(node: number): number | undefined;
}

/**
 * The share of the currents added up that flows at one moment in an edge which several ways share: their demand together
 * over the sum of their own.
 */
function diversityOfEdges({ practice, drawn, loads }: FedInput): (edge: number) => number {
  const behind = new Map<number, Set<string>>();
  for (const { way, lineEdges, neutralEdges } of drawn) {
    if (way === null) continue;
    for (const edges of [lineEdges, neutralEdges])
      for (const edge of edges) behind.set(edge, (behind.get(edge) ?? new Set()).add(way));
  }
  const ofWays = new Map<string, number>();
  const ofEdge = new Map<number, number>();
  const shareOf = (ways: ReadonlySet<string>): number => {
    const ids = [...ways].sort(byCode);
    const key = ids.join(' ');
    const list = ids.map((id) => loads.get(id)!);
    const sum = list.reduce((total, way) => total + way.demandA, 0);
    const share = ofWays.get(key) ?? (sum > 0 ? demandOf(list, practice).demandA / sum : 1);
    ofWays.set(key, share);
    return share;
  };
  return (edge) => {
    const ways = behind.get(edge);
    if (!ways || ways.size < 2) return 1;
    const share = ofEdge.get(edge) ?? shareOf(ways);
    ofEdge.set(edge, share);
    return share;
  };
}

/** V lost in each edge of a path that begins at `from`; 0 where nothing is lost. */
function lossesAlong(
  graph: Graph,
  from: number,
  edges: readonly number[],
  drops: (node: number) => number,
): [number, number][] {
  let at = from;
  return edges.map((number) => {
    const { a, b } = graph.edges[number]!;
    const next = a === at ? b : a;
    const volts = drops(next) - drops(at);
    at = next;
    return [number, volts];
  });
}

/** Works out how everything that draws is fed: one net a source and pole, with the design currents in it. */
export function workOutPaths(input: FedInput): Paths {
  const { graph, drawn, loads } = input;
  const outside = supplySide(graph);
  const share = diversityOfEdges(input);
  const isKnown = (edges: readonly number[]) =>
    edges.length > 0 && !edges.some((number) => !outside.has(number) && lacksCable(graph, number));
  const fed = new Map<string, Fed>();
  let cold: OhmNet | undefined;

  const sources = new Map(drawn.flatMap(({ source }) => (source ? [[source.part.id, source] as const] : [])));
  for (const [id, source] of sources) {
    const here = drawn.filter((each) => each.source?.part.id === id);
    const lines = here.map(({ lineEdges }) => lineEdges);
    const line = new OhmNet(branchesOf(input, lines, outside), source.line);
    const neutral = new OhmNet(
      branchesOf(
        input,
        here.map(({ neutralEdges }) => neutralEdges),
        outside,
      ),
      source.neutral,
    );
    if (source.kind === 'mains') cold ??= new OhmNet(branchesOf(input, lines, outside, COLD_C), source.line);

    const designA = ({ way, amps }: Drawn) => {
      const load = way === null ? undefined : loads.get(way);
      return amps * (load && load.amps > 0 ? load.demandA / load.amps : 1);
    };
    const dropsIn = (net: OhmNet, end: (each: Drawn) => number) => {
      const amps = new Map<number, number>();
      for (const each of here) amps.set(end(each), (amps.get(end(each)) ?? 0) + designA(each));
      return net.drops(amps);
    };
    const lineDrops = dropsIn(line, ({ lineEnd }) => lineEnd);
    const neutralDrops = dropsIn(neutral, ({ neutralEnd }) => neutralEnd);

    for (const each of here) {
      const losses = new Map<number, number>();
      for (const [number, volts] of [
        ...lossesAlong(graph, source.line, each.lineEdges, lineDrops),
        ...lossesAlong(graph, source.neutral, each.neutralEdges, neutralDrops),
      ])
        if (volts !== 0) losses.set(number, volts * share(number));
      const load = each.way === null ? undefined : loads.get(each.way);
      const dropKnown = isKnown(each.lineEdges) && isKnown(each.neutralEdges) && (load?.known ?? each.known);
      fed.set(each.part.id, {
        r1: isKnown(each.lineEdges) ? (line.ohmTo(each.lineEnd) ?? null) : null,
        dropV: dropKnown ? [...losses.values()].reduce((sum, volts) => sum + volts, 0) : null,
        lengthM: each.lineEdges.reduce((sum, number) => sum + (outside.has(number) ? 0 : lengthOf(graph, number)), 0),
        losses,
      });
    }
  }
  return { fed, coldOhm: (node) => cold?.ohmTo(node) };
}
