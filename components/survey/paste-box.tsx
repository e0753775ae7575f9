'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { parseSurvey } from '@/diagram/survey/parse';
import { roomsWords } from './words';

/** Rows from a spreadsheet where no key pastes: a tablet, a browser that keeps its clipboard to itself. */
export function PasteBox({ onPaste, onClose }: { onPaste(text: string): void; onClose(): void }) {
  const [text, setText] = useState('');
  const found = text.trim() === '' ? 0 : parseSurvey(text).rooms.length;
  return (
    <section className="my-3 border-l-2 border-ink pl-4" onKeyDown={(event) => event.key === 'Escape' && onClose()}>
      <label htmlFor="paste-rows" className="block">
        Rows from a spreadsheet, a room a line, with a line of headings or in the order of the table
      </label>
      <textarea
        id="paste-rows"
        dir="auto"
        autoFocus
        rows={4}
        value={text}
        onChange={(event) => setText(event.target.value)}
        placeholder={'Name\tLamps\tFans\tOutlets\nStudy\t2x9\t1x55\t3'}
        className="mt-1 block w-full max-w-2xl border border-ink bg-paper p-2 placeholder:text-grey"
      />
      <div className="mt-2 flex gap-2">
        <Button solid disabled={found === 0} onClick={() => onPaste(text)}>
          {found === 0 ? 'Take the rows' : `Take ${roomsWords(found)}`}
        </Button>
        <Button onClick={onClose}>Leave</Button>
      </div>
    </section>
  );
}
