import { applyPatch, isEmptyPatch, touched } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import { conflicts, settle, without } from '@/diagram/commands/merge';
import type { SavedChange } from '@/lib/shared/drawings';
import type { HistoryStep, QueuedChange } from './outbox';
import type { Conflict } from './store';

/** The document of the server as this window knows it, and what is not sent yet. */
export interface Standing {
  base: Installation;
  rev: number;
  pending: readonly QueuedChange[];
}

export interface TakenIn extends Standing {
  /** save ids of mine that the server has already */
  done: string[];
  theirs: SavedChange[];
  /** where mine and theirs cannot both stand */
  keys: string[];
  pending: QueuedChange[];
}

/** Takes in what the server has saved since: mine that are among it are done, the others' come under what is not sent. */
export function takeIn({ base, rev, pending }: Standing, since: readonly SavedChange[]): TakenIn {
  const mine = new Set(pending.map((change) => change.saveId));
  const done: string[] = [];
  const theirs: SavedChange[] = [];
  for (const change of [...since].sort((a, b) => a.rev - b.rev)) {
    if (mine.has(change.saveId)) done.push(change.saveId);
    else theirs.push(change);
    if (change.rev <= rev) continue;
    base = applyPatch(base, change.patch);
    rev = change.rev;
  }
  const left = pending.filter((change) => !done.includes(change.saveId));
  const keys = new Set(left.flatMap((own) => theirs.flatMap((their) => conflicts(own.patch, their.patch))));
  // While somebody has to choose, the changes keep the revision they were drawn on: a reload then asks again.
  const next = keys.size === 0 ? left.map((change) => ({ ...change, base: rev })) : left;
  return { base, rev, pending: next, done, theirs, keys: [...keys].sort() };
}

/** What was chosen, change by change: what stays to be sent, what is emptied, and what is set aside. */
export function settleAll(
  pending: readonly QueuedChange[],
  conflict: Conflict,
  theirs: ReadonlySet<string>,
  rev: number,
): { kept: QueuedChange[]; gone: string[]; aside: HistoryStep[] } {
  const kept: QueuedChange[] = [];
  const gone: string[] = [];
  const aside: HistoryStep[] = [];
  for (const change of pending) {
    const patch = settle(change.patch, conflict.myDocument, conflict.keys, theirs);
    const lost = without(change.patch, touched(patch));
    if (!isEmptyPatch(lost)) aside.push({ label: change.label, step: lost, back: {}, at: Date.now() });
    if (isEmptyPatch(patch)) gone.push(change.saveId);
    else kept.push({ ...change, patch, base: rev });
  }
  return { kept, gone, aside };
}
