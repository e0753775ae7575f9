import { memo } from 'react';
import { BODY, textWidth } from '@/diagram/layout/lettering';
import type { Scene, SceneFrame } from '@/diagram/layout/scene';
import { STROKE } from '@/diagram/symbols/types';
import { Layer } from './layer';
import { Letterings, Lettering } from './lettering';
import { INK } from './units';

const box = ({ x, y, width, height }: SceneFrame) => ({ x, y, width, height });

const Frame = memo(function Frame({ frame }: { frame: SceneFrame }) {
  switch (frame.kind) {
    case 'lane':
      return <rect {...box(frame)} fill="var(--lane)" />;
    case 'room':
      return (
        <rect
          {...box(frame)}
          fill="none"
          stroke="var(--rule)"
          strokeWidth={STROKE.normal * INK}
          strokeDasharray="190 125"
        />
      );
    case 'switchboard':
      return <rect {...box(frame)} fill="none" stroke="var(--ink)" strokeWidth={STROKE.normal * INK} />;
    case 'brace':
      return (
        <path
          d={`M${frame.x} ${frame.y + frame.height}V${frame.y}H${frame.x + frame.width}V${frame.y + frame.height}`}
          fill="none"
          stroke="var(--ink)"
          strokeWidth={STROKE.normal * INK}
        />
      );
  }
});

function BandName({ name, y, height }: { name: string; y: number; height: number }) {
  const spaced = textWidth(name, BODY, true) + 300 <= height;
  const size = spaced || textWidth(name, BODY) + 200 <= height ? BODY : 200;
  if (textWidth(name, size, spaced) > height) return null;
  return (
    <Lettering
      text={{ x: 900, y: y + height / 2, text: name, size, tone: 'grey', anchor: 'middle', turn: 3, spaced }}
    />
  );
}

/** Bands, lanes, rooms and switchboards: the ground on which the drawing stands. */
export const GroundLayer = memo(function GroundLayer({ scene, names }: { scene: Scene; names: boolean }) {
  const lanes = scene.frames.filter((frame) => frame.kind === 'lane');
  return (
    <Layer scene={scene} level={-2} name="ground">
      {lanes.map((frame) => (
        <Frame key={frame.id} frame={frame} />
      ))}
      {scene.bands.map((band, i) => (
        <g key={band.name}>
          {i > 0 && (
            <path d={`M250 ${band.y}H${scene.width - 250}`} stroke="var(--hair)" strokeWidth={STROKE.thin * INK} />
          )}
          {names && <BandName {...band} />}
        </g>
      ))}
      {scene.frames.map((frame) => (
        <g key={frame.id}>
          {frame.kind !== 'lane' && <Frame frame={frame} />}
          {names && <Letterings texts={frame.texts} />}
        </g>
      ))}
    </Layer>
  );
});
