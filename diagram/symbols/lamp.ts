import type { SymbolFamily } from './family';
import { circle } from './strokes';

export const lamp: SymbolFamily = {
  id: 'lamp',
  name: 'lamp',
  standard: 'IEC 60617, lamp, general symbol (from memory)',
  kinds: ['lamp'],
  overview: {
    width: 500,
    height: 500,
    strokes: [circle(250, 250, 250, 'paper'), { d: 'M73 73L427 427M427 73L73 427' }],
    terminals: { L: { x: 250, y: 0, side: 'up' }, N: { x: 250, y: 0, side: 'up' }, E: { x: 250, y: 0, side: 'up' } },
  },
  connections: {
    width: 1500,
    height: 1500,
    strokes: [circle(750, 750, 750, 'paper'), { d: 'M220 220L1280 1280M1280 220L220 1280' }],
    terminals: {
      L: { x: 750, y: 0, side: 'up' },
      N: { x: 1500, y: 750, side: 'right' },
      E: { x: 750, y: 1500, side: 'down' },
    },
  },
};
