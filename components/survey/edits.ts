import type { Patch } from '@/diagram/document/patch';
import type { SurveyRoom } from '@/diagram/document/schema';
import { ROOM_KINDS, kindFromName, readCell, type Column } from '@/diagram/survey/columns';

/** What typing into a cell makes of its row, or what is wrong with the text. */
export type Edit = { ok: true; room: SurveyRoom } | { ok: false; message: string };

/** A kind may be typed by its first letters: "sl" is sleeping. */
function wholeKind(text: string): string {
  const typed = text.trim().toLowerCase();
  const meant = typed === '' ? [] : ROOM_KINDS.filter((kind) => kind.startsWith(typed));
  return meant.length === 1 ? meant[0]! : text;
}

/** The row without fields that were typed away. */
function withoutGaps(room: SurveyRoom): SurveyRoom {
  const { run, ...rest } = room;
  return run === undefined ? rest : { ...rest, run };
}

export function editCell(room: SurveyRoom, column: Column, text: string): Edit {
  const reading = readCell(column, column === 'kind' ? wholeKind(text) : text);
  if (!reading.ok) return reading;
  const next = { ...room, ...reading.values };
  const firstName = column === 'name' && room.name === '' && room.kind === 'room';
  return { ok: true, room: withoutGaps(firstName ? { ...next, kind: kindFromName(next.name) } : next) };
}

/** Fields of the row that a column stands for. */
const fieldsOf: Partial<Record<Column, readonly (keyof SurveyRoom)[]>> = { lamps: ['lamps', 'lampWatts'], fans: ['fans', 'fanWatts'] };

/** The row with one column taken from another row. */
export function copyCell(from: SurveyRoom, to: SurveyRoom, column: Column): SurveyRoom {
  const fields = fieldsOf[column] ?? [column];
  return withoutGaps({ ...to, ...Object.fromEntries(fields.map((field) => [field, from[field]])) });
}

export const setRooms = (rooms: SurveyRoom[]): Patch => ({ set: { survey: rooms } });
export const removeRoom = (id: string): Patch => ({ remove: { survey: [id] } });

/** The order number between a row and the one after it. */
export function orderAfter(rooms: readonly SurveyRoom[], id: string): number {
  const at = rooms.findIndex((room) => room.id === id);
  const here = rooms[at]?.order ?? rooms.at(-1)?.order ?? 0;
  const next = rooms[at + 1]?.order;
  return next === undefined ? Math.floor(here) + 1 : (here + next) / 2;
}
