import { size, type Steady } from '../circuit/steady';
import type { Role, Wire } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { reach, reaches, type Reach } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';

/** V to true earth above which a conductor counts as live: the touch voltage that may stand, IEC 60364-4-41, 411.5.3. */
export const LIVE_VOLTS = 50;
/** A below which nothing is said to flow: a milliampere. */
export const NOTHING_A = 1e-3;

/**
 * How a conductor stands: `live`; `return`, a neutral of something live; `dead`; `plain`, an earth, which has no source and
 * is never dotted.
 */
export type State = 'live' | 'return' | 'dead' | 'plain';

export interface WireFigures {
  state: State;
  /** V against the neutral of its source; to true earth where no source's line reaches it */
  volts: number;
  amps: number;
  /** ids of the sources whose line is joined to it, mains first; empty where it is live through a load, or dead */
  from: readonly string[];
}

export interface PartFigures {
  state: State;
  from: readonly string[];
  /** V and A of a load or outlet */
  load?: { volts: number; amps: number; works: boolean };
  /** V of its case to true earth; absent where it has none */
  caseVolts?: number;
}

/** What is live and what flows, for every wire and part; plain data, to be sent from a worker. */
export interface Figures {
  wires: Readonly<Record<string, WireFigures>>;
  parts: Readonly<Record<string, PartFigures>>;
  /** A that each source drives, by its id */
  sources: Readonly<Record<string, number>>;
}

type Conductor = 'line' | 'neutral' | 'earth' | 'dc';
const CONDUCTOR: Readonly<Record<Role, Conductor>> = {
  line: 'line',
  switched: 'line',
  strapper: 'line',
  neutral: 'neutral',
  earth: 'earth',
  'dc+': 'dc',
  'dc-': 'dc',
};

const isEarthMark = (mark: string): boolean => mark === 'E' || mark.endsWith('.E');

/** What hangs on batteries, over closed contacts: never dead, whatever else is open. */
function reachFromBatteries(graph: Graph, closed: Uint8Array): Reach {
  const starts: number[] = [];
  graph.partOf.forEach((part, node) => part.kind === 'battery' && starts.push(node));
  const apart = closed.slice();
  graph.edges.forEach(({ kind }, number) => {
    if (kind !== 'wire' && kind !== 'device') apart[number] = 0;
  });
  return reach(graph, starts, apart);
}

const EARTHED: ReadonlySet<string> = new Set(['earth-bar', 'electrode', 'bond']);

/** Ids of parts at which nothing but earth is joined. */
function jointsOfEarth(graph: Graph): Set<string> {
  const earth = new Set<string>();
  const other = new Set<string>();
  for (const { role, from, to } of graph.wires.values())
    for (const [id] of [from, to]) (role === 'earth' ? earth : other).add(id);
  return new Set([...earth].filter((id) => !other.has(id)));
}

