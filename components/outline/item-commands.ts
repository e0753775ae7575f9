import { ACTIONS, type ActionContext } from '@/components/sheet/actions';
import { askForCopy } from '@/components/sheet/copying';
import { withPlaces } from '@/diagram/commands/place-new';
import { isPoint } from '@/diagram/terminals/roles-of-parts';
import type { OutlineItem } from '@/diagram/outline/types';
import type { Remedy } from '@/diagram/rules/types';

/** What can be done with an item of the outline: the sheet's own actions, and what only a tree can say. */
export interface ItemCommand {
  id: string;
  words: string;
  keys?: string;
  /** changes the drawing */
  edits?: boolean;
  does(): void;
}

const WITH_PART = ['extend', 'edit', 'edit-cable'] as const;
const WITH_LOAD = ['load'] as const;
const WITH_ANY = ['copy', 'cut', 'duplicate', 'delete'] as const;
const WITH_SHEET = ['supply', 'find', 'tidy', 'renumber', 'history', 'export', 'undo', 'redo'] as const;

const fromSheet =
  (context: ActionContext) =>
  (id: string): ItemCommand => {
    const action = ACTIONS.find((candidate) => candidate.id === id);
    if (!action) throw new Error(`the sheet has no action ${id}`);
    const { words, edits } = action;
    // Letters go to a line of the tree: only the other keys of the sheet act in it.
    const keys = id === 'edit' ? 'F2' : action.keys && action.keys.length > 1 && !action.keys.startsWith('Shift') ? action.keys : undefined;
    return { id, words, ...(keys && { keys }), ...(edits && { edits }), does: () => action.does(context) };
  };

/** What an outline brings besides the sheet's actions. */
export interface OutlineHand {
  /** takes the item itself in hand, a room with all its parts */
  takeAll(): void;
  /** brings the item into sight and gives the sheet the hands */
  show(): void;
  /** asks to which terminal a wire is to go */
  askWire(): void;
  /** edits that put the finding right, each tried; empty while they are being worked out */
  remedies: readonly Remedy[];
}

/** The commands of one item, the likeliest first. Those that change the drawing are left out for readers. */
export function commandsFor(item: OutlineItem, context: ActionContext, hand: OutlineHand): ItemCommand[] {
  const { hands } = context;
  const action = fromSheet(context);
  const actions = (ids: readonly string[]) => ids.map(action);
  const show: ItemCommand = { id: 'show', words: 'Show it on the sheet', does: hand.show };
  const wire: ItemCommand = {
    id: 'wire',
    words: 'Draw a wire from its terminal to another',
    edits: true,
    does: hand.askWire,
  };
  const take = (words: string): ItemCommand => ({ id: 'take', words, does: hand.takeAll });
  const loads = hands.doc.parts.some((part) => item.parts.includes(part.id) && isPoint(part));
  const commands = ((): ItemCommand[] => {
    switch (item.kind) {
      case 'finding':
        return [
          ...hand.remedies.map((remedy, i) => ({
            id: `remedy ${i}`,
            words: `Put it right: ${remedy.label}`,
            edits: true,
            does: () => void hands.do({ label: remedy.label, patch: withPlaces(hands.doc, remedy.patch) }),
          })),
          show,
        ];
      case 'wire':
        return [...actions(['edit-cable', 'delete']), show];
      case 'terminal':
        return [action('extend'), wire, action('edit-cable'), show];
      case 'part':
      case 'way':
        return [...actions(WITH_PART), wire, ...actions([...(loads ? WITH_LOAD : []), ...WITH_ANY]), show];
      case 'room':
        return [
          { ...action('copy-room'), does: () => askForCopy(hands, item.place) },
          take('Take all of it in hand: to copy, move or delete it'),
          show,
        ];
      case 'board':
        return [take('Take all of it in hand: to copy, move or delete it'), show];
      case 'sheet':
        return actions(hands.doc.parts.length === 0 ? WITH_SHEET : WITH_SHEET.slice(1));
    }
  })();
  return [...commands, action('commands')].filter((command) => hands.mayEdit || !command.edits);
}
