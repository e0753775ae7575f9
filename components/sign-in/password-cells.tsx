'use client';

import { useId, useState, type InputHTMLAttributes } from 'react';
import { WordButton } from '@/components/ui/button';
import { entryInput } from './entry-input';

type PasswordCellsProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'type' | 'id'> & { label: string; error?: string };

/** A password in a row of the title block, with a cell that shows it. */
export function PasswordCells({ label, error, ...input }: PasswordCellsProps) {
  const [shown, setShown] = useState(false);
  const id = useId();
  return (
    <div className="flex border-b border-ink">
      <div className="min-w-0 flex-1 border-r border-ink p-2">
        <label htmlFor={id} className="block px-2 text-small text-grey">
          {label}
        </label>
        <input
          {...input}
          id={id}
          type={shown ? 'text' : 'password'}
          aria-invalid={error ? true : undefined}
          aria-describedby={error ? `${id}-error` : undefined}
          className={entryInput}
        />
        {error && (
          <p id={`${id}-error`} className="px-2 text-red">
            {error}
          </p>
        )}
      </div>
      <div className="flex w-[104px] shrink-0 items-center px-4 text-small sm:w-40">
        <WordButton aria-pressed={shown} className="text-small" onClick={() => setShown(!shown)}>
          {shown ? 'Hide' : 'Show'} password
        </WordButton>
      </div>
    </div>
  );
}
