'use client';

import { useEffect, type RefObject } from 'react';
import { useReactFlow } from 'reactflow';
import type { Hands } from '../hands';
import { dropDrag, endDrag, useDrag } from './drag';
import { PX } from './units';

/** ms that a finger rests on a part before it may move it */
export const HOLD = 400;
/** px that a finger may tremble meanwhile */
const STILL = 10;

interface Held {
  pointer: number;
  ids: readonly string[];
  x: number;
  y: number;
  /** ms, when the finger came down */
  since: number;
}

/**
 * A finger that rests on a part takes it up and moves it; one that moves at once pans, as two always do. The canvas' own
 * panning listens further in and hears nothing of a finger that carries a part.
 */
export function useHold(box: RefObject<HTMLDivElement | null>, hands: Hands): void {
  const flow = useReactFlow();
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const fingers = new Set<number>();
    let timer: ReturnType<typeof setTimeout> | undefined;
    let waiting: Held | null = null;
    let carried: Held | null = null;

    const forget = () => {
      clearTimeout(timer);
      waiting = null;
    };
    const putBack = () => {
      carried = null;
      endDrag();
    };
    const takeUp = () => {
      carried = waiting;
      waiting = null;
      if (!carried) return;
      const { parts } = hands.store.getState().selection;
      const [id] = carried.ids;
      carried.ids = id !== undefined && parts.includes(id) ? parts : carried.ids;
      hands.store.getState().select({ parts: carried.ids, wires: [], terminal: null });
      hands.store.getState().say('Taken up: move it, or lift the finger to leave it.');
      useDrag.setState({ ids: new Set(carried.ids), dx: 0, dy: 0, dropped: false });
    };

    const down = (event: PointerEvent) => {
      if (event.pointerType !== 'touch') return;
      fingers.add(event.pointerId);
      forget();
      if (fingers.size > 1) return putBack();
      const id = (event.target as Element).closest<HTMLElement>('.react-flow__node')?.dataset.id;
      if (!id || !hands.mayEdit) return;
      waiting = { pointer: event.pointerId, ids: [id], x: event.clientX, y: event.clientY, since: event.timeStamp };
      timer = setTimeout(takeUp, HOLD);
    };
    const move = (event: PointerEvent) => {
      if (waiting?.pointer === event.pointerId && Math.hypot(event.clientX - waiting.x, event.clientY - waiting.y) > STILL)
        forget();
      if (carried?.pointer !== event.pointerId) return;
      // A busy page may hear of the move only after the timer: it goes by when the finger moved.
      if (event.timeStamp - carried.since < HOLD) return putBack();
      const scale = flow.getZoom() * PX;
      const { x, y } = carried;
      useDrag.setState({ dx: (event.clientX - x) / scale, dy: (event.clientY - y) / scale });
    };
    const up = (event: PointerEvent) => {
      fingers.delete(event.pointerId);
      forget();
      if (carried?.pointer !== event.pointerId) return;
      const { ids } = carried;
      const { dx, dy } = useDrag.getState();
      carried = null;
      const meant = event.type === 'pointerup' && Math.hypot(dx, dy) * flow.getZoom() * PX > STILL;
      dropDrag(meant && hands.moveBy(ids, dx, dy));
    };
    const keep = (event: TouchEvent) => {
      if (!carried) return;
      event.stopPropagation();
      event.preventDefault();
    };
    /** A long touch opens no menu over what it takes up. */
    const noMenu = (event: Event) => {
      if (fingers.size > 0) event.preventDefault();
    };

    element.addEventListener('pointerdown', down, true);
    window.addEventListener('pointermove', move, true);
    window.addEventListener('pointerup', up, true);
    window.addEventListener('pointercancel', up, true);
    element.addEventListener('touchmove', keep, { capture: true, passive: false });
    element.addEventListener('contextmenu', noMenu, true);
    return () => {
      forget();
      element.removeEventListener('pointerdown', down, true);
      window.removeEventListener('pointermove', move, true);
      window.removeEventListener('pointerup', up, true);
      window.removeEventListener('pointercancel', up, true);
      element.removeEventListener('touchmove', keep, true);
      element.removeEventListener('contextmenu', noMenu, true);
    };
  }, [box, flow, hands]);
}
