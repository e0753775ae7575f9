import { memo } from 'react';
import type { Scene } from '@/diagram/layout/scene';
import { useSheet, type OpenDrawing } from '../use-drawing';
import { Layer } from './layer';

/** A padlock of 2 mm, its shackle shut. */
const BODY = 'M-90 -10H90V130H-90Z';
const SHACKLE = 'M-55 -10V-65A55 55 0 0 1 55 -65V-10';

/** A small padlock at each part that is held where it stands. On the screen only: paper is not moved by hand. */
export const LocksLayer = memo(function LocksLayer({ scene, drawing }: { scene: Scene; drawing: OpenDrawing }) {
  const positions = useSheet(drawing.store, (state) => state.document.sheet?.[scene.face]);
  const locked = scene.parts.filter(({ id }) => positions?.[id]?.locked);
  if (locked.length === 0) return null;
  return (
    <Layer scene={scene} level={3} name="locks">
      {locked.map((part) => (
        <g key={part.id} data-lock={part.id} transform={`translate(${part.x - 130} ${part.y - 30})`}>
          <path d={SHACKLE} fill="none" stroke="var(--paper)" strokeWidth={110} />
          <path d={BODY} fill="var(--grey)" stroke="var(--paper)" strokeWidth={40} />
          <path d={SHACKLE} fill="none" stroke="var(--grey)" strokeWidth={36} />
        </g>
      ))}
    </Layer>
  );
});
