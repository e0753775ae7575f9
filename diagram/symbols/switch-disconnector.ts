import type { SymbolFamily } from './family';
import { ONE_POLE, TWO_POLES, boxedDevice, columnTerminals } from './poles';
import { contact, disconnector } from './strokes';

const pole = (x: number, y: number) => [...contact(x, y), ...disconnector(x, y)];

export const switchDisconnector: SymbolFamily = {
  id: 'isolator',
  name: 'switch-disconnector',
  standard: 'IEC 60617, switch-disconnector (from memory)',
  kinds: ['isolator'],
  overview: {
    width: 1000,
    height: 1250,
    strokes: pole(500, 0),
    terminals: columnTerminals(500, 1250, ['1', '3'], ['2', '4']),
  },
  connections: { one: boxedDevice(ONE_POLE, pole), two: boxedDevice(TWO_POLES, pole) },
};
