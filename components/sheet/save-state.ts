/** What stands at the upper right of every sheet: whether what is on the screen is safe, and where. */
export type SaveState =
  /** `at` in ms since 1970; null before anything was drawn here */
  | { kind: 'saved'; at: number | null }
  | { kind: 'saving' }
  /** not on the server yet; kept in this browser */
  | { kind: 'kept'; count: number; why: 'offline' | 'signed-out' | 'refused'; message?: string }
  /** neither on the server nor kept by the browser: only in this window */
  | { kind: 'unkept'; count: number }
  | { kind: 'conflict'; count: number };

const changes = (count: number) => `${count} ${count === 1 ? 'change' : 'changes'}`;

/** Hours and minutes where the person is, as on a drawing: 14:02. */
export const clock = (at: number): string => {
  const time = new Date(at);
  return `${String(time.getHours()).padStart(2, '0')}:${String(time.getMinutes()).padStart(2, '0')}`;
};

/** The save state in the words of the sheet. */
export function saveWords(state: SaveState): string {
  switch (state.kind) {
    case 'saved':
      return state.at === null ? 'Saved' : `Saved ${clock(state.at)}`;
    case 'saving':
      return 'Saving';
    case 'kept':
      return `Not saved: kept on this device, ${changes(state.count)}`;
    case 'unkept':
      return `Not saved and not kept: ${changes(state.count)}`;
    case 'conflict':
      return 'Not saved: somebody changed the same, choose';
  }
}
