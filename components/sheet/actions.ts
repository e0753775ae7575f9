import type { KeyHelp } from '@/components/frame/types';
import type { Hands } from './hands';
import { routeInHandAgain } from './leading';
import { askForCopy } from './copying';
import { askToShow, playShown } from './margin/showing';
import { align, distribute, lock, turn, unpin } from './placing';
import { takeAll, takeKind, takeRoom } from './taking';
import type { TidyWay } from './tidy/use-tidy';

/** Everything that can be done on the sheet: by its key, and by its words in the command list. */
export interface Action {
  id: string;
  /** as the command list says it */
  words: string;
  /** as printed on the keys; absent where it is reached by words alone */
  keys?: string;
  /** single keys act only while the sheet has the focus and may be switched off */
  does: (context: ActionContext) => void;
  /** changes the drawing: not offered to readers */
  edits?: boolean;
}

export interface ActionContext {
  hands: Hands;
  otherFace: () => void;
  /** turns to the schedules, at the way in hand */
  schedule: () => void;
  nextNote: (step: 1 | -1) => void;
  page: (step: 1 | -1) => void;
  tidy: (way?: TidyWay) => void;
  /** opens the outline, or goes to it */
  outline: () => void;
  /** gives the canvas the hands */
  toSheet: () => void;
  /** shows the list of the keys */
  keys: () => void;
}

const camera = ({ hands }: ActionContext) => hands.view.getState().camera;
const mode = ({ hands }: ActionContext) => hands.view.getState();

export const ACTIONS: readonly Action[] = [
  {
    id: 'extend',
    words: 'Extend: what comes next at the terminal in hand',
    keys: 'e',
    edits: true,
    does: ({ hands }) => hands.extend(),
  },
  {
    id: 'edit',
    words: 'Edit the rating or designation where it is written',
    keys: 'Enter',
    edits: true,
    does: ({ hands }) => hands.edit(),
  },
  {
    id: 'edit-cable',
    words: 'Edit the cable at the terminal in hand',
    keys: 'l',
    edits: true,
    does: ({ hands }) => hands.editCable(),
  },
  {
    id: 'wire',
    words: 'Draw a wire from the terminal in hand',
    keys: 'w',
    edits: true,
    does: ({ hands }) => hands.wire(),
  },
  {
    id: 'move',
    words: 'Move what is in hand by the module',
    keys: 'm',
    edits: true,
    does: ({ hands }) => hands.startMove(),
  },
  {
    id: 'load',
    words: 'Move a load to another way, or between mains and backup',
    keys: 'b',
    edits: true,
    does: ({ hands }) => hands.chooseWay(),
  },
  { id: 'delete', words: 'Delete what is in hand', keys: 'Delete', edits: true, does: ({ hands }) => hands.remove() },
  {
    id: 'undo',
    words: 'Take back my last step',
    keys: 'Ctrl Z',
    edits: true,
    does: ({ hands }) => hands.store.getState().undo(),
  },
  {
    id: 'redo',
    words: 'Do again what I took back',
    keys: 'Ctrl Shift Z',
    edits: true,
    does: ({ hands }) => hands.store.getState().redo(),
  },
  { id: 'copy', words: 'Copy what is in hand', keys: 'Ctrl C', does: ({ hands }) => void hands.clipboard.copy() },
  { id: 'cut', words: 'Cut what is in hand', keys: 'Ctrl X', edits: true, does: ({ hands }) => void hands.clipboard.copy(true) },
  { id: 'paste', words: 'Paste', keys: 'Ctrl V', edits: true, does: ({ hands }) => void hands.clipboard.paste() },
  {
    id: 'duplicate',
    words: 'Duplicate what is in hand',
    keys: 'Ctrl D',
    edits: true,
    does: ({ hands }) => hands.clipboard.duplicate(),
  },
  { id: 'all', words: 'Take everything in hand', keys: 'Ctrl A', does: ({ hands }) => takeAll(hands) },
  { id: 'take-room', words: 'Take the whole room in hand', keys: 'Shift R', does: ({ hands }) => takeRoom(hands) },
  { id: 'take-kind', words: 'Take every part of this kind in hand', keys: 'Shift K', does: ({ hands }) => takeKind(hands) },
  {
    id: 'copy-room',
    words: 'Copy the room in hand whole to a new room, wired to the same or new ways',
    keys: 'Shift D',
    edits: true,
    does: ({ hands }) => askForCopy(hands),
  },
  { id: 'next-note', words: 'Next finding', keys: 'n', does: ({ nextNote }) => nextNote(1) },
  { id: 'last-note', words: 'Finding before', keys: 'Shift N', does: ({ nextNote }) => nextNote(-1) },
  {
    id: 'show',
    words: 'Show me: play the fault of the finding in hand on the sheet, or leave it',
    keys: 'p',
    does: ({ hands }) => askToShow(hands),
  },
  { id: 'play', words: 'Play or stop the fault that is shown', keys: 'Space', does: ({ hands }) => playShown(hands) },
  { id: 'outline', words: 'Outline: the drawing as a tree to walk and edit', keys: 'o', does: ({ outline }) => outline() },
  { id: 'face', words: 'Other face at the same place', keys: 'g', does: ({ otherFace }) => otherFace() },
  { id: 'schedule', words: 'Schedules and curves of the way in hand', keys: 's', does: ({ schedule }) => schedule() },
  {
    id: 'find',
    words: 'Find by name, number, kind or finding',
    keys: '/',
    does: (context) => mode(context).setMode({ kind: 'find' }),
  },
  {
    id: 'commands',
    words: 'List of all commands',
    keys: 'Ctrl K',
    does: (context) => mode(context).setMode({ kind: 'commands' }),
  },
  {
    id: 'legend',
    words: 'Legend: what the symbols and lines are called',
    keys: 'k',
    does: (context) => mode(context).setMode({ kind: 'legend' }),
  },
  { id: 'larger', words: 'Larger', keys: '+', does: (context) => camera(context)?.zoom(1.25) },
  { id: 'smaller', words: 'Smaller', keys: '-', does: (context) => camera(context)?.zoom(0.8) },
  { id: 'whole', words: 'Whole sheet', keys: 'Home', does: (context) => camera(context)?.all() },
  { id: 'page-on', words: 'Next rooms or next page', keys: '.', does: ({ page }) => page(1) },
  { id: 'page-back', words: 'Rooms or page before', keys: ',', does: ({ page }) => page(-1) },
  {
    id: 'supply',
    words: 'Place the supply, with meter, main switch, rcd and bars',
    edits: true,
    does: ({ hands }) => hands.placeSupply(),
  },
  {
    id: 'supply-alone',
    words: 'Place the service line alone',
    edits: true,
    does: ({ hands }) => hands.placeSupply(true),
  },
  { id: 'row', words: 'Align what is in hand in a row', edits: true, does: ({ hands }) => align(hands, 'row') },
  { id: 'column', words: 'Align what is in hand in a column', edits: true, does: ({ hands }) => align(hands, 'column') },
  {
    id: 'space-row',
    words: 'Space what is in hand evenly in a row: distribute across',
    edits: true,
    does: ({ hands }) => distribute(hands, 'row'),
  },
  {
    id: 'space-column',
    words: 'Space what is in hand evenly in a column: distribute down',
    edits: true,
    does: ({ hands }) => distribute(hands, 'column'),
  },
  {
    id: 'place',
    words: 'Place exactly: write the position in mm',
    edits: true,
    does: ({ hands }) => hands.editPlace(),
  },
  {
    id: 'route-again',
    words: 'Route again: take back the stretches led by hand, of what is in hand or of all',
    edits: true,
    does: ({ hands }) => routeInHandAgain(hands),
  },
  {
    id: 'turn',
    words: 'Turn what is in hand by a quarter: rotate clockwise',
    keys: 'r',
    edits: true,
    does: ({ hands }) => turn(hands),
  },
  {
    id: 'lock',
    words: 'Lock what is in hand in place, or unlock it',
    keys: 'Shift L',
    edits: true,
    does: ({ hands }) => lock(hands),
  },
  {
    id: 'unpin',
    words: 'Let what is in hand be placed by the sheet again',
    edits: true,
    does: ({ hands }) => unpin(hands),
  },
  {
    id: 'tidy',
    words: 'Tidy: place the parts in hand, or all, anew',
    keys: 't',
    edits: true,
    does: ({ tidy }) => tidy(),
  },
  { id: 'renumber', words: 'Renumber designations', edits: true, does: ({ hands }) => hands.renumber() },
  {
    id: 'history',
    words: 'History of my steps',
    keys: 'h',
    does: (context) => mode(context).setMode({ kind: 'history' }),
  },
  {
    id: 'export',
    words: 'Print, export, import, record a revision',
    keys: 'x',
    does: (context) => mode(context).setMode({ kind: 'export' }),
  },
  { id: 'keys', words: 'Keys of this sheet, with the switch for single letters', keys: '?', does: ({ keys }) => keys() },
  { id: 'rest', words: 'One step back', keys: 'Esc', does: ({ hands }) => hands.letGo() },
];

