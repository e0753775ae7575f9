'use client';

import { memo, useEffect, useMemo, useRef } from 'react';
import { useReactFlow, useStore as useFlowStore } from 'reactflow';
import { Layer } from '@/components/sheet/canvas/layer';
import { middle } from '@/components/sheet/canvas/pick';
import { px } from '@/components/sheet/canvas/units';
import { useLetters } from '@/components/sheet/canvas/use-letters';
import type { Camera } from '@/components/sheet/view';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { partName } from '@/diagram/rehearsal/words';
import { ConductorsLayer } from '../canvas/conductors-layer';
import { RehearsalMarks } from '../canvas/marks';
import { LookPicture } from '../canvas/part-view';
import { PencilLayer } from '../canvas/pencil-layer';
import { useLooks } from '../canvas/use-looks';
import type { PartLook } from '../looks';
import { browserRehearser } from '../rehearser';
import { RehearsalProvider, stationIn, useRehearsal, walkIn } from '../state';
import { useAnswers } from '../use-answers';
import type { ShownWalk } from './shown-walk';

/** below it the volts and amperes beside the runs would be too small to read */
const LEAST_ZOOM = 0.8;

interface WalkLayersProps {
  walk: ShownWalk;
  document: Installation;
  scene: Scene;
  camera: Camera | null;
}

/** The parts as they stand now, in the place of the canvas' own. */
const PartsLayer = memo(function PartsLayer({ scene, looks }: { scene: Scene; looks: ReadonlyMap<string, PartLook> }) {
  return (
    <Layer scene={scene} level={1} name="walked parts">
      {scene.parts.map((part) => {
        const look = looks.get(part.id);
        return (
          look && (
            <g key={part.id} transform={`translate(${part.x} ${part.y})`} data-walked={part.id} data-state={look.state}>
              <LookPicture part={part} look={look} />
            </g>
          )
        );
      })}
    </Layer>
  );
});

function Layers({ walk, document, scene, camera }: WalkLayersProps) {
  useAnswers(walk.store, document, browserRehearser);
  const answer = useRehearsal((state) => state.answer);
  const station = useRehearsal(stationIn);
  const started = useRehearsal((state) => walkIn(state) !== null);
  const letters = useLetters();
  const parts = useMemo(() => new Map(document.parts.map((part) => [part.id, part])), [document]);
  const cableOf = useMemo(
    () => new Map(document.wires.flatMap(({ id, cable }) => (cable === undefined ? [] : [[id, cable] as const]))),
    [document],
  );
  const { figures, runLooks, partLooks } = useLooks(scene, parts, answer, station);

  const { player, store } = walk;
  useEffect(() => {
    // What was asked for by "Show me" plays as soon as it is worked out.
    if (started && store.getState().station === 0) player.toggle();
    return player.stop;
  }, [started, player, store]);

  const flow = useFlowStore((state) => state.domNode);
  const worked = answer !== null;
  useEffect(() => {
    // The canvas' own parts and runs give way to these, and still take the pointer.
    if (!worked) return;
    flow?.setAttribute('data-walked', '');
    return () => flow?.removeAttribute('data-walked');
  }, [worked, flow]);

  const fault = store.getState().faults.at(-1);
  // What happens at this station is in sight: a device far from the fault that opens, then the fault again.
  const at = station?.part ?? fault?.at;
  const begun = useRef(false);
  const canvas = useReactFlow();
  useEffect(() => {
    const happens = scene.parts.find(({ id }) => id === at);
    if (!happens || !station) return;
    // It begins in the middle, where there is room for what is called out beside it.
    const { x, y } = middle(happens);
    if (begun.current) camera?.show({ x, y });
    else void canvas.setCenter(px(x), px(y), { zoom: Math.max(canvas.getZoom(), LEAST_ZOOM) });
    begun.current = true;
  }, [camera, canvas, scene, at, station]);

  if (!answer) return null;
  const faultPart = fault && parts.get(fault.at);
  return (
    <>
      <ConductorsLayer scene={scene} looks={runLooks} />
      <PartsLayer scene={scene} looks={partLooks} />
      <RehearsalMarks
        scene={scene}
        letters={letters}
        figures={figures}
        parts={parts}
        partLooks={partLooks}
        runLooks={runLooks}
      />
      {station && fault && faultPart && (
        <PencilLayer
          scene={scene}
          station={station}
          at={fault.at}
          kind={fault.kind}
          name={partName(document, faultPart)}
          cableOf={cableOf}
        />
      )}
    </>
  );
}

/** A fault walk on the drawing itself: what is live, dark and tripped at each step, over the canvas and moving with it. */
export default function WalkLayers(props: WalkLayersProps) {
  return (
    <RehearsalProvider value={props.walk.store}>
      <Layers {...props} />
    </RehearsalProvider>
  );
}
