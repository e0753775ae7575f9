import type { SymbolFamily } from './family';
import { box, circle } from './strokes';

/** Between two two-way switches: 1-2 and 3-4, or 1-4 and 3-2. */
export const crossSwitch: SymbolFamily = {
  id: 'switch-cross',
  name: 'cross switch',
  standard: 'IEC 60617, intermediate switch (from memory)',
  kinds: ['switch-cross'],
  overview: {
    width: 1000,
    height: 1000,
    strokes: [
      { d: 'M500 500L719 125L844 200M500 500L281 875L156 800' },
      { d: 'M500 500L281 125L156 200M500 500L719 875L844 800' },
      circle(500, 500, 94, 'ink'),
    ],
    terminals: {
      '1': { x: 500, y: 500, side: 'left' },
      '3': { x: 500, y: 500, side: 'left' },
      '2': { x: 500, y: 500, side: 'right' },
      '4': { x: 500, y: 500, side: 'right' },
    },
  },
  connections: {
    width: 2500,
    height: 2500,
    strokes: [
      box(0, 0, 2500, 2500),
      { d: 'M500 500V750L2000 1750V2000M2000 500V750L500 1750V2000', dash: 'short' },
      { d: 'M500 750V1750M2000 750V1750' },
    ],
    terminals: {
      '1': { x: 500, y: 500, side: 'up' },
      '3': { x: 2000, y: 500, side: 'up' },
      '2': { x: 500, y: 2000, side: 'down' },
      '4': { x: 2000, y: 2000, side: 'down' },
    },
  },
};
