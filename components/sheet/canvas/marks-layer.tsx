import { memo } from 'react';
import type { Scene, ScenePart, SceneRing, SceneRun } from '@/diagram/layout/scene';
import { symbolById } from '@/diagram/symbols';
import { turnedPoint } from '@/diagram/symbols/turn';
import { STROKE } from '@/diagram/symbols/types';
import { useShift } from './drag';
import { Layer } from './layer';
import { Lettering, Letterings } from './lettering';
import { INK } from './units';
import { inSight, type Sight } from './use-sight';

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

const Ring = memo(function Ring({ ring, letters }: { ring: SceneRing; letters: boolean }) {
  return (
    <g>
      <circle cx={ring.x} cy={ring.y} r={ring.radius} fill="var(--paper)" {...ink} />
      {letters && (
        <Lettering text={{ x: ring.x, y: ring.y + 125, text: ring.text, size: 250, bold: true, anchor: 'middle' }} />
      )}
    </g>
  );
});

/** Lettering and terminals of one part; they go along while it is dragged. */
const PartMarks = memo(function PartMarks({ part, terminals, letters }: { part: ScenePart; terminals: boolean; letters: boolean }) {
  const shift = useShift(part.id);
  const symbol = symbolById(part.symbol, part.width);
  return (
    <g transform={shift}>
      {terminals &&
        part.terminals.map(({ mark, x, y }) => (
          <circle key={mark} data-end={`${part.id} ${mark}`} cx={x} cy={y} r={150} fill="var(--paper)" {...ink} />
        ))}
      {letters &&
        symbol.texts?.map((text) => {
          const at = turnedPoint(text.x, text.y, symbol, part.turn);
          return <Lettering key={text.text} text={{ ...text, x: part.x + at.x, y: part.y + at.y }} />;
        })}
      {letters && <Letterings texts={part.texts} />}
    </g>
  );
});

interface MarksProps {
  scene: Scene;
  /** lettering is large enough to be read */
  letters: boolean;
  sight: Sight;
}

/** Ticks, joints, way numbers, terminals of the connections face, and all lettering that can be read. */
export const MarksLayer = memo(function MarksLayer({ scene, letters, sight }: MarksProps) {
  const terminals = scene.face === 'connections';
  return (
    <Layer scene={scene} level={2} name="marks">
      {scene.dots.map((dot) => (
        <circle key={`${dot.x} ${dot.y}`} cx={dot.x} cy={dot.y} r={100} fill="var(--ink)" />
      ))}
      {(terminals || letters) &&
        scene.parts
          .filter((part) => inSight(sight, part.x, part.width))
          .map((part) => <PartMarks key={part.id} part={part} terminals={terminals} letters={letters} />)}
      {scene.rings.map((ring) => (
        <Ring key={ring.part} ring={ring} letters={letters} />
      ))}
      {letters && (
        <>
          {scene.runs.map(
            (run) => run.ticks && inSight(sight, run.ticks.at.x) && <Ticks key={run.id} run={run} />,
          )}
          {scene.runs.map(
            (run) => run.texts[0] && inSight(sight, run.texts[0].x) && <Letterings key={run.id} texts={run.texts} />,
          )}
          <Letterings texts={scene.texts} />
        </>
      )}
    </Layer>
  );
});
