import type { Part, PartOf } from '../document/schema';
import type { Edge, Graph } from '../terminals/graph';
import { reach, reaches } from '../terminals/reach';
import { spread } from '../terminals/spread';
import type { Standing } from './assemble';
import type { Source } from './conditions';

/**
 * True when a battery stands between the inverter's two dc terminals.
 * @param closed by edge, which dc contacts are closed; all where not given
 */
export function hasBattery(graph: Graph, inverter: Part, closed?: Uint8Array): boolean {
  const minus = graph.node(inverter.id, 'bat.-')!;
  const dc = (edge: Edge, number: number) =>
    (edge.kind === 'wire' || edge.kind === 'device') && closed?.[number] !== 0;
  const nodes = new Set([graph.node(inverter.id, 'bat.+')!]);
  let batteries = 0;
  // Batteries in series are crossed one after the other; in parallel each is met at once.
  for (const start of nodes) {
    for (const node of spread(graph, [start], dc).nodes) {
      nodes.add(node);
      const part = graph.partOf[node]!;
      if (part.kind !== 'battery') continue;
      batteries++;
      nodes.add(graph.node(part.id, graph.markOf[node] === '+' ? '-' : '+')!);
    }
  }
  return batteries > 0 && nodes.has(minus);
}

/** Ids of the inverters whose input has line and neutral of the mains, straight or through another that passes them on. */
export function withMains(
  graph: Graph,
  mains: readonly Pick<Source, 'line' | 'neutral'>[],
  closed: Uint8Array,
): Set<string> {
  const bypass = new Map<string, number>();
  const apart = closed.slice();
  graph.edges.forEach(({ kind, part }, number) => {
    if (kind !== 'bypass') return;
    bypass.set(part!, number);
    apart[number] = 0;
  });
  const fed = new Set<string>();
  for (;;) {
    const from = (pole: 'line' | 'neutral') => mains.map((source) => source[pole]);
    const [line, neutral] = [reach(graph, from('line'), apart), reach(graph, from('neutral'), apart)];
    const found = [...bypass].filter(
      ([id]) => !fed.has(id) && reaches(line, graph.node(id, 'in.L')) && reaches(neutral, graph.node(id, 'in.N')),
    );
    if (found.length === 0) return fed;
    for (const [id, edge] of found) {
      fed.add(id);
      apart[edge] = 1;
    }
  }
}

/** Sets the contacts inside inverters as they stand on battery: parted from their input, with their own bond. */
export function partFromInput(graph: Graph, onBattery: ReadonlySet<string>, closed: Uint8Array): void {
  graph.edges.forEach(({ kind, part }, number) => {
    if (part === undefined || !onBattery.has(part)) return;
    const inverter = graph.parts.get(part) as PartOf<'inverter'>;
    if (kind === 'bond') closed[number] = 1;
    else if (kind === 'bypass' || (kind === 'through' && inverter.neutral === 'separate')) closed[number] = 0;
  });
}

/** What an inverter on battery is a source between. */
export const backupSource = (graph: Graph, part: Part): Source => ({
  part,
  kind: 'backup',
  line: graph.node(part.id, 'out.L')!,
  neutral: graph.node(part.id, 'out.N')!,
});

/**
 * The home once those inverters run from their batteries that line or neutral of the mains no longer reaches; null where
 * there is none. A supply whose neutral is broken is no mains any more. A dip alone moves none: each brand has a limit of
 * its own.
 */
export function takeOver(
  graph: Graph,
  standing: Standing,
): { standing: Standing; inverters: PartOf<'inverter'>[] } | null {
  const { condition, closed, off, lostNeutrals } = standing;
  const ready = [...graph.parts.values()].filter(
    (part): part is PartOf<'inverter'> =>
      part.kind === 'inverter' &&
      part.state !== 'off' &&
      !off?.has(part.id) &&
      !condition.onBattery.has(part.id) &&
      hasBattery(graph, part, closed),
  );
  if (ready.length === 0) return null;
  const mains = condition.sources.filter(({ kind, part }) => kind === 'mains' && !lostNeutrals?.has(part.id));
  const fed = withMains(graph, mains, closed);
  const inverters = ready.filter(({ id }) => !fed.has(id));
  if (inverters.length === 0) return null;
  const onBattery = new Set([...condition.onBattery, ...inverters.map(({ id }) => id)]);
  const now = closed.slice();
  partFromInput(graph, onBattery, now);
  const sources = [...condition.sources, ...inverters.map((part) => backupSource(graph, part))];
  return { standing: { ...standing, condition: { ...condition, sources, onBattery }, closed: now }, inverters };
}
