import { isBar } from '../../document/kinds';
import { natureOfNode } from '../../circuit/natures';
import { byDesignation } from '../../document/names';
import type { Edge } from '../../terminals/graph';
import { isPoint } from '../../terminals/roles-of-parts';
import { spread } from '../../terminals/spread';
import type { Context } from '../context';
import { hasWire } from './earth-gaps';

/** A stretch of conductor that should lead somewhere and does not, with the points behind it. */
export interface DeadRegion {
  /** ids, by designation */
  points: string[];
  /** parts at which the stretch ends open, else the bars, else the joints nearest to the gap */
  gap: string[];
  /** wires of it that lead nowhere, or to the earth */
  wires: string[];
  /** a plug hangs on it: it is only not plugged in */
  hanging: boolean;
  nodes: ReadonlySet<number>;
}

/**
 * Groups point ends that share a stretch, so that one gap is said once.
 * @param ends the node of each point that should be joined to something
 * @param stops nodes at which the stretch has met a conductor again
 */
export function deadRegions(
  context: Context,
  ends: ReadonlyMap<string, number>,
  stops: (node: number) => boolean,
): DeadRegion[] {
  const { graph } = context;
  const taken = new Set<string>();
  const regions: DeadRegion[] = [];
  const follows = (edge: Edge) => edge.kind !== 'bond' && edge.wire?.role !== 'earth';
  const isEarth = (node: number) => natureOfNode(graph, node) === 'E';
  const ids = [...ends.keys()].map((id) => graph.parts.get(id)!).sort(byDesignation);
  for (const { id } of ids) {
    if (taken.has(id)) continue;
    const { nodes, edges } = spread(graph, [ends.get(id)!], follows, (node) => stops(node) || isEarth(node));
    const points = ids.filter((part) => nodes.has(ends.get(part.id)!)).map((part) => part.id);
    for (const point of points) taken.add(point);
    const open = new Set<string>();
    const bars = new Set<string>();
    const joints = new Set<string>();
    let hanging = false;
    for (const node of nodes) {
      const part = graph.partOf[node]!;
      if (part.kind === 'plug' && part.in === undefined) hanging = true;
      if (isEarth(node)) continue;
      if (stops(node)) {
        if (!isPoint(part) && part.kind !== 'inverter') open.add(part.id);
      } else if (isBar(part.kind)) (part.kind === 'joint' ? joints : bars).add(part.id);
      else if (!isPoint(part) && part.kind !== 'spd' && part.kind !== 'plug' && !hasWire(context, node))
        open.add(part.id);
    }
    const loose = graph.loose.filter((wire) =>
      [wire.from, wire.to].some(([part, mark]) => {
        const node = graph.node(part, mark);
        return node !== undefined && nodes.has(node);
      }),
    );
    const astray = [...edges]
      .map((number) => graph.edges[number]!)
      .filter((edge) => edge.wire && (isEarth(edge.a) || isEarth(edge.b)));
    const gap = open.size > 0 ? open : bars.size > 0 ? bars : joints;
    regions.push({
      points,
      gap: [...gap].sort(),
      wires: [...loose.map((wire) => wire.id), ...astray.map((edge) => edge.wire!.id)].sort(),
      hanging,
      nodes,
    });
  }
  return regions;
}
