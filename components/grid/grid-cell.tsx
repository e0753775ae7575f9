'use client';

import { useLayoutEffect, useRef, useState, type ClipboardEvent, type KeyboardEvent } from 'react';

interface GridCellProps {
  /** by which `focusCell` finds it */
  name: string;
  /** read to a screen reader: "Way 4, run, metres" */
  label: string;
  /** what the document holds */
  text: string;
  /** typed before and not understood: it stays in its cell */
  refused?: string;
  /** shown while nobody is in the cell: "3 of 2" */
  marked?: string;
  invalid?: boolean;
  title?: string;
  /** id of the words that say what is wrong */
  describedBy?: string;
  placeholder?: string;
  numeric?: boolean;
  readOnly?: boolean;
  className?: string;
  onTake(): void;
  onType(text: string): void;
  /** what a key does once the cell's text is taken over; undefined where the key is the field's own */
  onKey(event: KeyboardEvent<HTMLInputElement>): (() => void) | undefined;
  /** Esc while nothing is being typed. @returns true where it did something */
  onEscape?(): boolean;
  /** @returns true where the text is no text of one cell and was taken over */
  onPaste?(text: string): boolean;
}

/** A cell that is typed into. What is typed is taken over when the cell is left; Esc takes the typing back. */
export function GridCell(props: GridCellProps) {
  const { text, refused, marked, className = '', onType } = props;
  const [typed, setTyped] = useState<string | null>(null);
  const [inHand, setInHand] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  // Before the next key: the first letter typed replaces what stands there.
  useLayoutEffect(() => {
    if (inHand) input.current?.select();
  }, [inHand]);
  const kept = refused ?? (inHand ? undefined : marked) ?? text;

  const commit = () => {
    if (typed !== null && typed !== (refused ?? text)) onType(typed);
    setTyped(null);
  };

  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.nativeEvent.isComposing) return;
    if (event.key === 'Escape') {
      const did = typed !== null || props.onEscape?.();
      setTyped(null);
      if (!did) return;
      event.preventDefault();
      event.stopPropagation();
      return;
    }
    const action = props.onKey(event);
    if (!action) return;
    event.preventDefault();
    commit();
    action();
  };

  const onPaste = (event: ClipboardEvent<HTMLInputElement>) => {
    if (!props.onPaste?.(event.clipboardData.getData('text/plain'))) return;
    event.preventDefault();
    setTyped(null);
  };

  return (
    <input
      ref={input}
      dir={props.numeric ? undefined : 'auto'}
      data-cell={props.name}
      data-typing={typed === null ? undefined : ''}
      aria-label={props.label}
      aria-invalid={props.invalid ? true : undefined}
      aria-describedby={props.describedBy}
      title={props.title}
      inputMode={props.numeric ? 'decimal' : undefined}
      enterKeyHint="next"
      autoComplete="off"
      spellCheck={false}
      readOnly={props.readOnly}
      value={typed ?? kept}
      placeholder={props.placeholder}
      className={`block h-full w-full min-w-0 bg-transparent placeholder:text-grey focus:outline-2 focus:-outline-offset-3 focus:outline-ink aria-invalid:font-bold aria-invalid:text-red aria-invalid:outline-2 aria-invalid:-outline-offset-3 aria-invalid:outline-red focus:aria-invalid:outline-3 ${className}`}
      onFocus={() => {
        setInHand(true);
        props.onTake();
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
