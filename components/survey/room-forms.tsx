'use client';

import { useState } from 'react';
import type { SurveyRoom } from '@/diagram/document/schema';
import type { Column } from '@/diagram/survey/columns';
import { GROUPS, TYPED, showCell, type GroupId, type TypedColumn } from './columns';
import { SurveyCell } from './survey-cell';
import { rowsOf } from './survey-table';
import type { Survey } from './use-survey';

const groups: readonly Exclude<GroupId, 'comes'>[] = ['room', 'holds', 'keeps'];

/** Columns that are counts: a finger steps them. */
const stepped: Partial<Record<Column, (room: SurveyRoom) => number>> = {
  lamps: (room) => room.lamps,
  fans: (room) => room.fans,
  outlets: (room) => room.outlets,
  keepLamps: (room) => room.keepLamps,
  keepFans: (room) => room.keepFans,
};

const stepButton = 'flex size-11 shrink-0 cursor-pointer items-center justify-center border border-ink text-[16px] disabled:border-grey disabled:text-grey';

function Steps({ survey, room, column }: { survey: Survey; room: SurveyRoom; column: TypedColumn }) {
  const count = stepped[column.id]?.(room);
  if (count === undefined || !survey.mayEdit) return null;
  const step = (by: number) => {
    const rest = showCell(column.id, room).split(' × ')[1];
    survey.type(room.id, column.id, rest ? `${count + by}x${rest}` : String(count + by));
  };
  return (
    <>
      <button type="button" className={stepButton} aria-label={`One less: ${column.spoken}`} disabled={count === 0} onClick={() => step(-1)}>
        -
      </button>
      <button type="button" className={stepButton} aria-label={`One more: ${column.spoken}`} onClick={() => step(1)}>
        +
      </button>
    </>
  );
}

function RoomForm({ survey, room }: { survey: Survey; room: SurveyRoom }) {
  const problems = survey.problems.filter((problem) => problem.room === room.id);
  const isBlank = room.id === survey.blank.id;
  const step = survey.steps.find((entry) => entry.room === room.id);
  const [open, setOpen] = useState(isBlank);
  const name = isBlank ? 'New room' : room.name || 'Unnamed room';
  return (
    <section className="border-b border-hair" aria-label={name}>
      <button
        type="button"
        aria-expanded={open}
        className="flex min-h-12 w-full cursor-pointer items-center gap-3 text-left"
        onClick={() => setOpen(!open)}
      >
        <b className={`text-[14px] ${isBlank ? 'font-normal text-grey' : ''}`}>{name}</b>
        <span className={`ml-auto text-small ${problems.length > 0 ? 'text-red' : 'text-grey'}`}>
          {problems.length > 0 ? problems[0]!.cell : step?.words}
        </span>
        <span aria-hidden="true">{open ? '-' : '+'}</span>
      </button>
      {open && (
        <div className="flex flex-col gap-4 pb-4">
          {groups.map((group) => (
            <fieldset key={group} className={group === 'keeps' ? 'bg-row p-2' : 'px-2'}>
              <legend className="float-left mb-1 w-full font-semibold">{GROUPS[group]}</legend>
              <div className="clear-both flex flex-col">
                {TYPED.filter((column) => column.group === group).map((column) => (
                  <div key={column.id} className="flex items-center gap-2 border-b border-hair py-1">
                    <span className="w-24 shrink-0 text-small text-grey" aria-hidden="true">
                      {column.name} {column.unit}
                    </span>
                    <div className="h-11 min-w-0 flex-1 text-[16px]">
                      <SurveyCell
                        survey={survey}
                        room={room}
                        column={column}
                        above={null}
                        below={null}
                        problem={problems.find((problem) => problem.column === column.id)}
                      />
                    </div>
                    <Steps survey={survey} room={room} column={column} />
                  </div>
                ))}
              </div>
            </fieldset>
          ))}
          {!isBlank && survey.mayEdit && (
            <button type="button" className="min-h-11 cursor-pointer px-2 text-left underline underline-offset-[3px]" onClick={() => survey.remove(room.id)}>
              Take {name} out of the survey
            </button>
          )}
        </div>
      )}
    </section>
  );
}

/** On a phone each room is a form of the same groups as the table. */
export function RoomForms({ survey }: { survey: Survey }) {
  return (
    <div>
      {rowsOf(survey).map((room) => (
        <RoomForm key={room.id} survey={survey} room={room} />
      ))}
    </div>
  );
}
