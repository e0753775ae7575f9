import type { Context } from '../context';
import type { WayResult } from '../examination';
import { figuresOf } from '../readings/figures';
import { round, roundOrNull } from '../results/round';
import { wayResults } from '../results/way-results';

/** The ways after an edit: those of the trunk with what they carry now, those of the touched branches worked out anew. */
export function mergedWays(
  context: Context,
  now: Context,
  known: readonly WayResult[],
  after: ReadonlySet<string>,
  trunk: ReadonlySet<string>,
): WayResult[] {
  const results = new Map(known.map((result) => [result.part, result]));
  for (const result of wayResults(now)) if (after.has(result.part)) results.set(result.part, result);
  const { ways } = figuresOf(context);
  return context.ways.map(({ device }) => {
    const result = results.get(device)!;
    if (!trunk.has(device)) return result;
    const { ibA, demandWatts, connectedWatts } = ways.get(device)!;
    return {
      ...result,
      ib: roundOrNull(ibA),
      connectedWatts: round(connectedWatts),
      demandWatts: round(demandWatts ?? connectedWatts),
    };
  });
}
