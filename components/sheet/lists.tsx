'use client';

import { useEffect, useLayoutEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { Key } from '@/components/ui/key';

export interface ListItem {
  id: string;
  words: string;
  detail?: string;
  keys?: string;
  tone?: 'red';
}

interface ListPanelProps {
  label: string;
  placeholder: string;
  items: (typed: string) => readonly ListItem[];
  onPick(id: string): void;
  onLeave(): void;
  children?: ReactNode;
}

/** A field and what fits it: arrows choose, Enter takes, Esc leaves. */
export function ListPanel({ label, placeholder, items, onPick, onLeave, children }: ListPanelProps) {
  const [typed, setTyped] = useState('');
  const [index, setIndex] = useState(0);
  const field = useRef<HTMLInputElement>(null);
  const list = useId();
  const shown = items(typed);
  const chosen = Math.min(index, Math.max(0, shown.length - 1));
  useLayoutEffect(() => field.current?.focus(), []);
  useEffect(() => {
    document.getElementById(`${list}-${chosen}`)?.scrollIntoView({ block: 'nearest' });
  }, [list, chosen]);
  const onKeyDown = (event: KeyboardEvent) => {
    event.stopPropagation();
    if (event.nativeEvent.isComposing) return;
    if (event.key === 'Escape') onLeave();
    else if (event.key === 'Enter' && shown[chosen]) onPick(shown[chosen].id);
    else if (event.key === 'ArrowDown') setIndex((chosen + 1) % Math.max(1, shown.length));
    else if (event.key === 'ArrowUp') setIndex((chosen - 1 + shown.length) % Math.max(1, shown.length));
    else return;
    event.preventDefault();
  };
  return (
    <div role="dialog" aria-label={label} className="w-full border-y-2 border-ink bg-paper" onKeyDown={onKeyDown}>
      <input
        ref={field}
        dir="auto"
        role="combobox"
        aria-expanded="true"
        aria-controls={list}
        aria-activedescendant={shown[chosen] ? `${list}-${chosen}` : undefined}
        aria-label={label}
        placeholder={placeholder}
        value={typed}
        onChange={(event) => {
          setTyped(event.target.value);
          setIndex(0);
        }}
        className="w-full border-b border-ink bg-transparent px-3 py-2 text-head font-bold outline-none placeholder:font-normal placeholder:text-grey pointer-coarse:min-h-11"
        autoComplete="off"
        spellCheck={false}
      />
      <ul id={list} role="listbox" aria-label={label} className="max-h-[50dvh] overflow-y-auto">
        {shown.map((item, i) => (
          <li
            key={item.id}
            id={`${list}-${i}`}
            role="option"
            aria-selected={i === chosen}
            className={`flex cursor-pointer items-baseline gap-3 border-b border-hair px-3 py-[6px] pointer-coarse:min-h-11 ${i === chosen ? 'bg-ink text-paper' : item.tone === 'red' ? 'text-red' : ''}`}
            onClick={() => onPick(item.id)}
          >
            <span className="min-w-0 flex-1">{item.words}</span>
            {item.detail && <span className={`text-small ${i === chosen ? '' : 'text-grey'}`}>{item.detail}</span>}
            {item.keys && (
              <span className={i === chosen ? '[&_kbd]:text-paper' : ''}>
                <Key>{item.keys}</Key>
              </span>
            )}
          </li>
        ))}
      </ul>
      {shown.length === 0 && <p className="px-3 py-3 text-grey">Nothing has “{typed}”.</p>}
      {children}
    </div>
  );
}
