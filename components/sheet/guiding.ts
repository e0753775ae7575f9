'use client';

import { useEffect } from 'react';
import { create } from 'zustand';
import { guide, type Box, type Guided } from '@/diagram/layout/guides';
import type { Scene } from '@/diagram/layout/scene';

/** Guides are always on; while a key is held they draw nothing to them, and a part goes to the plain module. */
export const useSuspended = create<{ suspended: boolean }>(() => ({ suspended: false }));

/** Hears the key that suspends the guides, only while something is moved. */
export function useSuspending(moving: boolean): void {
  useEffect(() => {
    if (!moving) return;
    const hear = (event: KeyboardEvent) => {
      if (event.key !== 'Alt') return;
      event.preventDefault();
      useSuspended.setState({ suspended: event.type === 'keydown' });
    };
    window.addEventListener('keydown', hear);
    window.addEventListener('keyup', hear);
    return () => {
      window.removeEventListener('keydown', hear);
      window.removeEventListener('keyup', hear);
      useSuspended.setState({ suspended: false });
    };
  }, [moving]);
}

/** The box about several. */
export function boxAbout(boxes: readonly Box[]): Box | null {
  if (boxes.length === 0) return null;
  const x = Math.min(...boxes.map((box) => box.x));
  const y = Math.min(...boxes.map((box) => box.y));
  const width = Math.max(...boxes.map((box) => box.x + box.width)) - x;
  return { x, y, width, height: Math.max(...boxes.map((box) => box.y + box.height)) - y };
}

/** Where parts go that a hand has brought so far, and what they are then in line with; null where none is drawn here. */
export function guided(scene: Scene, ids: readonly string[], dx: number, dy: number): Guided | null {
  const moving = new Set(ids);
  const box = boxAbout(scene.parts.filter(({ id }) => moving.has(id)));
  if (!box) return null;
  const still = scene.parts.filter(({ id }) => !moving.has(id));
  return guide(still, box, dx, dy, !useSuspended.getState().suspended);
}
