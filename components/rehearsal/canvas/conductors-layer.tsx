import { memo } from 'react';
import { Layer } from '@/components/sheet/canvas/layer';
import { CASED_CORE, coreInk, hopPath, pathOf, runStroke } from '@/components/sheet/canvas/run-shape';
import { INK } from '@/components/sheet/canvas/units';
import type { Scene, SceneRun } from '@/diagram/layout/scene';
import { CASED } from '@/diagram/paper/draw-scene';
import { STROKE } from '@/diagram/symbols/types';
import type { RunLook } from '../looks';
import { DOTTED } from './part-view';

interface ConductorsProps {
  scene: Scene;
  looks: ReadonlyMap<string, RunLook>;
}

/** What is fed from the mains in one stroke, from a battery cased, what is dead dotted: the same on both faces. */
export const ConductorsLayer = memo(function ConductorsLayer({ scene, looks }: ConductorsProps) {
  const cores = scene.face === 'connections';
  const widths = cores ? CASED_CORE : CASED;
  const live = scene.runs.filter((run) => looks.get(run.id)?.state !== 'dead');
  const cased = live.filter((run) => looks.get(run.id)?.cased && run.role !== 'earth');
  const isCased = new Set(cased);
  const plain = live.filter((run) => !isCased.has(run));
  const stroke = (run: SceneRun) => <path key={run.id} d={pathOf(run)} {...runStroke(run, cores)} />;
  const casing = (run: SceneRun, inside: boolean, d = pathOf(run)) => (
    <path
      key={`${run.id} ${inside}`}
      d={d}
      fill="none"
      stroke={inside ? 'var(--paper)' : 'var(--ink)'}
      strokeWidth={inside ? widths.inner : widths.outer * 1.1}
    />
  );
  return (
    <Layer scene={scene} level={-1} name="conductors">
      {scene.runs
        .filter((run) => looks.get(run.id)?.state === 'dead')
        .map((run) => (
          <path
            key={run.id}
            d={pathOf(run)}
            fill="none"
            stroke="var(--grey)"
            strokeWidth={STROKE.normal * INK * 1.3}
            strokeDasharray={DOTTED}
            strokeLinecap="round"
          />
        ))}
      {plain.map(stroke)}
      {cased.map((run) => casing(run, false))}
      {cased.map((run) => casing(run, true))}
      {cores && cased.map(stroke)}
      {cased.flatMap((run) =>
        run.hops.map((hop) => {
          const d = hopPath(hop);
          return (
            <g key={`${run.id} ${hop.x} ${hop.y}`} fill="none">
              <path d={d} stroke="var(--paper)" strokeWidth={widths.outer + 80} />
              {casing(run, false, d)}
              {casing(run, true, d)}
              {cores && <path d={d} stroke={coreInk(run)} strokeWidth={50 * INK} />}
            </g>
          );
        }),
      )}
    </Layer>
  );
});
