import { workOutBackups } from '../../circuit/backup-figures';
import { byDesignation } from '../../document/names';
import type { Context } from '../context';
import { liveOnMainOff } from '../live-after-main-off';
import { backupsOf, figuresOf } from '../readings/figures';
import { neutralFaults } from '../readings/neutral-faults';
import { onOwnRod } from '../readings/rcd-duty';
import { boardOf, switchboards, type Switchboard } from '../readings/switchboards';
import { waysByPart } from '../shared-box-lines';
import { feedsByPart } from '../two-sources-unmarked';
import { breakers } from '../weak-breaking-capacity';
import { mustBe } from './beyond';
import { insertInOrder, mergedList, mergedMap, mergedSet } from './merging';
import type { Touched } from './touched';

/** Switchboards: those that hold a touched part anew. */
function mergeBoards(known: Context, now: Context, { before, after }: Touched): ReadonlyMap<string, Switchboard> {
  const merged = new Map(switchboards(known));
  const keysOf = ({ graph }: Context, ids: ReadonlySet<string>) =>
    [...ids].flatMap((id) => {
      const part = graph.parts.get(id)!;
      const key = boardOf(part);
      return key === undefined ? [] : [{ key, part }];
    });
  for (const { key } of keysOf(known, before)) {
    const board = merged.get(key);
    if (!board) continue;
    const parts = board.parts.filter(({ id }) => !before.has(id));
    if (parts.length > 0) merged.set(key, { ...board, parts });
    else merged.delete(key);
  }
  for (const { key, part } of keysOf(now, after)) {
    const board = merged.get(key) ?? { place: part.place!, board: part.board, parts: [] };
    const parts = [...board.parts];
    insertInOrder(parts, [part], byDesignation);
    merged.set(key, { ...board, parts });
  }
  return merged;
}

function mergeLive(known: Context, now: Context, touched: Touched): ReturnType<typeof liveOnMainOff> {
  const anew = liveOnMainOff(now);
  return new Map(
    [...liveOnMainOff(known)].map(([inverter, was]) => {
      const is = anew.get(inverter)!;
      mustBe(was.conditions.join() === is.conditions.join(), 'when the backup feeds');
      return [inverter, { live: mergedSet(was.live, is.live, touched), conditions: was.conditions }] as const;
    }),
  );
}

/** Puts down the readings of the whole home that go by the id of a part. @throws Beyond */
export function giveReadings(
  context: Context,
  known: Context,
  now: Context,
  touched: Touched,
  spine: ReadonlySet<string>,
): void {
  // Only a home without any is put together.
  neutralFaults.give(context, []);
  onOwnRod.give(context, mergedSet(onOwnRod(known), onOwnRod(now), touched));
  switchboards.give(context, mergeBoards(known, now, touched));
  waysByPart.give(context, mergedMap(waysByPart(known), waysByPart(now), touched));
  breakers.give(context, mergedList(breakers(known), breakers(now), touched, ({ device }) => device.id));
  const kinds = (feeds: readonly string[] = []) => [...new Set(feeds)].sort().join(' ');
  for (const id of spine)
    mustBe(kinds(feedsByPart(known).get(id)) === kinds(feedsByPart(now).get(id)), 'what feeds the trunk');
  feedsByPart.give(context, mergedMap(feedsByPart(known), feedsByPart(now), touched));
  liveOnMainOff.give(context, mergeLive(known, now, touched));
  backupsOf.give(context, workOutBackups(now.graph, context.evaluation, figuresOf(context).drawn));
}
