'use client';

import { useCallback, useEffect, useRef } from 'react';
import { useReactFlow, useStore } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import { useViewStore } from '../view';
import { EDGE, firstView } from './first-view';
import { px } from './units';

/** px: the names of the pages stand along the upper edge of the connections face */
const PAGES = 40;

/** below it what is gone to is made larger */
const LEAST = 0.8;
/** px from the edge at which a point counts as in sight */
const IN_SIGHT = 24;

/** px by which a point has to move along one side of the canvas to be in sight. */
const toSight = (at: number, side: number): number =>
  at < IN_SIGHT ? IN_SIGHT - at : at > side - IN_SIGHT ? side - IN_SIGHT - at : 0;

/** Where the canvas looks, and the camera by which the rest of the sheet moves it. */
export function useCamera(scene: Scene): void {
  const view = useViewStore();
  const flow = useReactFlow();
  const box = useStore((state) => `${state.width} ${state.height}`);
  const { face, parts, width, height } = scene;

  const all = useCallback(() => {
    const [w = 0, h = 0] = box.split(' ').map(Number);
    if (w === 0 || h === 0) return;
    void flow.setViewport(firstView({ face, parts, width, height }, [w, h], face === 'connections' ? PAGES : EDGE));
  }, [box, flow, face, parts, width, height]);

  const shown = useRef<string | null>(null);
  const page = `${scene.face} ${scene.place ?? ''}`;
  useEffect(() => {
    if (shown.current === page || box.startsWith('0 ') || scene.parts.length === 0) return;
    shown.current = page;
    all();
  }, [page, box, all, scene.parts.length]);

  useEffect(() => {
    view.getState().set({
      camera: {
        all,
        zoom: (by) => void flow.zoomTo(flow.getZoom() * by),
        show(point) {
          const { x, y, zoom } = flow.getViewport();
          const [w = 0, h = 0] = box.split(' ').map(Number);
          const at = { x: px(point.x) * zoom + x, y: px(point.y) * zoom + y };
          const [dx, dy] = [toSight(at.x, w), toSight(at.y, h)];
          const near = zoom >= LEAST && Math.abs(dx) < w && Math.abs(dy) < h;
          if (!near) void flow.setCenter(px(point.x), px(point.y), { zoom: Math.max(zoom, LEAST) });
          // What lies just outside is brought in by as little as it takes: the eye keeps its place.
          else if (dx !== 0 || dy !== 0) void flow.setViewport({ x: Math.round(x + dx), y: Math.round(y + dy), zoom });
        },
        across(x) {
          const { y, zoom } = flow.getViewport();
          const [w = 0] = box.split(' ').map(Number);
          void flow.setViewport({ x: Math.round(w / 2 - px(x) * zoom), y, zoom });
        },
        clear(point, foot) {
          const { x, y, zoom } = flow.getViewport();
          const [, h = 0] = box.split(' ').map(Number);
          const hidden = px(point.y) * zoom + y - (h - foot - 80);
          if (hidden > 0) void flow.setViewport({ x, y: Math.round(y - hidden), zoom });
        },
        onScreen(point) {
          const { x, y, zoom } = flow.getViewport();
          return { x: px(point.x) * zoom + x, y: px(point.y) * zoom + y };
        },
      },
    });
  }, [view, flow, all, box]);
}
