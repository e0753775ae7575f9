import { memo } from 'react';
import { Padlock } from '@/components/frame/padlock';
import type { Scene } from '@/diagram/layout/scene';
import { useSheet, type OpenDrawing } from '../use-drawing';
import { Layer } from './layer';

/** A small padlock at each part that is held where it stands. On the screen only: paper is not moved by hand. */
export const LocksLayer = memo(function LocksLayer({ scene, drawing }: { scene: Scene; drawing: OpenDrawing }) {
  const positions = useSheet(drawing.store, (state) => state.document.sheet?.[scene.face]);
  const locked = scene.parts.filter(({ id }) => positions?.[id]?.locked);
  if (locked.length === 0) return null;
  return (
    <Layer scene={scene} level={3} name="locks">
      {locked.map((part) => (
        <Padlock key={part.id} part={part.id} x={part.x - 420} y={part.y} />
      ))}
    </Layer>
  );
});
