import type { SymbolFamily } from './family';
import { ONE_POLE, boxedDevice, columnTerminals } from './poles';
import { box } from './strokes';
import type { Stroke } from './types';

const element = (x: number, y: number): Stroke[] => [box(x - 125, y + 312, 250, 626), { d: `M${x} ${y}V${y + 1250}` }];

export const fuse: SymbolFamily = {
  id: 'fuse',
  name: 'fuse',
  standard: 'IEC 60617, fuse, general symbol (from memory)',
  kinds: ['fuse'],
  overview: {
    width: 1000,
    height: 1250,
    strokes: element(500, 0),
    terminals: columnTerminals(500, 1250, ['1'], ['2']),
  },
  connections: boxedDevice(ONE_POLE, element),
};
