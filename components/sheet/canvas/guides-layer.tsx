'use client';

import { useMemo } from 'react';
import { useReactFlow } from 'reactflow';
import type { Guide } from '@/diagram/layout/guides';
import type { Scene } from '@/diagram/layout/scene';
import { MODULE } from '@/diagram/symbols/types';
import { guided, useSuspended, useSuspending } from '../guiding';
import { useSheet, type OpenDrawing } from '../use-drawing';
import { useView } from '../view';
import { useDrag } from './drag';
import { Layer } from './layer';
import { px } from './units';

interface GuidesProps {
  scene: Scene;
  drawing: OpenDrawing;
}

const pathOf = ({ upright, at, from, to }: Guide): string =>
  upright ? `M${at} ${from}V${to}` : `M${from} ${at}H${to}`;

/** A bar at either end of a gap, so that it reads as a measure and not as a wire. */
const endsOf = ({ upright, at, from, to }: Guide, half: number): string =>
  [from, to].map((end) => (upright ? `M${at - half} ${end}H${at + half}` : `M${end} ${at - half}V${at + half}`)).join('');

function Guides({ scene, ids, dx, dy }: { scene: Scene; ids: readonly string[]; dx: number; dy: number }) {
  const zoom = useReactFlow().getZoom();
  const suspended = useSuspended((state) => state.suspended);
  const moving = useMemo(() => new Set(ids), [ids]);
  const now = guided(scene, ids, dx, dy);
  if (!now) return null;
  // Thin at every zoom: they are no part of the drawing.
  const width = 1.2 / px(zoom);
  return (
    <Layer scene={scene} level={4} name="guides">
      {scene.parts
        .filter(({ id }) => moving.has(id))
        .map((part) => (
          <rect
            key={part.id}
            data-lands={part.id}
            x={part.x + now.dx}
            y={part.y + now.dy}
            width={part.width}
            height={part.height}
            fill="none"
            stroke="var(--ghost)"
            strokeWidth={width}
            strokeDasharray={`${3 * width} ${3 * width}`}
          />
        ))}
      {!suspended &&
        now.lines.map((line) => (
          <path key={pathOf(line)} data-guide="line" d={pathOf(line)} stroke="var(--blue)" strokeWidth={width} fill="none" />
        ))}
      {!suspended &&
        now.gaps.map((gap) => (
          <path
            key={pathOf(gap)}
            data-guide="gap"
            d={`${pathOf(gap)}${endsOf(gap, 5 * width)}`}
            stroke="var(--blue)"
            strokeWidth={width}
            strokeDasharray={`${2 * width} ${2 * width}`}
            fill="none"
          />
        ))}
    </Layer>
  );
}

function DragGuides({ scene }: { scene: Scene }) {
  const { ids, dx, dy } = useDrag();
  const list = useMemo(() => [...ids], [ids]);
  useSuspending(true);
  return <Guides scene={scene} ids={list} dx={dx} dy={dy} />;
}

function KeyGuides({ scene, drawing }: GuidesProps) {
  const mode = useView((state) => state.mode);
  const ids = useSheet(drawing.store, (state) => state.selection.parts);
  return mode.kind === 'move' && <Guides scene={scene} ids={ids} dx={mode.dx * MODULE} dy={mode.dy * MODULE} />;
}

/** Where what is moved will stand, and what it is then in line with. Nothing is done while nothing is moved. */
export function GuidesLayer({ scene, drawing }: GuidesProps) {
  const dragged = useDrag(({ ids }) => ids.size > 0);
  const moved = useView((state) => state.mode.kind === 'move');
  if (dragged) return <DragGuides scene={scene} />;
  return moved && <KeyGuides scene={scene} drawing={drawing} />;
}
