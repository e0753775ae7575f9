import { memo } from 'react';
import type { End } from '@/diagram/document/schema';
import type { Point, Scene, ScenePart } from '@/diagram/layout/scene';
import { Layer } from './layer';
import { Lettering } from './lettering';
import { endPoint } from './pick';

const REACH = 200;

/** A bar is thinner than the box it stands in. */
const inset = (part: ScenePart): number => (part.kind.endsWith('-bar') ? part.height / 4 : 0);

const around = (part: ScenePart) => ({
  x: part.x - REACH,
  y: part.y + inset(part) - REACH,
  width: part.width + 2 * REACH,
  height: part.height - 2 * inset(part) + 2 * REACH,
});

/** The marker behind what is in hand. */
export const HeldLayer = memo(function HeldLayer({ scene, parts }: { scene: Scene; parts: ReadonlySet<string> }) {
  return (
    <Layer scene={scene} level={-1} name="held">
      {scene.parts
        .filter((part) => parts.has(part.id))
        .map((part) => (
          <rect
            key={part.id}
            {...around(part)}
            fill="var(--marker)"
            stroke="var(--ink)"
            strokeWidth={30}
            strokeDasharray="120 90"
          />
        ))}
    </Layer>
  );
});

interface TerminalProps {
  scene: Scene;
  end: End;
  /** what stands beside the ring: "2 in hand" */
  word?: string;
  tone?: 'ink' | 'grey';
}

function TerminalRing({ scene, end, word, tone = 'ink' }: TerminalProps) {
  const at = endPoint(scene, end);
  if (!at) return null;
  const colour = tone === 'ink' ? 'var(--ink)' : 'var(--grey)';
  return (
    <g>
      <circle cx={at.x} cy={at.y} r={430} fill="none" stroke={colour} strokeWidth={30} strokeDasharray="110 80" />
      <circle cx={at.x} cy={at.y} r={150} fill="var(--paper)" stroke={colour} strokeWidth={75} />
      {word && <Lettering text={{ x: at.x + 520, y: at.y + 110, text: word, size: 220, bold: true }} />}
    </g>
  );
}

interface HandProps {
  scene: Scene;
  terminal: End | null;
  /** the other terminals of the part in hand, and where a wire may end */
  candidates: readonly End[];
  /** where the wire in hand would end now */
  target: End | null;
}

/** The terminal in hand with its ring, a wire that hangs from it, and where that wire may end. */
export const HandLayer = memo(function HandLayer({ scene, terminal, candidates, target }: HandProps) {
  const from = terminal && endPoint(scene, terminal);
  const to = target && endPoint(scene, target);
  return (
    <Layer scene={scene} level={4} name="hand">
      {candidates.map((end) => {
        const at = endPoint(scene, end);
        return (
          at && (
            <circle
              key={end.join(' ')}
              cx={at.x}
              cy={at.y}
              r={130}
              fill="var(--paper)"
              stroke="var(--grey)"
              strokeWidth={45}
            />
          )
        );
      })}
      {from && to && (
        <path d={bend(from, to)} fill="none" stroke="var(--ghost)" strokeWidth={60} strokeDasharray="220 130" />
      )}
      {target && <TerminalRing scene={scene} end={target} tone="grey" word={target[1]} />}
      {terminal && <TerminalRing scene={scene} end={terminal} word={terminal[1]} />}
    </Layer>
  );
});

const bend = (a: Point, b: Point): string => `M${a.x} ${a.y}V${(a.y + b.y) / 2}H${b.x}V${b.y}`;
