import { showWalk, type ShownWalk } from '@/components/rehearsal/on-sheet/shown-walk';
import type { Hands } from '../hands';
import type { View, ViewState } from '../view';
import type { Proof } from './examiner';

/** "Show me": the fault that shows the finding in hand, walked on the sheet itself. */

/** The walk on the sheet: that of the finding in hand. */
export const walkShown = ({ walk, finding }: ViewState): ShownWalk | null => (walk?.finding === finding ? walk : null);

/** @returns false where none is shown */
export function leaveWalk(view: View): boolean {
  const walk = walkShown(view.getState());
  if (!walk) return false;
  walk.player.stop();
  view.getState().set({ walk: null });
  return true;
}

/** Shows the finding in hand as soon as its fault is known; once more, and the sheet is the drawing again. */
export function askToShow({ view, store }: Hands): void {
  if (leaveWalk(view)) return;
  const { finding, set } = view.getState();
  if (finding === null) store.getState().say('Take a finding in hand first: n.');
  else set({ wantsWalk: finding });
}

/** The proof of a finding has come: its walk begins where it was asked for. */
export function answerShow({ view, store, doc }: Hands, finding: string, { walk, cannot }: Proof): void {
  const { wantsWalk, face, set } = view.getState();
  if (wantsWalk !== finding) return;
  set({ wantsWalk: null, ...(walk && { walk: showWalk(finding, walk) }) });
  const at = doc.parts.find(({ id }) => id === walk?.faults.at(-1)?.at)?.place;
  // On the connections the page that is turned to is the one on which the fault is.
  if (face === 'connections' && at !== undefined) set({ place: at });
  if (!walk) store.getState().say(cannot ? `The fault ${cannot}.` : 'No fault shows this finding: its words say it all.');
}

export function playShown({ view, store }: Hands): void {
  const walk = walkShown(view.getState());
  if (walk) walk.player.toggle();
  else store.getState().say('No fault is shown: p shows that of the finding in hand.');
}
