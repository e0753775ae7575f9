import { solveStanding, standingsOf } from '../../circuit/steady';
import type { Evaluated } from '../../circuit/evaluate';
import { isLoad } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import type { LoadResult } from '../examination';

/**
 * V at every point with all loads on, by id. Null for all where the supply's own loop is not known: what is lost before
 * the origin would be a guess. What nothing feeds stands at 0.
 */
export function loadVolts({ graph }: Pick<Context, 'graph'>, evaluated: Evaluated): ReadonlyMap<string, number | null> {
  const volts = new Map<string, number | null>();
  const onMains = evaluated.condition.sources.some(({ kind }) => kind === 'mains');
  for (const { standing, points } of standingsOf(graph, evaluated)) {
    const steady = solveStanding(graph, standing);
    for (const id of points) {
      const { fed, source } = evaluated.asDrawn.get(id)!;
      const unknown = onMains && source?.kind === 'mains' && graph.document.supply.zln === undefined;
      volts.set(id, unknown ? null : fed ? Number(steady.loadVolts(id).toFixed(3)) : 0);
    }
  }
  return volts;
}

/** Lamps, fans and appliances, and sockets that a load is assumed at: how each stands in every condition. */
export const loadResults = (context: Context): LoadResult[] =>
  rowsOf(context, new Map(context.evaluated.map((each) => [each.condition.name, loadVolts(context, each)] as const)));

/** @param volts by name of the condition, then by id */
export function rowsOf(
  { evaluated, document }: Context,
  volts: ReadonlyMap<string, ReadonlyMap<string, number | null>>,
): LoadResult[] {
  return document.parts
    .filter((part) => isLoad(part) || (part.kind === 'socket' && part.load !== undefined))
    .map((part) => ({
      part: part.id,
      conditions: Object.fromEntries(
        evaluated.map(({ condition, asDrawn }) => {
          const { fed, source, overcurrent, rcd } = asDrawn.get(part.id)!;
          const at = volts.get(condition.name)!.get(part.id) ?? null;
          return [condition.name, { fed, from: source?.part.id ?? null, volts: at, overcurrent, rcd }];
        }),
      ),
    }));
}
