import type { Viewport } from 'reactflow';
import type { Scene } from '@/diagram/layout/scene';
import { px } from './units';

/** below it the body size of the lettering would be under 11 px */
const READABLE = 0.9;
/** the largest that a small drawing is shown */
const LARGEST = 1.6;
/** px kept free at the edges of the canvas */
export const EDGE = 8;

/** What of a scene decides where one looks first: the rest may change without the view being another one. */
type Whole = Pick<Scene, 'face' | 'parts' | 'width' | 'height'>;

/**
 * Where a canvas looks when a face opens on it: at all of it; where that would be too small to read, at the size at which
 * it can be read, on the source and what lies about it.
 * @param box px, width and height of the canvas
 * @param top px kept free along the upper edge
 */
export function firstView(scene: Whole, [w, h]: readonly [number, number], top: number): Viewport {
  const [width, height] = [px(scene.width), px(scene.height)];
  const fit = Math.min((w - 2 * EDGE) / width, (h - top - EDGE) / height);
  const zoom = Math.min(LARGEST, Math.max(READABLE, fit));
  const source = scene.face === 'overview' ? scene.parts.find((part) => part.kind === 'supply') : undefined;
  const centre = source ? px(source.x + source.width / 2) * zoom : 0;
  const spare = w - width * zoom;
  const x = spare >= 0 ? spare / 2 : Math.min(EDGE, Math.max(spare - EDGE, w / 2 - centre));
  const y = Math.max(top, (h - height * zoom) / 2);
  return { x: Math.round(x), y: Math.round(y), zoom };
}
