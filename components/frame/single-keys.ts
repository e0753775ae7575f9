'use client';

import { useEffect, useRef, useSyncExternalStore } from 'react';
import { KEYS_COOKIE, cookieValue, preferenceCookie } from '@/lib/shared/preferences';

const listeners = new Set<() => void>();
const subscribe = (listener: () => void) => {
  listeners.add(listener);
  return () => void listeners.delete(listener);
};
const read = () => cookieValue(document.cookie, KEYS_COOKIE) !== 'off';

/** Whether single letters act as shortcuts in this browser. */
export const useSingleKeysOn = (): boolean => useSyncExternalStore(subscribe, read, () => true);

export function setSingleKeysOn(on: boolean): void {
  document.cookie = preferenceCookie(KEYS_COOKIE, on ? 'on' : 'off');
  for (const listener of listeners) listener();
}

const FIELDS = 'input:not([type=radio]):not([type=checkbox]), textarea, select, [contenteditable=true], [role=alertdialog] *, dialog *';

/** True where a key belongs to a field or a dialog, not to the sheet. */
export const isTyping = (target: EventTarget | null): boolean => target instanceof Element && target.matches(FIELDS);

/** The letter printed on the key; on keyboards without Latin letters, the one at its place. */
const letterOf = (event: KeyboardEvent): string =>
  /[^ -~]/.test(event.key) && event.code.startsWith('Key') ? event.code.slice(3).toLowerCase() : event.key;

/**
 * Single-key shortcuts of the sheet: keys as printed ("n", "/", "1"). They act only while no field has the focus and
 * nothing is composed, and not at all when the person has switched them off.
 */
export function useSingleKeys(actions: Readonly<Record<string, (event: KeyboardEvent) => void>>): void {
  const on = useSingleKeysOn();
  const latest = useRef(actions);
  useEffect(() => {
    latest.current = actions;
  });
  useEffect(() => {
    if (!on) return;
    const onKey = (event: KeyboardEvent) => {
      if (event.defaultPrevented || event.isComposing || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      const action = latest.current[letterOf(event)];
      if (!action) return;
      event.preventDefault();
      action(event);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [on]);
}
