import type { SymbolFamily } from './family';
import { box } from './strokes';

/** The terminals of a connections-face outlet lie in its middle: a feed comes from above, the loop to the next leaves below. */
export const outlet: SymbolFamily = {
  id: 'socket',
  name: 'outlet with earth',
  standard: 'IEC 60617, socket outlet with protective contact (from memory)',
  kinds: ['socket'],
  overview: {
    width: 500,
    height: 500,
    strokes: [{ d: 'M250 0V250M0 250H500' }, { d: 'M0 500A250 250 0 0 1 500 500Z', fill: 'paper' }],
    terminals: { L: { x: 250, y: 0, side: 'up' }, N: { x: 250, y: 0, side: 'up' }, E: { x: 250, y: 0, side: 'up' } },
  },
  connections: {
    width: 4500,
    height: 2000,
    strokes: [box(0, 0, 4500, 2000)],
    terminals: {
      L: { x: 750, y: 1000, side: 'up' },
      N: { x: 2250, y: 1000, side: 'up' },
      E: { x: 3750, y: 1000, side: 'up' },
    },
  },
};
