import { isListed, tellVolts } from '../../circuit/branch-volts';
import type { Evaluated, PointState } from '../../circuit/evaluate';
import type { Installation } from '../../document/schema';
import type { Context } from '../context';
import type { LoadResult } from '../examination';
import { branchNets, type StandingNet } from '../readings/branch-nets';

/** Without the supply's own loop it is not known what is lost before the origin: V on mains would be a guess. */
const isGuess = ({ supply }: Installation, { source }: PointState): boolean =>
  source?.kind === 'mains' && supply.zln === undefined;

/** True where V at a point are to be solved for; what nothing feeds stands at 0. */
export const isSolved = (document: Installation, state: PointState): boolean => state.fed && !isGuess(document, state);

/** V as it is told: a millivolt is far below what any figure means. */
export const roundVolts = (volts: number): number => Math.round(1000 * volts) / 1000;

/** V at every load with all of them on, by id; those that are not solved are left out. */
function loadVolts(document: Installation, { asDrawn }: Evaluated, standings: readonly StandingNet[]): Map<string, number> {
  const found = new Map<string, number>();
  for (const { net, points } of standings) {
    const here = new Set(
      points.filter((id) => {
        const state = asDrawn.get(id)!;
        return isListed(state.part) && isSolved(document, state);
      }),
    );
    tellVolts(
      net,
      (id) => here.has(id),
      (id, volts) => found.set(id, roundVolts(volts)),
    );
  }
  return found;
}

/**
 * How a load stands in every condition.
 * @param volts by number of the condition, where it is solved
 */
export function rowOf(
  { document, evaluated }: Context,
  part: string,
  volts: (condition: number) => number | undefined,
): LoadResult {
  const conditions: LoadResult['conditions'] = {};
  evaluated.forEach(({ condition, asDrawn }, i) => {
    const state = asDrawn.get(part)!;
    const { fed, source, overcurrent, rcd } = state;
    const known = isGuess(document, state) ? null : fed ? volts(i)! : 0;
    conditions[condition.name] = { fed, from: source?.part.id ?? null, volts: known, overcurrent, rcd };
  });
  return { part, conditions };
}

/** Every load: how it stands in every condition. */
export function loadResults(context: Context): LoadResult[] {
  const nets = branchNets(context);
  const volts = context.evaluated.map((each) => loadVolts(context.document, each, nets.get(each.condition.name)!));
  return context.document.parts
    .filter(isListed)
    .map(({ id }) => rowOf(context, id, (condition) => volts[condition]!.get(id)));
}
