import { memo, useState, type PointerEvent } from 'react';
import { useReactFlow } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import { MODULE } from '@/diagram/symbols/types';
import type { Hands } from '../hands';
import { ledSoFar, leadTo, pathLed, runInHand } from '../leading';
import { useSheet } from '../use-drawing';
import { useView } from '../view';
import { Layer } from './layer';
import { PX } from './units';

/** 1/100 mm across which a pointer takes a stretch of the run in hand */
const GRIP = 700;
const snap = (value: number): number => Math.round(value / MODULE) * MODULE;

interface Led {
  stretch: number;
  to: number;
}

/** Grips on the stretches of the run in hand: dragged at right angles, a stretch stays where it is let go. */
export const RunGrips = memo(function RunGrips({ scene, hands }: { scene: Scene; hands: Hands }) {
  const selection = useSheet(hands.store, (state) => state.selection);
  const mode = useView((state) => state.mode);
  const flow = useReactFlow();
  const [led, setLed] = useState<Led | null>(null);
  const run = runInHand(scene, selection);
  if (!run) return null;

  const stretches = run.points.slice(1).map((b, i) => ({ a: run.points[i]!, b, upright: run.points[i]!.x === b.x }));
  const ledBy = (event: PointerEvent, stretch: number): Led => {
    const at = flow.screenToFlowPosition({ x: event.clientX, y: event.clientY });
    return { stretch, to: snap((stretches[stretch]!.upright ? at.x : at.y) / PX) };
  };
  const drop = (now: Led) => {
    const { a, upright } = stretches[now.stretch]!;
    setLed(null);
    if (now.to !== (upright ? a.x : a.y)) leadTo(hands, run, now.stretch, now.to);
  };
  const ghosts = led ? [pathLed(run, led.stretch, led.to)] : mode.kind === 'move' ? ledSoFar(run, mode.dx, mode.dy) : [];
  return (
    <Layer scene={scene} level={3} name="grips">
      {stretches.map(({ a, b, upright }, i) => (
        <path
          key={i}
          d={`M${a.x} ${a.y}L${b.x} ${b.y}`}
          data-stretch={i}
          className={`nopan nodrag pointer-events-auto touch-none ${upright ? 'cursor-ew-resize' : 'cursor-ns-resize'}`}
          stroke="transparent"
          strokeWidth={GRIP}
          onPointerDown={(event) => {
            event.stopPropagation();
            event.currentTarget.setPointerCapture(event.pointerId);
            setLed({ stretch: i, to: upright ? a.x : a.y });
          }}
          onPointerMove={(event) => led && setLed(ledBy(event, led.stretch))}
          onPointerUp={(event) => led && drop(ledBy(event, led.stretch))}
          onPointerCancel={() => setLed(null)}
          onDoubleClick={() => hands.editRun(run)}
        />
      ))}
      {ghosts.map((d) => (
        <path key={d} d={d} fill="none" stroke="var(--ghost)" strokeWidth={60} strokeDasharray="220 130" />
      ))}
    </Layer>
  );
});
