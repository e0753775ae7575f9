'use client';

import { useEffect, useState, type RefObject } from 'react';
import { useStore } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import { middle } from '../canvas/pick';
import { px } from '../canvas/units';
import { useView } from '../view';
import type { MarkedNote } from './notes';

interface LeaderProps {
  box: RefObject<HTMLDivElement | null>;
  scene: Scene;
  notes: readonly MarkedNote[];
}

/** The one leader: from the note in hand to its pencil circle. It lies over the sheet and stops at its edge. */
export function Leader({ box, scene, notes }: LeaderProps) {
  const inHand = useView((state) => state.finding);
  const view = useStore((state) => state.transform.join(' '));
  const [from, setFrom] = useState<{ x: number; y: number } | null>(null);
  const note = notes.find((candidate) => candidate.key === inHand);
  const part = scene.parts.find((candidate) => candidate.id === note?.parts[0]);
  useEffect(() => {
    const look = () => {
      const line = document.querySelector('[data-note][data-in-hand]')?.getBoundingClientRect();
      const sheet = box.current?.getBoundingClientRect();
      const beside = line && sheet && line.width > 0 && line.left >= sheet.right - 1;
      setFrom(beside ? { x: sheet.width, y: Math.max(4, Math.min(sheet.height - 4, line.top - sheet.top + 8)) } : null);
    };
    look();
    const margin = document.querySelector('[data-note][data-in-hand]')?.closest('aside');
    margin?.addEventListener('scroll', look);
    window.addEventListener('resize', look);
    return () => {
      margin?.removeEventListener('scroll', look);
      window.removeEventListener('resize', look);
    };
  }, [box, inHand, notes]);
  if (!from || !part) return null;
  const [x = 0, y = 0, zoom = 1] = view.split(' ').map(Number);
  const at = middle(part);
  const end = { x: px(at.x + part.width / 2 + 330) * zoom + x, y: px(at.y) * zoom + y };
  if (end.x > from.x || end.x < 0 || end.y < 0 || end.y > (box.current?.clientHeight ?? 0)) return null;
  return (
    <svg className="pointer-events-none absolute inset-0 h-full w-full" aria-hidden="true" style={{ zIndex: 5 }}>
      <path
        d={`M${from.x} ${from.y}L${from.x - 18} ${from.y}L${Math.max(end.x + 12, from.x - 40)} ${end.y}L${end.x} ${end.y}`}
        fill="none"
        stroke="var(--red)"
        strokeWidth={1.2}
      />
    </svg>
  );
}
