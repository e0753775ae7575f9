'use client';

import { useMemo, useRef, type PointerEvent } from 'react';
import { useReactFlow, useStore } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import { middle } from '../canvas/pick';
import { px } from '../canvas/units';
import type { MarkedNote } from '../margin/notes';
import { STRIP, stripScale } from './strip-scale';

const thin = { stroke: 'var(--ink)', fill: 'none', vectorEffect: 'non-scaling-stroke' } as const;

/** Bars and rooms: what does not change while the window moves. */
function Home({ scene }: { scene: Scene }) {
  const bars = scene.parts.filter((part) => part.kind === 'line-bar' && part.width > part.height * 4);
  return (
    <>
      {bars.map((bar) => {
        const y = bar.feed === 'backup' ? STRIP.backup : STRIP.bar;
        const line = `M${px(bar.x)} ${y}H${px(bar.x + bar.width)}`;
        return (
          <g key={bar.id}>
            <path d={line} {...thin} strokeWidth={bar.feed === 'backup' ? 4 : 2} />
            {bar.feed === 'backup' && <path d={line} {...thin} stroke="var(--paper)" strokeWidth={2} />}
          </g>
        );
      })}
      {scene.frames
        .filter((frame) => frame.kind === 'room')
        .map((room) => (
          <rect
            key={room.id}
            x={px(room.x)}
            y={STRIP.rooms}
            width={px(room.width)}
            height={STRIP.roomsEnd - STRIP.rooms}
            {...thin}
            stroke="var(--grey)"
          />
        ))}
    </>
  );
}

/** The whole drawing as a strip: bar, rooms, backup bar, a red dot a finding, and the window that is in sight. */
export function Strip({ scene, notes }: { scene: Scene; notes: readonly MarkedNote[] }) {
  const flow = useReactFlow();
  const box = useRef<SVGSVGElement>(null);
  const sight = useStore(({ transform: [x, y, zoom], width }) => `${-x / zoom} ${-y / zoom} ${width / zoom}`);
  const [x = 0, y = 0, width = 0] = sight.split(' ').map(Number);
  const whole = px(scene.width);
  const scale = useMemo(() => stripScale(scene), [scene]);
  const parts = useMemo(() => new Map(scene.parts.map((part) => [part.id, part])), [scene.parts]);
  if (scene.parts.length === 0) return null;
  const left = Math.max(0, x);
  const right = Math.min(whole, x + width);
  const rooms = scene.frames.filter((frame) => frame.kind === 'room');
  const visible = rooms.filter((room) => px(room.x) >= left - 1 && px(room.x + room.width) <= right + 1).length;
  const go = (event: PointerEvent<SVGSVGElement>) => {
    if (event.buttons === 0) return;
    const rect = box.current!.getBoundingClientRect();
    const at = ((event.clientX - rect.left) / rect.width) * whole;
    const { zoom } = flow.getViewport();
    void flow.setViewport({ x: Math.round((width / 2 - at) * zoom), y: Math.round(-y * zoom), zoom });
  };
  return (
    <div className="min-w-0 sm:w-[208px] sm:shrink-0">
      {rooms.length > 0 && (
        <p className="text-small leading-[14px] text-grey">
          {visible < rooms.length && `${visible} of `}
          {rooms.length === 1 ? '1 room' : `${rooms.length} rooms`} in sight
        </p>
      )}
      <svg
        ref={box}
        viewBox={`0 0 ${whole} ${STRIP.height}`}
        preserveAspectRatio="none"
        className="block h-[42px] w-full cursor-grab touch-none"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          go(event);
        }}
        onPointerMove={go}
        aria-hidden="true"
      >
        <Home scene={scene} />
        {notes.map((note) => {
          const part = parts.get(note.parts[0] ?? '');
          if (!part) return null;
          const at = middle(part);
          const dot = Math.min(STRIP.height - 4, Math.max(4, scale(at.y)));
          return (
            <path key={note.key} d={`M${px(at.x)} ${dot}h0.01`} {...thin} stroke="var(--red)" strokeWidth={6} strokeLinecap="round" />
          );
        })}
        <rect x={left} y={1} width={Math.max(0, right - left)} height={STRIP.height - 2} {...thin} strokeWidth={2} />
      </svg>
    </div>
  );
}
