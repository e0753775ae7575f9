'use client';

import { useMemo, useState } from 'react';
import type { SurveyRoom } from '@/diagram/document/schema';
import { checkSurvey } from '@/diagram/survey/check';
import type { Column } from '@/diagram/survey/columns';
import { parseSurvey } from '@/diagram/survey/parse';
import { stepsToDraw, surveySteps, takeIntoSurvey } from '@/diagram/survey/step';
import { surveyTotals } from '@/diagram/survey/totals';
import { columnOf } from './columns';
import { copyCell, editCell, orderAfter, removeRoom, setRooms } from './edits';
import { focusCell } from '@/components/grid/focus';
import { allProblems, refusedKey, type Problem, type Refused } from './problems';
import { useBlankRow } from './use-blank-row';
import type { SurveyDocument } from './use-survey-document';
import { roomsWords } from './words';

const NONE: readonly SurveyRoom[] = [];
const nameOf = (room: SurveyRoom): string => room.name.trim() || 'a new room';

/** The survey at work: its rows, what is wrong with them, what they come to, and everything one can do to a cell. */
export function useSurvey({ document, run, rights }: SurveyDocument, hoursWanted: number) {
  const rooms = document.survey ?? NONE;
  const [refused, setRefused] = useState<ReadonlyMap<string, Refused>>(new Map());
  const [inHand, setInHand] = useState<{ room: string; column: Column } | null>(null);
  const blank = useBlankRow(rooms);
  const { practice, supply } = document;

  const options = useMemo(() => ({ practice, supply, hoursWanted }), [practice, supply, hoursWanted]);
  const standing = useMemo(() => new Map([...refused].filter(([, { room }]) => rooms.some(({ id }) => id === room))), [refused, rooms]);
  const problems = useMemo(() => allProblems(rooms, standing, checkSurvey(rooms, options)), [rooms, standing, options]);
  const totals = useMemo(() => {
    const unread = new Set([...standing.values()].map(({ room }) => room));
    return surveyTotals(
      rooms.filter(({ id }) => !unread.has(id)),
      options,
    );
  }, [rooms, standing, options]);

  const steps = useMemo(() => surveySteps(document), [document]);

  const roomOf = (id: string): SurveyRoom | undefined => rooms.find((room) => room.id === id) ?? (id === blank.row.id ? blank.row : undefined);
  const forget = (keys: readonly string[]) => setRefused((before) => new Map([...before].filter(([key]) => !keys.includes(key))));
  const refuse = (entries: readonly Refused[]) =>
    setRefused((before) => new Map([...before, ...entries.map((entry) => [refusedKey(entry.room, entry.column), entry] as const)]));

  const actions = {
    take: (room: string, column: Column) => setInHand({ room, column }),

    /** Takes a cell's text over; a text that cannot be read stays in its cell. */
    type(id: string, column: Column, text: string) {
      const room = roomOf(id);
      if (!room) return;
      const edit = editCell(room, column, text);
      if (!edit.ok) {
        if (id === blank.row.id) {
          run('Add a room', setRooms([room]));
          blank.taken();
        }
        refuse([{ room: id, column, text, message: edit.message }]);
        return;
      }
      forget([refusedKey(id, column)]);
      const isNew = id === blank.row.id;
      if (run(isNew ? `Add ${nameOf(edit.room)}` : `${nameOf(edit.room)}: ${columnOf(column).spoken}`, setRooms([edit.room])) && isNew) blank.taken();
    },

    sameAsAbove(id: string, column: Column) {
      const above = id === blank.row.id ? rooms.at(-1) : rooms[rooms.findIndex((room) => room.id === id) - 1];
      const room = roomOf(id);
      if (!above || !room || column === 'name') return;
      forget([refusedKey(id, column)]);
      const isNew = id === blank.row.id;
      if (run(`${nameOf(room)}: ${columnOf(column).spoken} as in ${nameOf(above)}`, setRooms([copyCell(above, room, column)])) && isNew) blank.taken();
    },

    /** Puts the blank row after a room, with the caret in its name. */
    newRoom(after: string) {
      if (after !== blank.row.id) blank.moveTo(orderAfter(rooms, after));
      focusCell(blank.currentId(), 'name');
    },

    toBlank: (column: Column) => focusCell(blank.currentId(), column),

    /** Pasted rows are rooms of their own, one command; what could not be read is marked in its cell. */
    paste(text: string) {
      const { rooms: pasted, errors } = parseSurvey(text, rooms);
      if (pasted.length === 0) return;
      run(`Paste ${roomsWords(pasted.length)}`, setRooms(pasted));
      refuse(
        errors.flatMap(({ row, column, text: typed, message }) => {
          const room = pasted[row]?.id;
          return room && column ? [{ room, column, text: typed, message }] : [];
        }),
      );
      focusCell(pasted[0]!.id, 'name');
    },

    remove(id: string) {
      const room = roomOf(id);
      if (room) run(`Take ${nameOf(room)} out of the survey`, removeRoom(id));
      setInHand(null);
    },

    remedy(problem: Problem) {
      const room = problem.room === null ? undefined : roomOf(problem.room);
      if (!room || !problem.remedy) return;
      if (run(`${nameOf(room)}: ${problem.remedy.label}`, setRooms([{ ...room, ...problem.remedy.set }])) && problem.column) focusCell(room.id, problem.column);
    },

    takeIntoSurvey(place: string, name: string) {
      run(`Take ${name} into the survey`, takeIntoSurvey(document, place));
    },

    takeBack({ refused: entry }: Problem) {
      if (!entry) return;
      forget([refusedKey(entry.room, entry.column)]);
      focusCell(entry.room, entry.column);
    },

    /** The next cell to put right after the one in hand, round again at the end. */
    nextProblem() {
      const cells = problems.filter((problem) => problem.room !== null && problem.column !== null);
      const here = cells.findIndex((problem) => problem.room === inHand?.room && problem.column === inHand?.column);
      const next = cells[(here + 1) % cells.length];
      if (next) focusCell(next.room!, next.column!);
    },
  };

  return { rooms, blank: blank.row, refused: standing, problems, totals, steps, toDraw: stepsToDraw(steps), options, inHand, mayEdit: rights.edit, ...actions };
}
export type Survey = ReturnType<typeof useSurvey>;
