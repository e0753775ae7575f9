import { memo } from 'react';
import type { Scene, SceneRing, SceneRun } from '@/diagram/layout/scene';
import { symbolById } from '@/diagram/symbols';
import { turnedPoint } from '@/diagram/symbols/turn';
import { STROKE } from '@/diagram/symbols/types';
import { Layer } from './layer';
import { Lettering, Letterings } from './lettering';
import { INK } from './units';

const ink = { stroke: 'var(--ink)', strokeWidth: STROKE.normal * INK, strokeLinecap: 'round' } as const;

/** Tick marks across a run, one a core: plain L, dotted N, barred PE. */
const Ticks = memo(function Ticks({ run }: { run: SceneRun }) {
  if (!run.ticks) return null;
  const { at, vertical, cores } = run.ticks;
  const half = run.feed === 'backup' ? 220 : 180;
  return (
    <g transform={`translate(${at.x} ${at.y}) rotate(${vertical ? 0 : 90})`}>
      {cores.map((core, i) => (
        <g key={core} transform={`translate(0 ${200 * i})`}>
          <path d={`M${-half} 120L${half} -120`} {...ink} />
          {core === 'N' && <circle cx={half} cy={-120} r={62} fill="var(--ink)" />}
          {core === 'E' && <path d={`M${half - 65} -205L${half + 65} -35`} {...ink} />}
        </g>
      ))}
    </g>
  );
});

const Ring = memo(function Ring({ ring }: { ring: SceneRing }) {
  return (
    <g>
      <circle cx={ring.x} cy={ring.y} r={ring.radius} fill="var(--paper)" {...ink} />
      <Lettering text={{ x: ring.x, y: ring.y + 125, text: ring.text, size: 250, bold: true, anchor: 'middle' }} />
    </g>
  );
});

/** Ticks, joints, way numbers, terminals of the connections face, and all lettering. */
export const MarksLayer = memo(function MarksLayer({ scene, letters }: { scene: Scene; letters: boolean }) {
  return (
    <Layer scene={scene} level={2} name="marks">
      {scene.runs.map((run) => (
        <Ticks key={run.id} run={run} />
      ))}
      {scene.dots.map((dot) => (
        <circle key={`${dot.x} ${dot.y}`} cx={dot.x} cy={dot.y} r={100} fill="var(--ink)" />
      ))}
      {scene.face === 'connections' &&
        scene.parts.map((part) => (
          <g key={part.id}>
            {part.terminals.map((terminal) => (
              <circle key={terminal.mark} cx={terminal.x} cy={terminal.y} r={150} fill="var(--paper)" {...ink} />
            ))}
          </g>
        ))}
      {scene.rings.map((ring) => (
        <Ring key={ring.part} ring={ring} />
      ))}
      {letters && (
        <>
          {scene.parts.map((part) => {
            const symbol = symbolById(part.symbol, part.width);
            return (symbol.texts ?? []).map((text) => {
              const at = turnedPoint(text.x, text.y, symbol, part.turn);
              return (
                <Lettering key={`${part.id} ${text.text}`} text={{ ...text, x: part.x + at.x, y: part.y + at.y }} />
              );
            });
          })}
          {scene.parts.map((part) => (
            <Letterings key={part.id} texts={part.texts} />
          ))}
          {scene.runs.map((run) => (
            <Letterings key={run.id} texts={run.texts} />
          ))}
          <Letterings texts={scene.texts} />
        </>
      )}
    </Layer>
  );
});
