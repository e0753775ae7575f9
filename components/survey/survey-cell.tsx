'use client';

import type { KeyboardEvent } from 'react';
import { GridCell } from '@/components/grid/grid-cell';
import { cellName, focusCell } from '@/components/grid/focus';
import type { SurveyRoom } from '@/diagram/document/schema';
import { emptyCell, showCell, type TypedColumn } from './columns';
import { refusedKey, type Problem } from './problems';
import type { Survey } from './use-survey';

interface SurveyCellProps {
  survey: Survey;
  room: SurveyRoom;
  column: TypedColumn;
  /** of this cell */
  problem?: Problem;
  /** ids of the rows beside it; null where there is none */
  below: string | null;
  above: string | null;
  className?: string;
}

/** A cell of the survey, with the keys that lead from room to room. */
export function SurveyCell({ survey, room, column, problem, below, above, className = '' }: SurveyCellProps) {
  const { id } = column;
  const isBlank = room.id === survey.blank.id;

  const onKey = (event: KeyboardEvent): (() => void) | undefined => {
    const ctrl = event.ctrlKey || event.metaKey;
    switch (event.key) {
      case 'Enter':
        // Ctrl Enter drafts, from any cell: the text is taken over here, then the sheet hears the key.
        if (ctrl) return () => undefined;
        if (event.shiftKey) return () => survey.newRoom(room.id);
        return below ? () => focusCell(below, id) : () => survey.toBlank(id);
      case 'ArrowDown':
        return !ctrl && below ? () => focusCell(below, id) : undefined;
      case 'ArrowUp':
        return !ctrl && above ? () => focusCell(above, id) : undefined;
      case 'd':
        return ctrl ? () => survey.sameAsAbove(room.id, id) : undefined;
      default:
        return undefined;
    }
  };

  return (
    <GridCell
      name={cellName(room.id, id)}
      label={`${isBlank ? 'New room' : room.name || 'Unnamed room'}, ${column.spoken}`}
      text={isBlank ? '' : showCell(id, room)}
      refused={survey.refused.get(refusedKey(room.id, id))?.text}
      marked={problem?.cell ? problem.cell : undefined}
      invalid={problem !== undefined}
      title={problem?.heading}
      numeric={column.numeric}
      readOnly={!survey.mayEdit}
      placeholder={isBlank ? { name: 'name', kind: 'kind' }[id as string] : emptyCell(id)}
      className={`px-2 max-lap:px-1 ${column.right ? 'text-right' : ''} ${className}`}
      onTake={() => survey.take(room.id, id)}
      onType={(text) => survey.type(room.id, id, text)}
      onKey={onKey}
      onPaste={(text) => {
        if (!/[\t\n]/.test(text.trim())) return false;
        survey.paste(text);
        return true;
      }}
    />
  );
}
