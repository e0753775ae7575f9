import { isRefusal, type Command, type Refusal } from '../commands/types';
import { applyPatch, diff } from '../document/patch';
import { CableSchema, PartSchema, canonical, type Cable, type Installation, type Part } from '../document/schema';
import { fieldById } from './fields';
import type { FieldRef } from './types';

/** A cell that is to be changed, and how the history calls its row: "Way 4". */
export interface Target {
  name: string;
  ref: FieldRef;
}

function ownersOf(doc: Installation, ref: FieldRef): (Part | Cable)[] {
  const ids = new Set(ref.ids);
  return ref.of === 'part' ? doc.parts.filter(({ id }) => ids.has(id)) : doc.cables.filter(({ id }) => ids.has(id));
}

/** Reads the cells of a drawing: their text as it is now, and empty where the thing is no longer drawn. */
export function readerOf(doc: Installation): (ref: FieldRef) => string {
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const cables = new Map(doc.cables.map((cable) => [cable.id, cable]));
  return ({ of, ids, field }) => {
    const [first] = ids;
    const owner = first === undefined ? undefined : of === 'part' ? parts.get(first) : cables.get(first);
    return owner ? fieldById(field).read(owner) : '';
  };
}

/** The text of one cell. */
export const fieldText = (doc: Installation, ref: FieldRef): string => readerOf(doc)(ref);

const cut = (text: string): string => (text.length > 40 ? `${text.slice(0, 37)}...` : text);

/** "Way 4: 2.5 to 4 mm2", "Way 4: 15 m", "3 ways: cable 4 mm2" */
function labelOf(doc: Installation, targets: readonly Target[], noun: string, before: string, after: string): string {
  const [{ name, ref }] = targets as [Target, ...Target[]];
  const { spoken, unit } = fieldById(ref.field);
  const what = spoken.split(',')[0]!.toLowerCase();
  const value = after === '' ? `no ${what}` : [cut(after), unit].filter(Boolean).join(' ');
  if (targets.length > 1) return `${targets.length} ${noun}: ${after === '' || unit ? value : `${what} ${value}`}`;
  return before === '' || after === '' ? `${name}: ${value}` : `${name}: ${cut(before)} to ${value}`;
}

/**
 * Types a text into one cell or into the same column of several rows: one named command, one undo. Either every cell takes
 * the text or nothing changes.
 * @param noun what the rows are: "ways"
 */
export function editCells(
  doc: Installation,
  targets: readonly Target[],
  text: string,
  noun: string,
): Command | Refusal {
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const cables = new Map(doc.cables.map((cable) => [cable.id, cable]));
  let after = '';
  for (const { name, ref } of targets) {
    const owners = ownersOf(doc, ref);
    if (owners.length === 0) return { refused: `${name} is no longer drawn.` };
    for (const owner of owners) {
      const field = fieldById(ref.field);
      const written = field.write(owner, text, doc);
      if (!written.ok) return { refused: written.message };
      // Parsed once more, so that the fields stand in the document's own order.
      const kept = (ref.of === 'part' ? PartSchema : CableSchema).safeParse(written.value);
      if (!kept.success) return { refused: `${field.spoken}: ${kept.error.issues[0]?.message}` };
      after = field.read(kept.data);
      if (ref.of === 'part') parts.set(owner.id, kept.data as Part);
      else cables.set(owner.id, kept.data as Cable);
    }
  }
  const first = targets[0];
  if (!first) return { refused: 'No row is in hand.' };
  const next = canonical({ ...doc, parts: [...parts.values()], cables: [...cables.values()] });
  return { label: labelOf(doc, targets, noun, fieldText(doc, first.ref), after), patch: diff(doc, next) };
}

/** A cell and the text that goes into it. */
export interface Typed extends Target {
  text: string;
}

/**
 * Types a block of texts, as it comes from a spreadsheet: one named command, one undo. The first cell that does not take its
 * text refuses all, by name.
 */
export function editBlock(doc: Installation, block: readonly Typed[]): Command | Refusal {
  let next = doc;
  for (const { text, ...target } of block) {
    const outcome = editCells(next, [target], text, '');
    if (isRefusal(outcome)) return { refused: `${target.name}, "${cut(text)}". ${outcome.refused}` };
    next = applyPatch(next, outcome.patch);
  }
  return { label: `Paste ${block.length} ${block.length === 1 ? 'cell' : 'cells'}`, patch: diff(doc, next) };
}
