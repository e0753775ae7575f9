import type { SectionCable } from '../circuit/way-cables';
import type { WayFigures } from '../circuit/way-figures';
import type { Graph } from '../terminals/graph';

/**
 * The cables in which a way leaves its board: the first cable met on each branch of its line behind the device; two on a
 * ring. They are what a schedule of ways calls "the cable" of a way.
 */
export function runsOf(graph: Graph, { section, cables }: Pick<WayFigures, 'section' | 'cables'>): SectionCable[] {
  const byId = new Map(cables.map((each) => [each.cable.id, each]));
  const around = new Map<number, number[]>();
  for (const number of [...section.edges].sort((a, b) => a - b)) {
    const { a, b } = graph.edges[number]!;
    for (const node of [a, b]) around.set(node, [...(around.get(node) ?? []), number]);
  }
  const runs = new Map<string, SectionCable>();
  const seen = new Set([section.downstream]);
  const open = [section.downstream];
  for (let node = open.pop(); node !== undefined; node = open.pop()) {
    for (const number of around.get(node) ?? []) {
      const { a, b, wire } = graph.edges[number]!;
      const run = wire?.cable === undefined ? undefined : byId.get(wire.cable);
      const next = a === node ? b : a;
      if (run) runs.set(run.cable.id, run);
      else if (!seen.has(next)) {
        seen.add(next);
        open.push(next);
      }
    }
  }
  return [...runs.keys()].sort().map((id) => runs.get(id)!);
}

/** The cable that decides what a way carries: the least capacity in proportion to what it must carry. */
export function decidingCable(cables: readonly SectionCable[]): SectionCable | null {
  const spare = ({ capacity, needA }: SectionCable) => (capacity?.izA ?? 0) / (needA ?? 1);
  const [first, ...rest] = cables;
  return first ? rest.reduce((worst, cable) => (spare(cable) < spare(worst) ? cable : worst), first) : null;
}
