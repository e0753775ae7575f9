import { condenseBranches, isListed, mergeNets, placesOf, tellVolts, type BranchNet } from '../../circuit/branch-volts';
import { standingsOf } from '../../circuit/steady';
import { byCode } from '../../document/schema';
import type { Context } from '../context';
import type { LoadResult } from '../examination';
import { branchesIn } from '../readings/branch-nets';
import { isSolved, roundVolts, rowOf } from '../results/load-results';
import { Beyond, mustBe } from './beyond';
import { mergedList } from './merging';
import type { Touched } from './touched';

/** The home in every condition after an edit: the touched branches condensed anew. @throws Beyond */
export function netsAfter(known: readonly BranchNet[] | null, now: Context, { before }: Touched): BranchNet[] {
  if (!known) throw new Beyond('how the switches stand');
  const places = placesOf(now.graph, branchesIn(now).branchOf, known[0]);
  let like: BranchNet | undefined;
  return now.evaluated.map((each, i) => {
    const standings = standingsOf(now.graph, each);
    mustBe(standings.length === 1, 'how the switches stand');
    like = condenseBranches(now.graph, standings[0]!.standing, places, { like, trunk: known[i]!.trunk });
    return mergeNets(known[i]!, like, before);
  });
}

/** By number of the condition V at the loads that stand otherwise than their row says, by id; of a touched load always. */
function movedVolts(
  { document, evaluated }: Context,
  rows: ReadonlyMap<string, LoadResult>,
  { after }: Touched,
  nets: readonly BranchNet[],
): ReadonlyMap<string, number>[] {
  return evaluated.map(({ condition: { name }, asDrawn }, i) => {
    const moved = new Map<string, number>();
    const standing = (id: string): LoadResult['conditions'][string] | undefined => rows.get(id)?.conditions[name];
    tellVolts(
      nets[i]!,
      (id) => {
        if (after.has(id)) return isSolved(document, asDrawn.get(id)!);
        const known = standing(id);
        return known !== undefined && known.fed && known.volts !== null;
      },
      (id, volts) => {
        const now = roundVolts(volts);
        if (after.has(id) || standing(id)?.volts !== now) moved.set(id, now);
      },
    );
    return moved;
  });
}

/**
 * The rows of the loads after an edit; what did not change is the same row.
 * @param nets by condition; null where the edit moves no current
 */
export function mergedRows(
  context: Context,
  known: readonly LoadResult[],
  touched: Touched,
  nets: readonly BranchNet[] | null,
): LoadResult[] {
  const rows = new Map(known.map((row) => [row.part, row]));
  const names = context.evaluated.map(({ condition }) => condition.name);
  const moved = nets && movedVolts(context, rows, touched, nets);
  moved?.forEach((volts, i) => {
    const name = names[i]!;
    for (const [part, now] of volts) {
      const row = rows.get(part);
      if (!row || touched.after.has(part)) continue;
      const conditions = { ...row.conditions, [name]: { ...row.conditions[name]!, volts: now } };
      rows.set(part, { part, conditions });
    }
  });
  const voltsOf = (part: string) => (i: number) =>
    moved ? moved[i]!.get(part) : (rows.get(part)!.conditions[names[i]!]!.volts ?? undefined);
  const { parts } = context.graph;
  const anew = [...touched.after].filter((id) => isListed(parts.get(id)!)).sort(byCode);
  return mergedList([...rows.values()], anew.map((id) => rowOf(context, id, voltsOf(id))), touched, ({ part }) => part);
}
