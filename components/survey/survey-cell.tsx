'use client';

import { useLayoutEffect, useRef, useState, type ClipboardEvent, type KeyboardEvent } from 'react';
import type { SurveyRoom } from '@/diagram/document/schema';
import { emptyCell, showCell, type TypedColumn } from './columns';
import { cellName, focusCell } from './focus';
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

/** A cell that is typed into. What is typed is taken over when the cell is left; Esc takes the typing back. */
export function SurveyCell({ survey, room, column, problem, below, above, className = '' }: SurveyCellProps) {
  const { id } = column;
  const [typed, setTyped] = useState<string | null>(null);
  const refused = survey.refused.get(refusedKey(room.id, id));
  const isBlank = room.id === survey.blank.id;
  const [inHand, setInHand] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  // Before the next key: the first letter typed replaces what stands there.
  useLayoutEffect(() => {
    if (inHand) input.current?.select();
  }, [inHand]);
  // `3 of 2` while nobody is in the cell; what was typed as soon as somebody is.
  const marked = !inHand && problem?.cell ? problem.cell : undefined;
  const shown = typed ?? refused?.text ?? marked ?? (isBlank ? '' : showCell(id, room));

  const commit = () => {
    if (typed !== null && typed !== (refused?.text ?? showCell(id, room))) survey.type(room.id, id, typed);
    setTyped(null);
  };

  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.nativeEvent.isComposing) return;
    const ctrl = event.ctrlKey || event.metaKey;
    const does: Record<string, (() => void) | undefined> = {
      Enter: ctrl ? () => undefined : event.shiftKey ? () => survey.newRoom(room.id) : below ? () => focusCell(below, id) : () => survey.toBlank(id),
      ArrowDown: !ctrl && below ? () => focusCell(below, id) : undefined,
      ArrowUp: !ctrl && above ? () => focusCell(above, id) : undefined,
      d: ctrl ? () => survey.sameAsAbove(room.id, id) : undefined,
    };
    if (event.key === 'Escape' && typed !== null) {
      event.preventDefault();
      event.stopPropagation();
      setTyped(null);
      return;
    }
    const action = does[event.key];
    if (!action) return;
    if (!(ctrl && event.key === 'Enter')) event.preventDefault();
    commit();
    action();
  };

  const onPaste = (event: ClipboardEvent<HTMLInputElement>) => {
    const text = event.clipboardData.getData('text/plain');
    if (!/[\t\n]/.test(text.trim())) return;
    event.preventDefault();
    setTyped(null);
    survey.paste(text);
  };

  return (
    <input
      ref={input}
      data-cell={cellName(room.id, id)}
      data-typing={typed === null ? undefined : ''}
      aria-label={`${isBlank ? 'New room' : room.name || 'Unnamed room'}, ${column.spoken}`}
      aria-invalid={problem ? true : undefined}
      title={problem?.heading}
      inputMode={column.numeric ? 'decimal' : undefined}
      enterKeyHint="next"
      autoComplete="off"
      spellCheck={false}
      readOnly={!survey.mayEdit}
      value={shown}
      placeholder={isBlank ? { name: 'name', kind: 'kind' }[id as string] : emptyCell(id)}
      className={`block h-full w-full min-w-0 bg-transparent px-2 max-lap:px-1 placeholder:text-grey focus:outline-2 focus:-outline-offset-3 focus:outline-ink aria-invalid:font-bold aria-invalid:text-red aria-invalid:outline-2 aria-invalid:-outline-offset-3 aria-invalid:outline-red focus:aria-invalid:outline-3 ${column.right ? 'text-right' : ''} ${className}`}
      onFocus={() => {
        setInHand(true);
        survey.take(room.id, id);
      }}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={() => {
        setInHand(false);
        commit();
      }}
      onKeyDown={onKeyDown}
      onPaste={onPaste}
    />
  );
}
