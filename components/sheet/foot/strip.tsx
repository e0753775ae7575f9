'use client';

import { useRef, type PointerEvent } from 'react';
import { useReactFlow, useStore } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import type { MarkedNote } from '../margin/notes';
import { middle } from '../canvas/pick';
import { px } from '../canvas/units';

const HEIGHT = 40;

/** The whole drawing as a strip: bar, rooms, backup bar, a red dot a finding, and the window that is in sight. */
export function Strip({ scene, notes }: { scene: Scene; notes: readonly MarkedNote[] }) {
  const flow = useReactFlow();
  const box = useRef<SVGSVGElement>(null);
  const sight = useStore(
    ({ transform: [x, y, zoom], width, height }) => `${-x / zoom} ${-y / zoom} ${width / zoom} ${height / zoom}`,
  );
  const [x = 0, y = 0, width = 0, height = 0] = sight.split(' ').map(Number);
  const rooms = scene.frames.filter((frame) => frame.kind === 'room');
  const whole = { width: px(scene.width), height: px(scene.height) };
  if (scene.parts.length === 0) return null;
  const left = Math.max(0, x);
  const right = Math.min(whole.width, x + width);
  const visible = rooms.filter((room) => px(room.x) >= left - 1 && px(room.x + room.width) <= right + 1).length;
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  const toRow = (value: number) => (value / whole.height) * HEIGHT;
  const go = (event: PointerEvent<SVGSVGElement>) => {
    if (event.buttons === 0) return;
    const rect = box.current!.getBoundingClientRect();
    const at = ((event.clientX - rect.left) / rect.width) * whole.width;
    const { zoom } = flow.getViewport();
    void flow.setViewport({ x: Math.round((width / 2 - at) * zoom), y: Math.round(-y * zoom), zoom });
  };
  return (
    <div className="min-w-0">
      {rooms.length > 0 && (
        <p className="text-small text-grey">
          {visible === rooms.length ? `${rooms.length} rooms in sight` : `${visible} of ${rooms.length} rooms in sight`}
        </p>
      )}
      <svg
        ref={box}
        viewBox={`0 0 ${whole.width} ${HEIGHT}`}
        preserveAspectRatio="none"
        className="block h-9 w-full cursor-grab touch-none lap:w-[208px]"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          go(event);
        }}
        onPointerMove={go}
        aria-hidden="true"
      >
        {scene.parts
          .filter((part) => part.kind === 'line-bar')
          .map((part) => (
            <path
              key={part.id}
              d={`M${px(part.x)} ${toRow(px(part.y))}H${px(part.x + part.width)}`}
              stroke="var(--ink)"
              strokeWidth={2}
              vectorEffect="non-scaling-stroke"
            />
          ))}
        {rooms.map((room) => (
          <rect
            key={room.id}
            x={px(room.x)}
            y={toRow(px(room.y))}
            width={px(room.width)}
            height={toRow(px(room.height))}
            fill="none"
            stroke="var(--grey)"
            vectorEffect="non-scaling-stroke"
          />
        ))}
        {notes.map((note) => {
          const part = parts.get(note.parts[0] ?? '');
          if (!part) return null;
          const at = middle(part);
          return (
            <path
              key={note.key}
              d={`M${px(at.x)} ${toRow(px(at.y))}h0.01`}
              stroke="var(--red)"
              strokeWidth={6}
              strokeLinecap="round"
              vectorEffect="non-scaling-stroke"
            />
          );
        })}
        <rect
          x={left}
          y={toRow(Math.max(0, y))}
          width={Math.max(0, right - left)}
          height={Math.max(4, toRow(Math.min(whole.height, y + height)) - toRow(Math.max(0, y)))}
          fill="none"
          stroke="var(--ink)"
          strokeWidth={2}
          vectorEffect="non-scaling-stroke"
        />
      </svg>
    </div>
  );
}
