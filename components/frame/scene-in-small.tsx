import type { Scene, ScenePart, SceneRun } from '@/diagram/layout/scene';
import { symbolById } from '@/diagram/symbols';
import { SymbolGlyph } from './symbol-glyph';

const turns = [0, 90, 180, 270] as const;

function Part({ part }: { part: ScenePart }) {
  const turned = part.turn % 2 === 1;
  const symbol = symbolById(part.symbol, turned ? part.height : part.width);
  // A turned symbol keeps its middle: the corner it is drawn from is that of the upright one.
  const x = part.x + (part.width - symbol.width) / 2;
  const y = part.y + (part.height - symbol.height) / 2;
  return <SymbolGlyph symbol={{ ...symbol, texts: undefined }} x={x} y={y} turn={turns[part.turn]} />;
}

function Run({ run }: { run: SceneRun }) {
  const d = `M${run.points.map((point) => `${point.x} ${point.y}`).join('L')}`;
  const line = { d, fill: 'none', vectorEffect: 'non-scaling-stroke' } as const;
  if (run.feed !== 'backup') return <path {...line} className="stroke-ink" strokeWidth={1} />;
  return (
    <>
      <path {...line} className="stroke-ink" strokeWidth={3.4} />
      <path {...line} className="stroke-paper" strokeWidth={1.6} />
    </>
  );
}

/** px that it has on the page, about */
const WIDE = 560;
const HIGH = 300;
/** 1/100 mm left free round the drawing, so that no stroke is cut */
const EDGE = 150;

/** A name cut to a width in ems: the font's advance is 0.6 em, and the end of a name matters least. */
const fitted = (name: string, ems: number): string => {
  const fits = Math.max(2, Math.floor(ems / 0.6));
  return name.length <= fits ? name : `${name.slice(0, fits - 1)}.`;
};

interface SceneInSmallProps {
  scene: Scene;
  /** id of the place in hand: its room is thickened */
  inHand?: string | null;
  /** ids of places with something to put right */
  wrong?: ReadonlySet<string>;
  onPlace?(place: string): void;
  /** name of the band it begins with */
  from?: string;
  className?: string;
}

/** A face of the drawing from afar: no lettering but the rooms' names. */
export function SceneInSmall({ scene, inHand, wrong, onPlace, from, className = '' }: SceneInSmallProps) {
  const rooms = scene.frames.filter((frame) => frame.kind === 'room');
  const top = Math.min(scene.bands.find((band) => band.name === from)?.y ?? 0, ...rooms.map((frame) => frame.y));
  const height = scene.height - top;
  // Lettering keeps about its 11 px, whatever the size of the home.
  const size = 11.5 / Math.min(WIDE / scene.width, HIGH / height);
  return (
    <svg viewBox={`${-EDGE} ${top - EDGE} ${scene.width + 2 * EDGE} ${height + 2 * EDGE}`} className={className} aria-hidden="true">
      {scene.frames
        .filter((frame) => frame.kind === 'switchboard')
        .map((frame) => (
          <rect
            key={frame.id}
            x={frame.x}
            y={frame.y}
            width={frame.width}
            height={frame.height}
            className="fill-paper stroke-ink"
            strokeWidth={1}
            vectorEffect="non-scaling-stroke"
          />
        ))}
      {scene.runs.map((run) => (
        <Run key={run.id} run={run} />
      ))}
      {scene.parts.map((part) => (
        <Part key={part.id} part={part} />
      ))}
      {rooms.map((frame) => {
        const strong = frame.place !== undefined && frame.place === inHand;
        const bad = frame.place !== undefined && wrong?.has(frame.place);
        return (
          <g key={frame.id} className={onPlace ? 'cursor-pointer' : ''} onClick={() => frame.place && onPlace?.(frame.place)}>
            <rect
              x={frame.x}
              y={frame.y}
              width={frame.width}
              height={frame.height}
              fill="transparent"
              className={bad ? 'stroke-red' : strong ? 'stroke-ink' : 'stroke-rule'}
              strokeWidth={strong ? 2.6 : bad ? 2 : 1}
              strokeDasharray={strong || bad ? undefined : '5 4'}
              vectorEffect="non-scaling-stroke"
            />
            <text
              x={frame.x + size / 4}
              y={frame.y + frame.height + size * 1.1}
              fontSize={size}
              className={`${bad ? 'fill-red' : 'fill-ink'} ${strong ? 'font-bold' : ''}`}
            >
              {fitted(frame.texts[0]?.text ?? '', frame.width / size)}
            </text>
          </g>
        );
      })}
    </svg>
  );
}
