import { voltsOfPoints } from '../../circuit/branch-volts';
import type { Evaluated } from '../../circuit/evaluate';
import type { Installation, Part } from '../../document/schema';
import { isLoad } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import type { LoadResult } from '../examination';
import { branchNets, type StandingNet } from '../readings/branch-nets';

/** V at points, by id; null where it cannot be said */
export type Volts = ReadonlyMap<string, number | null>;

/**
 * V at every point with all loads on, by id. Null for all where the supply's own loop is not known: what is lost before
 * the origin would be a guess. What nothing feeds stands at 0.
 */
export function loadVolts(
  { supply }: Installation,
  { condition, asDrawn }: Evaluated,
  standings: readonly StandingNet[],
): Volts {
  const onMains = condition.sources.some(({ kind }) => kind === 'mains');
  const found = new Map<string, number | null>();
  for (const { net, points } of standings) {
    const volts = voltsOfPoints(net, (id) => asDrawn.get(id)!.fed);
    for (const id of points) {
      const { fed, source } = asDrawn.get(id)!;
      const unknown = onMains && source?.kind === 'mains' && supply.zln === undefined;
      found.set(id, unknown ? null : fed ? Math.round(1000 * volts.get(id)!) / 1000 : 0);
    }
  }
  return found;
}

/** Lamps, fans and appliances, and sockets that a load is assumed at. */
export const isListed = (part: Part): boolean => isLoad(part) || (part.kind === 'socket' && part.load !== undefined);

/** How a load stands in every condition. @param volts by number of the condition */
export function rowOf({ evaluated }: Context, part: string, volts: (condition: number) => number | null): LoadResult {
  const conditions: LoadResult['conditions'] = {};
  evaluated.forEach(({ condition, asDrawn }, i) => {
    const { fed, source, overcurrent, rcd } = asDrawn.get(part)!;
    conditions[condition.name] = { fed, from: source?.part.id ?? null, volts: volts(i), overcurrent, rcd };
  });
  return { part, conditions };
}

/** Every load: how it stands in every condition. */
export function loadResults(context: Context): LoadResult[] {
  const nets = branchNets(context);
  const volts = context.evaluated.map((each) => loadVolts(context.document, each, nets.get(each.condition.name)!));
  return context.document.parts
    .filter(isListed)
    .map(({ id }) => rowOf(context, id, (condition) => volts[condition]!.get(id) ?? null));
}
