import { workOutBackups } from '../../circuit/backup-figures';
import { byDesignation } from '../../document/names';
import type { Context } from '../context';
import { byRef } from '../duplicate-ref';
import { liveOnMainOff } from '../live-after-main-off';
import { backupsOf, figuresOf } from '../readings/figures';
import { neutralFaults } from '../readings/neutral-faults';
import { barePoints, onOwnRod, type Bare } from '../readings/rcd-duty';
import { boardOf, switchboardOf, switchboards, type Switchboard } from '../readings/switchboards';
import { isolatorsByWay } from '../shared-box-lines';
import { breakers } from '../weak-breaking-capacity';
import { mustBe } from './beyond';
import { insertInOrder, mergedList, mergedMap, mergedSet } from './merging';
import type { Touched } from './touched';

const sourcesOf = ({ held }: Switchboard, part: string): string =>
  [...new Set(held.find((each) => each.part.id === part)!.feeds)].sort().join(' ');

/** Switchboards: those that hold a touched part anew. @throws Beyond where a part of the trunk holds other sources */
function mergeBoards(
  known: Context,
  now: Context,
  { before, after }: Touched,
  spine: ReadonlySet<string>,
): ReadonlyMap<string, Switchboard> {
  const merged = new Map(switchboards(known));
  const anew = switchboards(now);
  for (const [key, board] of anew)
    for (const { part } of board.held)
      if (spine.has(part.id))
        mustBe(sourcesOf(merged.get(key)!, part.id) === sourcesOf(board, part.id), 'what feeds the trunk');
  const keysOf = ({ graph }: Context, ids: ReadonlySet<string>) =>
    [...ids].flatMap((id) => boardOf(graph.parts.get(id)!) ?? []);
  for (const key of new Set([...keysOf(known, before), ...keysOf(now, after)])) {
    const held = (merged.get(key)?.held ?? []).filter(({ part }) => !before.has(part.id));
    const own = (anew.get(key)?.held ?? []).filter(({ part }) => after.has(part.id));
    insertInOrder(held, own, (a, b) => byDesignation(a.part, b.part));
    if (held.length > 0) merged.set(key, switchboardOf(held));
    else merged.delete(key);
  }
  return merged;
}

/** True when the touched parts carry the same designations as before. */
const isNamedAlike = (known: Context, now: Context, { before, after }: Touched): boolean =>
  [...before, ...after].every((id) => known.graph.parts.get(id)?.ref === now.graph.parts.get(id)?.ref);

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
  if (isNamedAlike(known, now, touched)) byRef.give(context, byRef(known));
  onOwnRod.give(context, mergedSet(onOwnRod(known), onOwnRod(now), touched));
  const bare = barePoints(now);
  const idOf = ({ state }: Bare) => state.part.id;
  barePoints.give(
    context,
    barePoints(known).map((list, i) => mergedList(list, bare[i]!, touched, idOf)),
  );
  switchboards.give(context, mergeBoards(known, now, touched, spine));
  isolatorsByWay.give(context, mergedMap(isolatorsByWay(known), isolatorsByWay(now), touched));
  breakers.give(context, mergedList(breakers(known), breakers(now), touched, ({ device }) => device.id));
  liveOnMainOff.give(context, mergeLive(known, now, touched));
  backupsOf.give(context, workOutBackups(now.graph, context.evaluation, figuresOf(context).drawn));
}
