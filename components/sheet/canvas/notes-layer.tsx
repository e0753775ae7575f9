import { memo } from 'react';
import type { Scene, ScenePart } from '@/diagram/layout/scene';
import type { MarkedNote } from '../margin/notes';
import { Layer } from './layer';
import { middle } from './pick';

const SIDE = 420;

/** Letters of the findings in red squares at their parts; the note in hand has a pencil circle as well. */
export const NotesLayer = memo(function NotesLayer({
  scene,
  notes,
  inHand,
}: {
  scene: Scene;
  notes: readonly MarkedNote[];
  inHand: string | null;
}) {
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  const perPart = new Map<string, number>();
  return (
    <Layer scene={scene} level={3} name="notes">
      {notes.map((note) => {
        const part = note.parts.map((id) => parts.get(id)).find((found): found is ScenePart => found !== undefined);
        if (!part) return null;
        const nth = perPart.get(part.id) ?? 0;
        perPart.set(part.id, nth + 1);
        const x = part.x - SIDE - 120 + nth * (SIDE + 60);
        // At the upper edge of the sheet the letter stands beside its part, not above it.
        const y = Math.max(60, part.y - SIDE - 60);
        return (
          <g key={note.key}>
            <rect x={x} y={y} width={SIDE} height={SIDE} fill="var(--red)" />
            <text
              x={x + SIDE / 2}
              y={y + SIDE - 120}
              fontSize={330}
              fontWeight={700}
              textAnchor="middle"
              fill="var(--paper)"
            >
              {note.letter}
            </text>
          </g>
        );
      })}
      {notes
        .filter((note) => note.key === inHand)
        .flatMap((note) =>
          note.parts.map((id) => parts.get(id)).filter((part): part is ScenePart => part !== undefined),
        )
        .map((part) => {
          const at = middle(part);
          return (
            <ellipse
              key={part.id}
              cx={at.x}
              cy={at.y}
              rx={part.width / 2 + 330}
              ry={part.height / 2 + 280}
              fill="none"
              stroke="var(--red)"
              strokeWidth={50}
              transform={`rotate(-3 ${at.x} ${at.y})`}
            />
          );
        })}
    </Layer>
  );
});
