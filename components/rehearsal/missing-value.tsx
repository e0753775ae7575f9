'use client';

import { useState } from 'react';
import { Button, WordButton } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { useSheet, type OpenDrawing } from '@/components/sheet/use-drawing';
import { diff } from '@/diagram/document/patch';
import { withMissing, type Missing } from '@/diagram/rehearsal/missing';

interface MissingValueProps {
  drawing: OpenDrawing;
  missing: Missing;
  /** what cannot be done for want of it */
  children: string;
}

/** A value that the drawing does not give: it is typed here and becomes part of the drawing, as one step of its history. */
export function MissingValue({ drawing, missing, children }: MissingValueProps) {
  const mayEdit = useSheet(drawing.store, (state) => state.rights.edit);
  const [typing, setTyping] = useState(false);
  const [text, setText] = useState('');
  const [error, setError] = useState<string>();
  const wants = missing.field === 'curve' ? 'B, C or D' : `a number above 0, in ${missing.unit}`;
  const save = () => {
    const { document, run } = drawing.store.getState();
    const next = withMissing(document, missing, text);
    if (!next) return setError(`Type ${wants}.`);
    run(`Give ${missing.words}`, diff(document, next));
  };
  return (
    <div className="border-l-2 border-red pl-[18px]">
      <p>{children}</p>
      {!mayEdit && <p className="text-grey">Whoever draws here can type it.</p>}
      {mayEdit && !typing && <WordButton onClick={() => setTyping(true)}>Type it</WordButton>}
      {mayEdit && typing && (
        <form
          className="mt-2 flex flex-col gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            save();
          }}
        >
          <TextField
            label={missing.words}
            unit={missing.unit}
            inputMode={missing.field === 'curve' ? 'text' : 'decimal'}
            autoFocus
            value={text}
            error={error}
            onChange={(event) => {
              setText(event.target.value);
              setError(undefined);
            }}
          />
          <div className="flex gap-2">
            <Button type="submit" solid>
              Give it
            </Button>
            <Button onClick={() => setTyping(false)}>Leave</Button>
          </div>
        </form>
      )}
    </div>
  );
}
