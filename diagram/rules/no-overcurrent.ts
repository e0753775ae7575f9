import type { Source } from '../circuit/conditions';
import { byDesignation } from '../document/names';
import type { Part } from '../document/schema';
import { practices } from '../practices';
import { reach, type Reach } from '../terminals/reach';
import { isOvercurrent, isPoint } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import type { Context } from './context';
import { hasWire } from './readings/earth-gaps';
import { misledStretches } from './readings/misled';
import { neutralContacts } from './readings/neutral-contacts';
import { once } from './readings/once';
import { freeRef, newPartId, putBehind } from './readings/put-in';
import { reversedNodes, reversedPoints } from './readings/reversals';
import { capital, say, sayParts } from './readings/words';
import type { Remedy, Rule } from './types';

interface Bare {
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
const bareLines = once((context: Context): Bare[] => {
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
        if (source.kind === 'mains' && !fused && !isFusedWrong(context)) for (const bar of bareBars(context, bare)) entry.points.add(bar);
      }
      if (entry.points.size === 0 && entry.wires.size === 0) continue;
      entry.conditions.add(condition.name);
      found.set(source.part.id, entry);
    }
  }
  return [...found.values()];
});

/** A, a service fuse where nothing else says how large the service is: the largest of the practices' drafts */
const SERVICE_A = 63;

/** A fuse at the head of the service, or a two-pole breaker at the output of an inverter. */
function deviceBehind(context: Context, { part, kind }: Source): Remedy[] {
  const common = { ...(part.place !== undefined && { place: part.place }) };
  if (kind === 'mains') {
    const main = context.mainSwitch;
    const rating = main && 'rating' in main && main.rating !== undefined ? main.rating : SERVICE_A;
    const fuse: Part = { id: newPartId(context, 'service'), kind: 'fuse', ref: freeRef(context, 'F'), ...common, rating, standard: 'gG' };
    return putBehind(context, `Put a service fuse of ${rating} A before the meter`, fuse, [
      { at: [part.id, 'L'], into: '1', out: '2', role: 'line' },
    ]);
  }
  if (part.kind !== 'inverter' || part.va === undefined) return [];
  const full = part.va / context.document.supply.voltage;
  const rating = practices[context.practice].breakerRatingsA.value.find((size) => size >= full);
  if (rating === undefined) return [];
  const mcb: Part = {
    id: newPartId(context, 'output'),
    kind: 'mcb',
    ref: freeRef(context, 'Q'),
    label: 'Backup output',
    ...common,
    poles: 2,
    rating,
    curve: 'C',
    icn: 6000,
  };
  return putBehind(context, `Put a two-pole breaker of ${rating} A at its output`, mcb, [
    { at: [part.id, 'out.L'], into: '1', out: '2', role: 'line' },
    { at: [part.id, 'out.N'], into: '3', out: '4', role: 'neutral' },
  ]);
}

/** True where the service itself has no fuse: what lies behind it unprotected is no mistake of its own. */
export const isServiceBare = (context: Context): boolean =>
  bareLines(context).some(({ source, points }) => source.kind === 'mains' && points.size > 0);

/** A line conductor with no overcurrent device on its source side. */
export const noOvercurrent: Rule = {
  meta: {
    id: 'no-overcurrent',
    severity: 'danger',
    group: 'overload',
    title: 'Nothing limits the current of this conductor',
    clauses: [recalled('IEC 60364-4-43', '433.2.1'), recalled('IEC 60364-4-43', '434.2')],
    lesson:
      'A conductor without fuse or breaker before it carries whatever a fault asks for, until something burns through. The inverter is no ' +
      'fuse: it gives its full surge for seconds, and then again.',
    remedy: 'Put a breaker or fuse at the source end of the conductor.',
  },
  *check(context) {
    const { graph } = context;
    for (const { source, points, wires, conditions } of bareLines(context)) {
      const first = [...graph.parts.values()]
        .filter((part) => isOvercurrent(part) && hasWire(context, graph.node(part.id, '1')!))
        .sort(byDesignation);
      const what = points.size > 0 ? sayParts(context, points) : 'the line to the next device';
      yield {
        heading: `No overcurrent device after ${say(context, source.part.id)}`,
        message:
          source.kind === 'backup'
            ? `On battery no fuse or breaker lies between ${say(context, source.part.id)} and ${what}. A fault there is fed until something burns through.`
            : `${capital(what)} ${points.size === 1 || points.size === 0 ? 'hangs' : 'hang'} on the service with no fuse or breaker before ${points.size === 1 || points.size === 0 ? 'it' : 'them'}${first.length === 0 ? '; the drawing has none at all' : ''}.`,
        parts: [source.part.id, ...points],
        wires: [...wires],
        conditions: [...conditions],
        remedies: deviceBehind(context, source),
      };
    }
  },
};
