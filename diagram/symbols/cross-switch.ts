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
    height: 3250,
    strokes: [
      box(0, 0, 2500, 3250),
      { d: 'M500 500V1000L2000 2250V2750M2000 500V1000L500 2250V2750', dash: 'short' },
      { d: 'M500 1000V2250M2000 1000V2250' },
    ],
    terminals: {
      '1': { x: 500, y: 500, side: 'up' },
      '3': { x: 2000, y: 500, side: 'up' },
      '2': { x: 500, y: 2750, side: 'down' },
      '4': { x: 2000, y: 2750, side: 'down' },
    },
  },
};
