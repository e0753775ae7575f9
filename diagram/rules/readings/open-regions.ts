import { byDesignation } from '../../document/names';
import { pathTo, reaches } from '../../terminals/reach';
import { isOvercurrent, isPoint } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { deadRegions, type DeadRegion } from './dead-regions';
import { earthGaps, hasWire } from './earth-gaps';
import { misledStretches, type Misled } from './misled';
import { once } from './once';
import { potentials, potentialsIn } from './potentials';

/** A gap in a line or neutral, with what lies behind it and when. */
export interface OpenRegion extends DeadRegion {
  side: 'L' | 'N';
  /** all conditions where left out */
  conditions?: string[];
  /** the neutral ends on earth or on line instead of nowhere */
  on?: 'earth' | 'line';
  /** id of the inverter whose points are dead on mains only */
  inverter?: string;
  /** backed-up points that the same gap makes dead on mains */
  onMains?: string[];
  /** neutral and earth change places here: the missing earth says it */
  swapped?: true;
  /** the points hang between the lines of two devices: the mixed feed says it */
  between?: string[];
  /** the conductor is landed on another one at its head */
  misled?: Misled;
}

const partsOf = (context: Context, on: 'line' | 'neutral') =>
  new Set(
    earthGaps(context)
      .filter((gap) => gap.on === on)
      .flatMap(({ parts }) => parts),
  );

/** The points behind one conductor that is landed on the wrong terminal, as one gap. */
function ofMisled({ graph }: Context, misled: Misled, ends: ReadonlyMap<string, number>): OpenRegion[] {
  const points = [...ends.keys()]
    .filter((id) => misled.nodes.has(ends.get(id)!))
    .map((id) => graph.parts.get(id)!)
    .sort(byDesignation)
    .map(({ id }) => id);
  if (points.length === 0) return [];
  const { drawn, at, wire, nodes } = misled;
  return [{ side: drawn, misled, points, gap: [at], wires: [wire], hanging: false, nodes }];
}

/** Takes the ends that lie behind a misled conductor of one side out of `ends`, as gaps of their own. */
function takeMisled(context: Context, side: 'L' | 'N', ends: Map<string, number>): OpenRegion[] {
  const found = misledStretches(context)
    .filter(({ drawn }) => drawn === side)
    .flatMap((misled) => ofMisled(context, misled, ends));
  for (const { points } of found) for (const id of points) ends.delete(id);
  return found;
}

/** Points that no condition brings line to, by their line end; parts joined to nothing are another rule's. */
function neverFed(context: Context): OpenRegion[] {
  const { graph } = context;
  const { line, neutral, earth } = potentials(context);
  const onLine = partsOf(context, 'line');
  const ends = new Map<string, number>();
  for (const part of graph.parts.values()) {
    if (!isPoint(part)) continue;
    const l = graph.node(part.id, 'L')!;
    const n = graph.node(part.id, 'N')!;
    if (context.evaluated.some(({ points }) => points.get(part.id)!.source !== null)) continue;
    if (!hasWire(context, l) && !hasWire(context, n)) continue;
    if (onLine.has(part.id) && earth[l] === 1) continue;
    // With line and neutral changed over as well, the open end is the other one.
    ends.set(part.id, neutral[l] === 1 && neutral[n] !== 1 ? n : l);
  }
  const misled = takeMisled(context, 'L', ends);
  const dead = deadRegions(context, ends, (node) => line[node] === 1);
  return [...misled, ...dead.map((region): OpenRegion => ({ ...region, side: 'L' }))];
}

/** Inverters whose backed-up points are dead on mains. */
function deadOnMains(context: Context): OpenRegion[] {
  const found = new Map<string, { points: Set<string>; conditions: Set<string> }>();
  for (const { condition, points } of context.evaluated) {
    if (condition.base !== 'outage') continue;
    const mains = context.evaluated.find(
      (other) => other.condition.name === `mains${condition.name.slice('outage'.length)}`,
    )!;
    for (const state of points.values()) {
      if (state.source?.kind !== 'backup' || mains.points.get(state.part.id)!.source) continue;
      const entry = found.get(state.source.part.id) ?? { points: new Set(), conditions: new Set() };
      entry.points.add(state.part.id);
      entry.conditions.add(mains.condition.name);
      found.set(state.source.part.id, entry);
    }
  }
  return [...found].map(([inverter, { points, conditions }]): OpenRegion => {
    const { line } = potentialsIn(context, [...conditions]);
    const [gap] = deadRegions(
      context,
      new Map([[inverter, context.graph.node(inverter, 'in.L')!]]),
      (node) => line[node] === 1,
    );
    return { ...gap!, side: 'L', inverter, points: [...points], conditions: [...conditions] };
  });
}

