import type { SymbolFamily } from './family';
import { box } from './strokes';

export const appliance: SymbolFamily = {
  id: 'appliance',
  name: 'heater, appliance',
  standard: 'IEC 60617, heater (from memory)',
  kinds: ['appliance'],
  overview: {
    width: 500,
    height: 500,
    strokes: [{ d: 'M250 0V94' }, box(-62, 94, 624, 406), { d: 'M94 94V500M250 94V500M406 94V500' }],
    terminals: { L: { x: 250, y: 0, side: 'up' }, N: { x: 250, y: 0, side: 'up' }, E: { x: 250, y: 0, side: 'up' } },
  },
  connections: {
    width: 1500,
    height: 1500,
    strokes: [box(0, 0, 1500, 1500), { d: 'M375 0V1500M750 0V1500M1125 0V1500' }],
    terminals: {
      L: { x: 750, y: 0, side: 'up' },
      N: { x: 1500, y: 750, side: 'right' },
      E: { x: 750, y: 1500, side: 'down' },
    },
  },
};
