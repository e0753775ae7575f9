import { memo } from 'react';
import { CASED } from '@/diagram/paper/draw-scene';
import type { Scene, SceneRun } from '@/diagram/layout/scene';
import { useDrag } from './drag';
import { Layer } from './layer';
import { CASED_CORE, coreInk, elbow, hopPath, isCased, pathOf, runStroke } from './run-shape';
import { INK } from './units';

type Pass = 'plain' | 'outline' | 'inside' | 'core';

/** Path of a run now: its route, or an elbow while one of its ends is dragged. One subscription a run. */
function usePath(run: SceneRun): string {
  const shift = useDrag((drag) => {
    const from = run.cut !== 'from' && drag.ids.has(run.from[0]);
    const to = run.cut !== 'to' && drag.ids.has(run.to[0]);
    return from || to ? `${from ? 1 : 0} ${to ? 1 : 0} ${drag.dx} ${drag.dy}` : '';
  });
  if (shift === '') return pathOf(run);
  const [from = 0, to = 0, dx = 0, dy = 0] = shift.split(' ').map(Number);
  const first = run.points[0]!;
  const last = run.points.at(-1)!;
  return elbow(run, { x: first.x + from * dx, y: first.y + from * dy }, { x: last.x + to * dx, y: last.y + to * dy });
}

interface RunProps {
  run: SceneRun;
  pass: Pass;
  cores: boolean;
}

const RunLine = memo(function RunLine({ run, pass, cores }: RunProps) {
  const d = usePath(run);
  const widths = cores ? CASED_CORE : CASED;
  if (pass === 'outline') return <path d={d} fill="none" stroke="var(--ink)" strokeWidth={widths.outer * 1.1} />;
  if (pass === 'inside') return <path d={d} fill="none" stroke="var(--paper)" strokeWidth={widths.inner} />;
  return <path d={d} {...runStroke(run, cores)} />;
});

/** A cased run that hops is drawn over what it crosses. */
const CasedHops = memo(function CasedHops({ run, cores }: { run: SceneRun; cores: boolean }) {
  const widths = cores ? CASED_CORE : CASED;
  return run.hops.map((hop) => {
    const arc = hopPath(hop);
    return (
      <g key={`${hop.x} ${hop.y}`} fill="none">
        <path d={arc} stroke="var(--paper)" strokeWidth={widths.outer + 80} />
        <path d={arc} stroke="var(--ink)" strokeWidth={widths.outer * 1.1} />
        <path d={arc} stroke="var(--paper)" strokeWidth={widths.inner} />
        {cores && <path d={arc} stroke={coreInk(run)} strokeWidth={50 * INK} />}
      </g>
    );
  });
});

/** All conductors: outlines of cased runs first, then their light cores, so that branches run into each other. */
export const RunsLayer = memo(function RunsLayer({ scene, hand }: { scene: Scene; hand: ReadonlySet<string> }) {
  const cores = scene.face === 'connections';
  const cased = scene.runs.filter(isCased);
  const plain = scene.runs.filter((run) => !isCased(run));
  const held = scene.runs.filter((run) => run.wires.some((wire) => hand.has(wire)));
  const line = (run: SceneRun, pass: Pass) => <RunLine key={run.id} run={run} pass={pass} cores={cores} />;
  return (
    <Layer scene={scene} level={-1} name="runs">
      {held.map((run) => (
        <path
          key={run.id}
          d={pathOf(run)}
          fill="none"
          stroke="var(--marker)"
          strokeWidth={340}
          strokeLinejoin="round"
          strokeLinecap="round"
        />
      ))}
      {plain.map((run) => line(run, 'plain'))}
      {cased.map((run) => line(run, 'outline'))}
      {cased.map((run) => line(run, 'inside'))}
      {cores && cased.map((run) => line(run, 'core'))}
      {cased.map((run) => (run.hops.length > 0 ? <CasedHops key={run.id} run={run} cores={cores} /> : null))}
    </Layer>
  );
});
