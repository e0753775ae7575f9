import type { SymbolFamily } from './family';
import { boxedDevice } from './poles';
import { box } from './strokes';
import type { Stroke } from './types';

const through = (x: number, y: number): Stroke[] => [{ d: `M${x} ${y}V${y + 1250}` }];
const faces = boxedDevice(
  [
    ['1', '4'],
    ['2', '3'],
  ],
  through,
);

/** Line in at 1 and out at 4, neutral in at 2 and out at 3. */
export const meter: SymbolFamily = {
  id: 'meter',
  name: 'watt-hour meter',
  standard: 'IEC 60617, watt-hour meter (from memory)',
  kinds: ['meter'],
  overview: {
    width: 1500,
    height: 1000,
    strokes: [box(125, 0, 1250, 1000), { d: 'M125 281H1375' }],
    texts: [{ x: 750, y: 750, text: 'kWh', size: 250, anchor: 'middle' }],
    terminals: {
      '1': { x: 750, y: 0, side: 'up' },
      '2': { x: 750, y: 0, side: 'up' },
      '4': { x: 750, y: 1000, side: 'down' },
      '3': { x: 750, y: 1000, side: 'down' },
    },
  },
  connections: {
    ...faces,
    strokes: [...faces.strokes.slice(0, -1), box(375, 750, 2250, 1000), { d: 'M375 1031H2625' }],
    texts: [{ x: 1500, y: 1525, text: 'kWh', size: 300, anchor: 'middle' }],
  },
};
