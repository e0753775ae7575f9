import type { Source } from '../../circuit/conditions';
import { reach, type Reach } from '../../terminals/reach';
import { isOvercurrent, isPoint } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { misledStretches } from './misled';
import { neutralContacts } from './neutral-contacts';
import { once } from './once';
import { reversedNodes, reversedPoints } from './reversals';

/** A source's line before any overcurrent device, where something hangs on it. */
export interface Bare {
  source: Source;
  points: Set<string>;
  wires: Set<string>;
  conditions: Set<string>;
}

/** True when the fuse is there, in the neutral: that is the finding. */
const isFusedWrong = (context: Context): boolean =>
  neutralContacts(context).fused.some(({ contacts }) =>
    contacts.some((id) => context.graph.parts.get(id)!.kind === 'fuse'),
  );

/** Line bars that hang on the service before any device: what feeds several ways has nothing that protects it. */
function bareBars({ graph }: Context, bare: Reach): string[] {
  const bars = bare.order.flatMap((node) => (graph.partOf[node]!.kind === 'line-bar' ? [graph.partOf[node]!.id] : []));
  return bars.slice(0, 1);
}

/** What a source's line reaches before any overcurrent device, where that is used or leaves the source's own place. */
export const bareLines = once((context: Context): Bare[] => {
  const { graph } = context;
  const found = new Map<string, Bare>();
  // Where line and neutral change places the fuses stand in the neutral; the crossing is the finding.
  const turned = reversedPoints(context);
  const crossed = reversedNodes(context);
  const misled = misledStretches(context);
  for (const { condition, drawn } of context.evaluated) {
    for (const source of condition.sources) {
      const entry = found.get(source.part.id) ?? { source, points: new Set(), wires: new Set(), conditions: new Set() };
      for (const from of drawn) {
        const closed = from.closed.slice();
        graph.edges.forEach((edge, number) => {
          if (edge.kind === 'device' && isOvercurrent(graph.parts.get(edge.part!)!)) closed[number] = 0;
        });
        const bare = reach(graph, [source.line], closed);
        const fused = source.kind === 'mains' && bare.order.some((node) => graph.partOf[node]!.kind === 'fuse');
        for (const node of bare.order) {
          if (misled.some(({ nodes }) => nodes.has(node))) continue;
          const part = graph.partOf[node]!;
          if (isPoint(part) && !turned.has(part.id)) entry.points.add(part.id);
          const { wire, a, b } = graph.edges[bare.via[node]!] ?? {};
          if (!wire || fused || crossed.has(a!) || crossed.has(b!)) continue;
          const places = [graph.partOf[a!]!.place, graph.partOf[b!]!.place];
          if (places.some((place) => place !== source.part.place)) entry.wires.add(wire.id);
        }
        if (source.kind === 'mains' && !fused && !isFusedWrong(context))
          for (const bar of bareBars(context, bare)) entry.points.add(bar);
      }
      if (entry.points.size === 0 && entry.wires.size === 0) continue;
      entry.conditions.add(condition.name);
      found.set(source.part.id, entry);
    }
  }
  return [...found.values()];
});

/** True where the service itself has no fuse: what lies behind it unprotected is no mistake of its own. */
export const isServiceBare = (context: Context): boolean =>
  bareLines(context).some(({ source, points }) => source.kind === 'mains' && points.size > 0);