/** The nearest overcurrent devices before the two ends of a point, where both are line from two of them. */
function betweenLines(context: Context, id: string): string[] {
  const { graph } = context;
  for (const { stands, condition } of context.evaluated) {
    for (const stand of stands) {
      const devices = ['L', 'N'].flatMap((mark) => {
        const node = graph.node(id, mark)!;
        const source = condition.sources.findIndex((_, i) => reaches(stand.line[i]!, node));
        if (source < 0) return [];
        const path = pathTo(graph, stand.line[source]!, node).map((number) => graph.edges[number]!.part ?? '');
        return path.findLast((part) => graph.parts.has(part) && isOvercurrent(graph.parts.get(part)!)) ?? [];
      });
      if (devices.length === 2 && devices[0] !== devices[1]) return devices;
    }
  }
  return [];
}

/** Points with line but no neutral of any source. */
function withoutNeutral(context: Context): OpenRegion[] {
  const all = potentials(context);
  const swapped = partsOf(context, 'neutral');
  const found = new Map<string, { names: string[]; end: number }>();
  for (const { condition, points } of context.evaluated) {
    for (const state of points.values()) {
      if (!state.source || state.fed) continue;
      // A backed-up point whose neutral is there on mains and gone on battery is another matter: backup-neutral-lost.
      if (condition.base !== 'mains' && all.neutral[state.neutralEnd] === 1) continue;
      const entry = found.get(state.part.id) ?? { names: [], end: state.neutralEnd };
      entry.names.push(condition.name);
      found.set(state.part.id, entry);
    }
  }
  const ends = new Map([...found].map(([id, { end }]) => [id, end]));
  const misled = takeMisled(context, 'N', ends).map((region) => ({
    ...region,
    conditions: [...new Set(region.points.flatMap((id) => found.get(id)!.names))],
  }));
  const byConditions = new Map<string, Map<string, number>>();
  for (const [id, { names, end }] of found) {
    if (!ends.has(id)) continue;
    const key = `${names.join(' ')}|${swapped.has(id) && all.earth[end] === 1 ? 'swapped' : ''}|${betweenLines(context, id).join(' ')}`;
    byConditions.set(key, (byConditions.get(key) ?? new Map<string, number>()).set(id, end));
  }
  const others = [...byConditions].flatMap(([key, ends]) => {
    const [names, swap, between] = key.split('|') as [string, string, string];
    const conditions = names.split(' ');
    const { line, neutral, earth } = potentialsIn(context, conditions);
    return deadRegions(context, ends, (node) => line[node] === 1 || neutral[node] === 1).map((region): OpenRegion => {
      const end = ends.get(region.points[0]!)!;
      const on = earth[end] === 1 ? 'earth' : line[end] === 1 ? 'line' : undefined;
      return {
        ...region,
        side: 'N',
        conditions,
        ...(on && { on }),
        ...(swap && { swapped: true }),
        ...(between && { between: between.split(' ') }),
      };
    });
  });
  return [...misled, ...others];
}

/** Gaps in the line: where one starves mains and the input of an inverter alike it is one gap. */
function withoutLine(context: Context): OpenRegion[] {
  const never = neverFed(context);
  const apart = deadOnMains(context).filter((dead) => {
    const same = never.find(({ nodes }) => [...dead.nodes].some((node) => nodes.has(node)));
    if (same) same.onMains = [...(same.onMains ?? []), ...dead.points];
    return same === undefined;
  });
  return [...never, ...apart];
}

/** All gaps in line and neutral that starve a point; stretches that end in a hanging plug are only not plugged in. */
export const openRegions = once((context: Context): OpenRegion[] =>
  [...withoutLine(context), ...withoutNeutral(context)].filter(({ hanging }) => !hanging),
);
