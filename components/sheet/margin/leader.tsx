'use client';

import { useEffect, useMemo, useState, type RefObject } from 'react';
import { useStore } from 'reactflow';
import { textWidth } from '@/diagram/layout/lettering';
import type { Scene, ScenePart } from '@/diagram/layout/scene';
import { px } from '../canvas/units';
import { useView } from '../view';
import { leaderPath, type Rect } from './leader-path';
import type { MarkedNote } from './notes';

/** The pencil circle about a part, 1/100 mm. */
const circleOf = (part: ScenePart): Rect => ({
  x: part.x - 330,
  y: part.y - 280,
  width: part.width + 660,
  height: part.height + 560,
});

/** Parts and lettering that a leader should not run through; not the part it leads to. */
function takenBy(scene: Scene, own: ScenePart | undefined): Rect[] {
  const parts = scene.parts.filter((part) => part !== own);
  const texts = [...parts.flatMap((part) => part.texts), ...scene.runs.flatMap((run) => run.texts)];
  return [
    ...parts,
    ...texts.map(({ x, y, text, size, bold, anchor }) => {
      const width = textWidth(text, size, bold);
      const left = anchor === 'end' ? x - width : anchor === 'middle' ? x - width / 2 : x;
      return { x: left, y: y - size, width, height: size };
    }),
  ];
}

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
  const taken = useMemo(() => takenBy(scene, part), [scene, part]);
  if (!from || !part) return null;
  const [x = 0, y = 0, zoom = 1] = view.split(' ').map(Number);
  const onScreen = (rect: Rect): Rect => ({
    x: px(rect.x) * zoom + x,
    y: px(rect.y) * zoom + y,
    width: px(rect.width) * zoom,
    height: px(rect.height) * zoom,
  });
  const circle = onScreen(circleOf(part));
  if (circle.x + circle.width > from.x || circle.x < 0 || circle.y < 0 || circle.y > (box.current?.clientHeight ?? 0)) return null;
  const points = leaderPath(from, circle, taken.map(onScreen));
  return (
    <svg className="pointer-events-none absolute inset-0 h-full w-full" aria-hidden="true" style={{ zIndex: 5 }}>
      <path
        d={`M${points.map((point) => `${point.x} ${point.y}`).join('L')}`}
        fill="none"
        stroke="var(--red)"
        strokeWidth={1.2}
      />
    </svg>
  );
}
