'use client';

import { useCallback, type KeyboardEvent } from 'react';
import { isTyping, useSingleKeysOn } from '@/components/frame/single-keys';
import { actionFor, keyName, type ActionContext } from './actions';
import { stepWalk } from '@/components/rehearsal/on-sheet/shown-walk';
import { walkShown } from './margin/showing';
import { endMove, nudge } from './moving';
import type { Direction } from './navigate';
import { takeAlso } from './taking';

const ARROWS: Record<string, Direction> = { ArrowUp: 'up', ArrowDown: 'down', ArrowLeft: 'left', ArrowRight: 'right' };

/** Keys that work without letters: never switched off. */
const isPlain = (key: string): boolean => key.length > 1;

/**
 * Keys of the sheet. They act while the sheet itself has the focus: never in a field, never while something is composed,
 * and single letters not at all where the person has switched them off.
 */
export function useKeyboard(context: ActionContext): (event: KeyboardEvent) => void {
  const singleKeys = useSingleKeysOn();
  return useCallback(
    (event: KeyboardEvent) => {
      const { hands } = context;
      if (event.nativeEvent.isComposing || event.altKey || isTyping(event.target)) return;
      const key = keyName(event.nativeEvent);
      const { mode } = hands.view.getState();
      const direction = ARROWS[key];
      const done = () => {
        event.preventDefault();
        event.stopPropagation();
      };
      const walk = mode.kind === 'rest' ? walkShown(hands.view.getState()) : null;
      if (walk && !event.ctrlKey && !event.metaKey && !event.shiftKey && (direction === 'left' || direction === 'right')) {
        done();
        return stepWalk(walk, direction === 'left' ? -1 : 1);
      }
      if (direction && !event.ctrlKey && !event.metaKey) {
        done();
        if (mode.kind === 'wire') {
          const count = hands.candidates(mode.from).length;
          const step = direction === 'down' || direction === 'right' ? 1 : -1;
          hands.view.getState().setMode({ ...mode, index: (mode.index + step + count) % count });
        } else if (mode.kind === 'move') nudge(hands, direction);
        else if (event.shiftKey) takeAlso(hands, direction);
        else hands.arrow(direction);
        return;
      }
      if (key === 'Tab') {
        if (hands.terminal(event.shiftKey ? -1 : 1)) done();
        return;
      }
      if (key === 'Enter' && (mode.kind === 'wire' || mode.kind === 'move')) {
        done();
        if (mode.kind === 'wire') hands.endWire();
        else endMove(hands);
        return;
      }
      if (!singleKeys && !isPlain(key)) return;
      // The browser's own paste event brings what lies on the clipboard without asking for leave to read it.
      if (key === 'Ctrl V') return;
      const action = actionFor(key);
      if (!action) return;
      done();
      action.does(context);
    },
    [context, singleKeys],
  );
}
