import { memo, useMemo } from 'react';
import type { Scene } from '@/diagram/layout/scene';
import { Layer } from './layer';
import { Letterings } from './lettering';
import { PartPicture } from './part-node';
import { pathOf } from './run-shape';

/** What a command would draw, dashed and grey, at the very place: all that is not on the sheet yet or stands elsewhere. */
export const GhostLayer = memo(function GhostLayer({ scene, ghost }: { scene: Scene; ghost: Scene }) {
  const { parts, runs } = useMemo(() => {
    const seen = new Map(scene.parts.map((part) => [part.id, `${part.x} ${part.y} ${part.width}`]));
    const drawn = new Set(scene.runs.map((run) => run.id));
    return {
      parts: ghost.parts.filter((part) => seen.get(part.id) !== `${part.x} ${part.y} ${part.width}`),
      runs: ghost.runs.filter((run) => !drawn.has(run.id)),
    };
  }, [scene, ghost]);
  return (
    <Layer scene={ghost} level={3} name="ghost">
      <g>
        {runs.map((run) => (
          <path
            key={run.id}
            d={pathOf(run)}
            fill="none"
            stroke="var(--ghost)"
            strokeWidth={55}
            strokeDasharray="180 120"
          />
        ))}
        {parts.map((part) => (
          <g key={part.id} transform={`translate(${part.x} ${part.y})`}>
            <PartPicture part={part} ink="var(--ghost)" />
          </g>
        ))}
        {parts.map((part) => (
          <Letterings key={part.id} texts={part.texts.map((text) => ({ ...text, tone: 'grey' as const }))} />
        ))}
      </g>
    </Layer>
  );
});
