import { diff } from '../document/patch';
import { PartSchema, canonical, type Cable, type Installation, type Part } from '../document/schema';
import { compareDesignations, listNames, nameOf } from '../document/names';
import { ratingText, readCable, readRating } from './rating-text';
import type { Command, Refusal } from './types';

const setPart = (doc: Installation, part: Part) =>
  diff(doc, canonical({ ...doc, parts: doc.parts.map((other) => (other.id === part.id ? part : other)) }));
const setCable = (doc: Installation, cable: Cable) =>
  diff(doc, canonical({ ...doc, cables: doc.cables.map((other) => (other.id === cable.id ? cable : other)) }));

/** Changes a rating where it is written: "B16", "63 A 30 mA A", "9 W". */
export function editRating(doc: Installation, partId: string, text: string): Command | Refusal {
  const part = doc.parts.find((candidate) => candidate.id === partId);
  if (!part) return { refused: 'That part is no longer drawn.' };
  const reading = readRating(part, text);
  if (!reading.ok) return { refused: reading.message };
  return {
    label: `${nameOf(doc, part)}: ${text.trim() || 'no rating'}`,
    patch: setPart(doc, reading.value),
    parts: [partId],
  };
}

/** Changes the rating of several parts at once, in one step; refused whole where one of them has no such rating. */
export function editRatings(doc: Installation, ids: readonly string[], text: string): Command | Refusal {
  if (ids.length === 1) return editRating(doc, ids[0]!, text);
  const chosen = doc.parts.filter((part) => ids.includes(part.id));
  if (chosen.length === 0) return { refused: 'Those parts are no longer drawn.' };
  const changed = new Map<string, Part>();
  for (const part of chosen) {
    const reading = readRating(part, text);
    if (!reading.ok) return { refused: `${nameOf(doc, part)}: ${reading.message}` };
    changed.set(part.id, reading.value);
  }
  const names = listNames(chosen.map((part) => nameOf(doc, part)).sort(compareDesignations), 4);
  return {
    label: `${names}: ${text.trim() || 'no rating'}`,
    patch: diff(doc, canonical({ ...doc, parts: doc.parts.map((part) => changed.get(part.id) ?? part) })),
    parts: chosen.map((part) => part.id),
  };
}

/** The rating that several parts share as it is written; empty where they differ. */
export function sharedRating(doc: Installation, ids: readonly string[]): string {
  const texts = new Set(doc.parts.filter((part) => ids.includes(part.id)).map(ratingText));
  return texts.size === 1 ? [...texts][0]! : '';
}

/** Changes a designation or a label. An empty one is taken away. */
export function editName(doc: Installation, partId: string, field: 'ref' | 'label', text: string): Command | Refusal {
  const part = doc.parts.find((candidate) => candidate.id === partId);
  if (!part) return { refused: 'That part is no longer drawn.' };
  const { [field]: _old, ...rest } = part;
  const value = text.trim();
  const result = PartSchema.safeParse(value === '' ? rest : { ...rest, [field]: value });
  if (!result.success)
    return { refused: field === 'ref' ? 'A designation has at most 24 letters.' : 'A label has at most 80 letters.' };
  return {
    label:
      value === ''
        ? `Take the ${field === 'ref' ? 'designation' : 'label'} off ${nameOf(doc, part)}`
        : `Call ${nameOf(doc, part)} ${value}`,
    patch: setPart(doc, result.data),
    parts: [partId],
  };
}

/** Changes a cable where it is written: "3×2.5 24 m". */
export function editCable(doc: Installation, cableId: string, text: string): Command | Refusal {
  const cable = doc.cables.find((candidate) => candidate.id === cableId);
  if (!cable) return { refused: 'That cable is no longer drawn.' };
  const reading = readCable(cable, text);
  if (!reading.ok) return { refused: reading.message };
  return { label: `Cable: ${text.trim()}`, patch: setCable(doc, reading.value) };
}
