import type { Graph } from '../terminals/graph';
import { isLoad, isPoint } from '../terminals/roles-of-parts';
import { byCode } from '../document/schema';
import { size, type Steady } from './steady';

/** V to true earth above which a terminal counts as live: the touch voltage that may stand, 411.5.3. */
const LIVE_VOLTS = 50;
/** A load below half its voltage has lost its supply. */
const DARK_SHARE = 0.5;

const tidy = (value: number, places = 3): number => Number(value.toFixed(places));

/** Ids of points that draw or could draw: lamps, fans, appliances, and sockets with an assumed load. */
const loadsOf = (graph: Graph): string[] =>
  [...graph.parts.values()]
    .filter((part) => isLoad(part) || (part.kind === 'socket' && part.load !== undefined))
    .map(({ id }) => id);

/** V across each load. */
export function loadVoltsOf(graph: Graph, steady: Steady): Record<string, number> {
  return Object.fromEntries(loadsOf(graph).map((id) => [id, tidy(steady.loadVolts(id))]));
}

/** V to true earth of each case and earth contact: class 2 has none. */
export function caseVoltsOf(graph: Graph, steady: Steady): Record<string, number> {
  const volts: Record<string, number> = {};
  for (const part of graph.parts.values()) {
    const mark = part.kind === 'inverter' ? 'out.E' : 'E';
    if ((!isPoint(part) && part.kind !== 'inverter' && part.kind !== 'bond') || ('class' in part && part.class === 2))
      continue;
    volts[part.id] = tidy(size(steady.volts(graph.node(part.id, mark)!)));
  }
  return volts;
}

/** A in each wire that carries a milliampere or more. */
export function wireAmpsOf(graph: Graph, steady: Steady): Record<string, number> {
  const amps: Record<string, number> = {};
  for (const id of graph.wires.keys()) {
    const value = tidy(steady.wireAmps(id));
    if (value > 0) amps[id] = value;
  }
  return amps;
}

/** Parts with a terminal, other than their case, above 50 V to true earth. */
export function liveParts(graph: Graph, steady: Steady): string[] {
  const live = new Set<string>();
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    if (mark === 'E' || mark.endsWith('.E') || part.kind === 'battery') return;
    if (size(steady.volts(node)) > LIVE_VOLTS) live.add(part.id);
  });
  return [...live].sort(byCode);
}

/** Loads that had their voltage before and have not half of it now. */
export function darkLoads(graph: Graph, before: Steady, now: Steady): string[] {
  const half = DARK_SHARE * graph.document.supply.voltage;
  return loadsOf(graph).filter((id) => before.loadVolts(id) > half && now.loadVolts(id) <= half);
}
