'use client';

import { useId, type InputHTMLAttributes, type ReactNode, type SelectHTMLAttributes } from 'react';

interface FieldFrame {
  label: string;
  /** where to find the value, what it means */
  hint?: ReactNode;
  /** what is wrong with what was typed, and what to do */
  error?: string;
  /** printed behind the value: "V", "ohm" */
  unit?: string;
  /** the field is not needed */
  optional?: boolean;
}

const box =
  'block w-full border-b border-ink bg-transparent px-2 py-1 text-[14px] leading-6 text-ink placeholder:text-grey focus-visible:-outline-offset-2 aria-invalid:border-b-2 aria-invalid:border-red [&[readonly]]:border-transparent disabled:border-transparent pointer-coarse:min-h-11';

function useFieldIds(hint: ReactNode, error: string | undefined) {
  const id = useId();
  const described = [error && `${id}-error`, hint && `${id}-hint`].filter(Boolean).join(' ');
  return { id, describedBy: described || undefined };
}

function Around({ id, label, optional, unit, hint, error, children }: FieldFrame & { id: string; children: ReactNode }) {
  return (
    <div>
      <label htmlFor={id} className="block text-small text-grey">
        {label}
        {optional && ' (may stay empty)'}
      </label>
      <div className="flex items-baseline gap-2">
        <div className="min-w-0 flex-1">{children}</div>
        {unit && <span className="text-grey">{unit}</span>}
      </div>
      {error && (
        <p id={`${id}-error`} className="mt-1 border-l-2 border-red pl-2 text-red">
          {error}
        </p>
      )}
      {hint && (
        <p id={`${id}-hint`} className="mt-1 text-small text-grey">
          {hint}
        </p>
      )}
    </div>
  );
}

export type TextFieldProps = FieldFrame & Omit<InputHTMLAttributes<HTMLInputElement>, 'id'>;

/** One line to type in, written on a rule as on paper. */
export function TextField({ label, hint, error, unit, optional, className = '', ...input }: TextFieldProps) {
  const { id, describedBy } = useFieldIds(hint, error);
  return (
    <Around {...{ id, label, hint, error, unit, optional }}>
      <input dir="auto" {...input} id={id} aria-invalid={error ? true : undefined} aria-describedby={describedBy} className={`${box} ${className}`} />
    </Around>
  );
}

export type SelectFieldProps = FieldFrame &
  Omit<SelectHTMLAttributes<HTMLSelectElement>, 'id'> & { options: readonly { value: string; label: string }[] };

export function SelectField({ label, hint, error, unit, optional, options, className = '', ...select }: SelectFieldProps) {
  const { id, describedBy } = useFieldIds(hint, error);
  return (
    <Around {...{ id, label, hint, error, unit, optional }}>
      <select {...select} id={id} aria-invalid={error ? true : undefined} aria-describedby={describedBy} className={`${box} ${className}`}>
        {options.map((option) => (
          <option key={option.value} value={option.value} className="bg-paper text-ink">
            {option.label}
          </option>
        ))}
      </select>
    </Around>
  );
}

export type CheckFieldProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'id' | 'type'> & { label: string; hint?: ReactNode };

/** A box to tick, with its sentence. */
export function CheckField({ label, hint, ...input }: CheckFieldProps) {
  const id = useId();
  return (
    <div className="flex items-start gap-2 pointer-coarse:min-h-11 pointer-coarse:items-center">
      <input
        {...input}
        id={id}
        type="checkbox"
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="mt-px size-[14px] shrink-0 accent-ink pointer-coarse:size-6"
      />
      <div>
        <label htmlFor={id}>{label}</label>
        {hint && (
          <p id={`${id}-hint`} className="text-small text-grey">
            {hint}
          </p>
        )}
      </div>
    </div>
  );
}
