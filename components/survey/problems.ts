import type { SurveyRoom } from '@/diagram/document/schema';
import type { SurveyError } from '@/diagram/survey/check';
import type { Column } from '@/diagram/survey/columns';
import { columnOf } from './columns';

/** Text in a cell that could not be read: it stays on the screen, not in the document. */
export interface Refused {
  room: string;
  column: Column;
  text: string;
  message: string;
}

/** What is to be put right in the survey: an error of the rows, or a text that could not be read. */
export interface Problem extends SurveyError {
  refused?: Refused;
}

export const refusedKey = (room: string, column: Column): string => `${room}:${column}`;

/** All problems in the order of the table; where a text could not be read, it stands before what the old value gives. */
export function allProblems(rooms: readonly SurveyRoom[], refused: ReadonlyMap<string, Refused>, errors: readonly SurveyError[]): Problem[] {
  const unread = [...refused.values()].map((entry): Problem => {
    const at = rooms.findIndex((room) => room.id === entry.room);
    return {
      room: entry.room,
      column: entry.column,
      cell: entry.text,
      heading: `${rooms[at]?.name.trim() || `Row ${at + 1}`}, ${columnOf(entry.column).spoken}: ${entry.text}`,
      message: `${entry.message}. Until it is right the value before stays.`,
      refused: entry,
    };
  });
  const rest = errors.filter((error) => !error.room || !error.column || !refused.has(refusedKey(error.room, error.column)));
  const place = new Map(rooms.map((room, i) => [room.id, i]));
  const order = (problem: Problem) => (problem.room === null ? rooms.length : (place.get(problem.room) ?? rooms.length));
  return [...unread, ...rest].sort((a, b) => order(a) - order(b));
}
