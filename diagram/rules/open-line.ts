import type { PartOf } from '../document/schema';
import { isPoint } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import type { Context } from './context';
import { deadRegions } from './readings/dead-regions';
import { earthGaps, hasWire } from './readings/earth-gaps';
import { potentials } from './readings/potentials';
import type { Rule } from './types';
import { be, capital, sayParts } from './readings/words';

/** Points that no condition brings line to, by their line end; parts joined to nothing are another rule's. */
function neverFed(context: Context): Map<string, number> {
  const { graph } = context;
  const { earth } = potentials(context);
  const onLine = new Set(earthGaps(context).filter(({ on }) => on === 'line').flatMap(({ parts }) => parts));
  const ends = new Map<string, number>();
  for (const part of graph.parts.values()) {
    if (!isPoint(part)) continue;
    const l = graph.node(part.id, 'L')!;
    const n = graph.node(part.id, 'N')!;
    if (context.evaluated.some(({ points }) => points.get(part.id)!.source !== null)) continue;
    if (!hasWire(context, l) && !hasWire(context, n)) continue;
    if (onLine.has(part.id) && earth[l] === 1) continue;
    ends.set(part.id, l);
  }
  return ends;
}

/** Inverters whose backed-up points are dead on mains: by inverter, the points and the conditions. */
function deadOnMains(context: Context): Map<string, { points: Set<string>; conditions: Set<string> }> {
  const found = new Map<string, { points: Set<string>; conditions: Set<string> }>();
  for (const { condition, points } of context.evaluated) {
    if (condition.base !== 'outage') continue;
    const positions = condition.name.slice('outage'.length);
    const mains = context.evaluated.find((other) => other.condition.name === `mains${positions}`)!;
    for (const state of points.values()) {
      if (state.source?.kind !== 'backup' || mains.points.get(state.part.id)!.source) continue;
      const entry = found.get(state.source.part.id) ?? { points: new Set(), conditions: new Set() };
      entry.points.add(state.part.id);
      entry.conditions.add(mains.condition.name);
      found.set(state.source.part.id, entry);
    }
  }
  return found;
}

/** A load that nothing feeds, or that is backed up and dead on mains; one finding for each gap. */
export const openLine: Rule = {
  meta: {
    id: 'open-line',
    severity: 'defect',
    group: 'polarity',
    title: 'A load that nothing feeds',
    clauses: [recalled('IEC 60364-6', '6.4.3.2')],
    lesson:
      'The drawing shows the point, but in no position of its switches and in no condition does line reach it. Whoever wires it ' +
      'from this drawing will look for the missing core in the wall.',
    remedy: 'Lead the line to it, from its way through its switch.',
  },
  *check(context) {
    const { graph } = context;
    const { line } = potentials(context);
    for (const region of deadRegions(context, neverFed(context), (node) => line[node] === 1)) {
      if (region.hanging) continue;
      const who = sayParts(context, region.points);
      const where = region.gap.length > 0 ? ` The line ends at ${sayParts(context, region.gap)}.` : '';
      yield {
        heading: `${capital(who)} ${be(region.points.length)} never fed`,
        message: `No condition and no position of the switches brings line to ${who}.${where}`,
        parts: [...region.gap, ...region.points],
        wires: region.wires,
      };
    }
    for (const [id, { points, conditions }] of deadOnMains(context)) {
      const inverter = graph.parts.get(id) as PartOf<'inverter'>;
      const input = graph.node(id, 'in.L')!;
      const [gap] = deadRegions(context, new Map([[id, input]]), (node) => line[node] === 1);
      yield {
        heading: `${capital(sayParts(context, points))} ${be(points.size)} dead on mains`,
        message: `${capital(sayParts(context, points))} must be fed in every condition, but no line reaches the input of ${context.name(inverter)}: on mains only the battery could feed ${points.size === 1 ? 'it' : 'them'}, until it is empty.`,
        parts: [...new Set([id, ...(gap?.gap ?? []), ...points])],
        wires: gap?.wires ?? [],
        conditions: [...conditions],
      };
    }
  },
};