/** Reads a solved home. Deterministic: the order of everything follows the graph, whose ids are sorted. */
export function readFigures(graph: Graph, steady: Steady): Figures {
  const { condition, closed } = steady.standing;
  const lines = condition.sources.map((source) => ({ source, walk: reach(graph, [source.line], closed) }));
  const batteries = reachFromBatteries(graph, closed);
  const sourcesOf = (node: number) => lines.filter(({ walk }) => reaches(walk, node)).map(({ source }) => source);
  const toEarth = (node: number) => size(steady.volts(node));
  const isLive = (node: number) => lines.some(({ walk }) => reaches(walk, node)) || toEarth(node) > LIVE_VOLTS;

  const wires: Record<string, WireFigures> = {};
  const neutrals: Wire[] = [];
  /** cables with a live line, and parts with a live terminal: their neutrals are returns */
  const liveCables = new Set<string>();
  for (const wire of graph.wires.values()) {
    const { a, b } = graph.edges[graph.edgeOfWire.get(wire.id)!]!;
    const conductor = CONDUCTOR[wire.role];
    const amps = steady.wireAmps(wire.id);
    if (conductor === 'dc') {
      const state = reaches(batteries, a) || reaches(batteries, b) ? 'live' : 'dead';
      wires[wire.id] = { state, volts: 0, amps: 0, from: [] };
      continue;
    }
    const sources = conductor === 'earth' ? [] : sourcesOf(a);
    const source = sources[0];
    const volts = source ? steady.between(a, source.neutral) : Math.max(toEarth(a), toEarth(b));
    const live = sources.length > 0 || volts > LIVE_VOLTS;
    const state: State = live ? 'live' : conductor === 'earth' ? 'plain' : 'dead';
    wires[wire.id] = { state, volts, amps, from: sources.map(({ part }) => part.id) };
    if (live && conductor === 'line' && wire.cable !== undefined) liveCables.add(wire.cable);
    if (conductor === 'neutral' && !live) neutrals.push(wire);
  }

  const parts: Record<string, PartFigures> = {};
  const earthJoints = jointsOfEarth(graph);
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    const figures = (parts[part.id] ??= { state: 'plain', from: [] });
    if (isEarthMark(mark)) return;
    if (reaches(batteries, node)) {
      figures.state = 'live';
      return;
    }
    const from = sourcesOf(node).map(({ part: { id } }) => id);
    figures.from = [...new Set([...figures.from, ...from])];
    const earthed = EARTHED.has(part.kind) || (part.kind === 'joint' && earthJoints.has(part.id));
    if (isLive(node)) figures.state = 'live';
    else if (figures.state === 'plain' && !earthed) figures.state = 'dead';
  });

  // A neutral is a return where current comes home by it, or where it lies beside a live line or ends at what is live.
  const endsLive = ({ from, to }: Wire) =>
    [from, to].some(([id]) => parts[id]!.state === 'live' && graph.parts.get(id)!.kind !== 'supply');
  for (const wire of neutrals) {
    const beside = wire.cable === undefined ? endsLive(wire) : liveCables.has(wire.cable);
    if (wires[wire.id]!.amps >= NOTHING_A || beside) wires[wire.id]!.state = 'return';
  }
  for (const wire of neutrals) {
    if (wires[wire.id]!.state !== 'return') continue;
    for (const [id] of [wire.from, wire.to]) {
      const kind = graph.parts.get(id)!.kind;
      if (parts[id]!.state === 'dead' && (kind === 'neutral-bar' || kind === 'joint')) parts[id]!.state = 'return';
    }
  }

  const half = graph.document.supply.voltage / 2;
  for (const part of graph.parts.values()) {
    const figures = parts[part.id];
    if (!figures) continue;
    if (isPoint(part)) {
      const branch = steady.assembly.branchOfLoad.get(part.id);
      const { currentRe, currentIm } = steady.solution;
      const volts = steady.loadVolts(part.id);
      const amps = branch === undefined ? 0 : Math.hypot(currentRe[branch]!, currentIm[branch]!);
      const off = steady.standing.off?.has(part.id) ?? false;
      figures.load = { volts, amps, works: volts > half && amps >= NOTHING_A && !off };
    }
    const earth = graph.node(part.id, part.kind === 'inverter' ? 'out.E' : 'E');
    if (earth !== undefined && part.kind !== 'supply' && !('class' in part && part.class === 2))
      figures.caseVolts = toEarth(earth);
    else if (part.kind === 'earth-bar') figures.caseVolts = toEarth(graph.node(part.id, '1')!);
  }

  const sources: Record<string, number> = {};
  for (const { part, line } of condition.sources) sources[part.id] = driven(graph, steady, line);
  return { wires, parts, sources };
}

/** A that leaves a source by the conductors at its line terminal. */
function driven(graph: Graph, steady: Steady, node: number): number {
  let re = 0;
  let im = 0;
  for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
    const number = graph.around[k]!;
    const current = steady.current(number);
    const away = graph.edges[number]!.a === node ? 1 : -1;
    re += away * current.re;
    im += away * current.im;
  }
  return Math.hypot(re, im);
}
