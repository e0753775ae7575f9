import type { ReactNode } from 'react';
import { ViewportPortal } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import { px } from './units';

interface LayerProps {
  scene: Pick<Scene, 'width' | 'height'>;
  /** below the parts: negative; above them: positive */
  level: number;
  name: string;
  children: ReactNode;
}

/** A sheet of tracing paper over or under the parts, in 1/100 mm; it moves with the drawing and takes no pointer. */
export function Layer({ scene, level, name, children }: LayerProps) {
  return (
    <ViewportPortal>
      <svg
        data-layer={name}
        width={px(scene.width)}
        height={px(scene.height)}
        viewBox={`0 0 ${scene.width} ${scene.height}`}
        className="pointer-events-none absolute top-0 left-0 overflow-visible"
        style={{ zIndex: level }}
        aria-hidden="true"
      >
        {children}
      </svg>
    </ViewportPortal>
  );
}
