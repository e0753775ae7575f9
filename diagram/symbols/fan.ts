import type { SymbolFamily } from './family';
import { circle } from './strokes';
import type { Stroke } from './types';

/** Two blades of a fan in a circle; the same picture on both faces. */
function blades(x: number, y: number, r: number): Stroke[] {
  const h = Math.round(r * 0.36);
  const w = Math.round(r * 0.72);
  return [
    circle(x, y, r, 'paper'),
    {
      d: `M${x} ${y}C${x - h} ${y - 2 * h} ${x - w} ${y - h} ${x - w} ${y}C${x - w} ${y + h} ${x - h} ${y + 2 * h} ${x} ${y}C${x + h} ${y - 2 * h} ${x + w} ${y - h} ${x + w} ${y}C${x + w} ${y + h} ${x + h} ${y + 2 * h} ${x} ${y}Z`,
    },
  ];
}

export const fan: SymbolFamily = {
  id: 'fan',
  name: 'fan',
  standard: 'IEC 60617, fan (from memory)',
  kinds: ['fan'],
  overview: {
    width: 500,
    height: 500,
    strokes: blades(250, 250, 250),
    terminals: { L: { x: 250, y: 0, side: 'up' }, N: { x: 250, y: 0, side: 'up' }, E: { x: 250, y: 0, side: 'up' } },
  },
  connections: {
    width: 1500,
    height: 1500,
    strokes: blades(750, 750, 750),
    terminals: {
      L: { x: 750, y: 0, side: 'up' },
      N: { x: 1500, y: 750, side: 'right' },
      E: { x: 750, y: 1500, side: 'down' },
    },
  },
};
