import type { Part, PartOf } from '../document/schema';
import { amps, exceeds } from './readings/amounts';
import { recalled } from './clauses';
import type { Context } from './context';
import { chainsOf, figuresOf, flowsIn } from './readings/figures';
import { lackOfRating } from './readings/lacking';
import { once } from './readings/once';
import { changePart } from './readings/remedies';
import type { Rule } from './types';
import { be, capital, sayParts } from './readings/words';

/** Devices before the ways that carry what several of them take. */
type Main = PartOf<'fuse' | 'meter' | 'isolator' | 'mcb' | 'rcd' | 'rcbo' | 'changeover'>;
const MAINS: ReadonlySet<Part['kind']> = new Set(['fuse', 'meter', 'isolator', 'mcb', 'rcd', 'rcbo', 'changeover']);

/** Every device that lies before a way, by id, with its place in the chain: how many lie before it at most. */
const mainDevices = once((context: Context): Map<string, { device: Main; order: number }> => {
  const { graph, ways } = context;
  const own = new Set(ways.map(({ device }) => device));
  const found = new Map<string, { device: Main; order: number }>();
  for (const chain of chainsOf(context))
    chain.forEach((id, order) => {
      const known = found.get(id);
      if (known) known.order = Math.max(known.order, order);
      else if (!own.has(id) && MAINS.has(graph.parts.get(id)!.kind))
        found.set(id, { device: graph.parts.get(id) as Main, order });
    });
  return found;
});

/** Overloaded devices in series together, the one nearest the source first: they carry the same excess. */
export const overloadedMains = once((context: Context): { devices: Main[]; demandA: number }[] => {
  const { demandBehind, waysBehind, loads } = figuresOf(context);
  const over = new Map<string, { device: Main; order: number; demandA: number }>();
  for (const [id, { device, order }] of mainDevices(context)) {
    if (device.rating === undefined || waysBehind(id).some((way) => !loads.get(way)!.known)) continue;
    const { demandA } = demandBehind(id);
    if (exceeds(demandA, device.rating)) over.set(id, { device, order, demandA });
  }
  if (over.size === 0) return [];
  const groupOf = new Map<string, Set<string>>();
  for (const chain of chainsOf(context)) {
    let group: Set<string> | undefined;
    for (const id of chain) {
      if (!over.has(id)) continue;
      const known = groupOf.get(id);
      group ??= known ?? new Set();
      if (known === group) continue;
      for (const each of known ?? [id]) groupOf.set(each, group.add(each));
    }
  }
  return [...new Set(groupOf.values())].map((group) => {
    const members = [...group].map((id) => over.get(id)!).sort((a, b) => a.order - b.order);
    return { devices: members.map(({ device }) => device), demandA: members[0]!.demandA };
  });
});

/** The home's demand, or that of a group of ways, above what stands before them. */
export const overloadedMain: Rule = {
  meta: {
    id: 'overloaded-main',
    severity: 'defect',
    group: 'overload',
    title: 'The home asks for more than its main devices are rated for',
    clauses: [recalled('IEC 60364-1', '311.1'), recalled('BS 7671', '536.4.202')],
    lesson:
      'Main switch, meter, rcd and service fuse carry what all ways take together. Not everything runs at once, ' +
      'and the allowances say how much of it may be left out; what remains must be within every one of them, or ' +
      'the one that nobody may open is the one that fails.',
    remedy: 'Ask for a larger service and fit main devices for it, or take load off.',
  },
  *check(context) {
    for (const { devices, demandA } of overloadedMains(context)) {
      const ids = devices.map(({ id }) => id);
      const least = Math.min(...devices.map(({ rating }) => rating!));
      yield {
        heading: `${capital(sayParts(context, ids, 4))} ${be(ids.length)} asked for ${amps(demandA)}`,
        message: `After the allowances ${amps(demandA)} may flow at once; ${sayParts(context, ids)} ${be(ids.length)} rated from ${amps(least)}.`,
        parts: ids,
        conditions: flowsIn(context, ids),
        remedies: devices.length === 1 ? largerOf(context, devices[0]!, demandA) : [],
      };
    }
  },
  *lacks(context) {
    for (const { device } of mainDevices(context).values())
      if (device.rating === undefined) yield lackOfRating(context, device);
  },
};

/** A main switch or rcd alone too small is exchanged; service fuse and meter are the supplier's. */
function largerOf(context: Context, device: Main, demandA: number) {
  if (device.kind !== 'isolator' && device.kind !== 'rcd') return [];
  const { breakerRatingsA } = figuresOf(context).practice;
  const rating = breakerRatingsA.value.find((each) => each >= demandA);
  return rating === undefined ? [] : [changePart(`Fit one of ${rating} A`, device, { rating })];
}