/** Keys of the sheet, for the list behind `?`. */
export const KEYS_HELP: readonly KeyHelp[] = [
  { keys: ['↑', '↓', '←', '→'], does: 'follow the conductor: up is towards the source' },
  { keys: ['Shift', '↑', '↓', '←', '→'], does: 'take the next part in hand as well' },
  { keys: ['Tab'], does: 'next terminal of the part in hand' },
  { keys: ['Alt'], does: 'held while a part is dragged: not drawn to what it nearly stands in line with' },
  { keys: ['←', '→'], does: 'while a fault is shown: a step back, a step on' },
  // The frame tells of `?` itself.
  ...ACTIONS.filter((action) => action.keys && action.id !== 'keys').map((action) => ({ keys: [action.keys!], does: action.words })),
];

/** Keys whose name is not what is printed on them. */
const PRINTED: Readonly<Record<string, string>> = { Escape: 'Esc', '=': '+', ' ': 'Space' };

/** The key of an event as it is printed: "Ctrl Shift Z", "Shift N", "e". Letters by what is typed, by place where it is not Latin. */
export function keyName(event: Pick<KeyboardEvent, 'key' | 'code' | 'ctrlKey' | 'metaKey' | 'shiftKey'>): string {
  // One key of an Arabic keyboard writes two letters at once: length tells nothing.
  const foreign = /[^ -~]/.test(event.key) && event.code.startsWith('Key');
  const latin = foreign ? event.code.slice(3).toLowerCase() : event.key;
  const ctrl = event.ctrlKey || event.metaKey;
  const letter = /^[a-z]$/i.test(latin);
  if (ctrl) return `Ctrl ${event.shiftKey && letter ? 'Shift ' : ''}${letter ? latin.toUpperCase() : latin}`;
  if (letter) return event.shiftKey ? `Shift ${latin.toUpperCase()}` : latin.toLowerCase();
  return PRINTED[latin] ?? latin;
}

const BY_KEY = new Map(ACTIONS.flatMap((action) => (action.keys ? [[action.keys, action] as const] : [])));
if (BY_KEY.size !== ACTIONS.filter((action) => action.keys).length) throw new Error('two actions claim one key');

export const actionFor = (key: string): Action | undefined =>
  BY_KEY.get(key === 'Backspace' ? 'Delete' : key === 'Ctrl Y' ? 'Ctrl Shift Z' : key);
