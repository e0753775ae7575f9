import type { BranchNet } from '../../circuit/branch-volts';
import { condenseBranches, mergeNets } from '../../circuit/branch-volts';
import { standingsOf } from '../../circuit/steady';
import type { Context } from '../context';
import type { LoadResult } from '../examination';
import { branchesIn } from '../readings/branch-nets';
import { isListed, loadVolts, rowOf, type Volts } from '../results/load-results';
import { Beyond } from './beyond';
import type { Touched } from './touched';

/** The home in every condition after an edit: the touched branches condensed anew. @throws Beyond */
export function netsAfter(known: readonly BranchNet[] | null, now: Context, { before }: Touched): BranchNet[] {
  const { branchOf } = branchesIn(now);
  let like: BranchNet | undefined;
  return now.evaluated.map((each, i) => {
    const standings = standingsOf(now.graph, each);
    if (!known || standings.length !== 1) throw new Beyond('how the switches stand');
    like = condenseBranches(now.graph, standings[0]!.standing, branchOf, { like, trunk: known[i]!.trunk });
    return mergeNets(known[i]!, like, before);
  });
}

/** V at every point in every condition, by the home as it is now. */
export const voltsIn = ({ document, evaluated }: Context, nets: readonly BranchNet[]): Volts[] =>
  evaluated.map((each, i) => loadVolts(document, each, [{ net: nets[i]!, points: [...each.points.keys()] }]));

const sameVolts = ({ conditions }: LoadResult, part: string, names: readonly string[], volts: readonly Volts[]) =>
  names.every((name, i) => conditions[name]!.volts === (volts[i]!.get(part) ?? null));

/**
 * The rows of the loads after an edit; what did not change is the same row.
 * @param volts by condition; null where the edit moves no current
 */
export function mergedRows(
  context: Context,
  known: readonly LoadResult[],
  { after }: Touched,
  volts: readonly Volts[] | null,
): LoadResult[] {
  const names = context.evaluated.map(({ condition }) => condition.name);
  const rows: LoadResult[] = [];
  let at = 0;
  for (const part of context.document.parts) {
    while (at < known.length && known[at]!.part < part.id) at++;
    if (!isListed(part)) continue;
    const before = known[at]?.part === part.id ? known[at] : undefined;
    if (before && !after.has(part.id) && (!volts || sameVolts(before, part.id, names, volts))) rows.push(before);
    else rows.push(rowOf(context, part.id, (i) => (volts ? (volts[i]!.get(part.id) ?? null) : before!.conditions[names[i]!]!.volts)));
  }
  return rows;
}
