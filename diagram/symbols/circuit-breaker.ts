import type { SymbolFamily } from './family';
import { ONE_POLE, TWO_POLES, boxedDevice, columnTerminals } from './poles';
import { contact, cross, release } from './strokes';

const pole = (x: number, y: number) => [...contact(x, y), cross(x, y), release(x, y)];

export const circuitBreaker: SymbolFamily = {
  id: 'mcb',
  name: 'circuit-breaker',
  standard: 'IEC 60617, circuit-breaker with overcurrent release (from memory)',
  kinds: ['mcb'],
  overview: {
    width: 1000,
    height: 1250,
    strokes: pole(500, 0),
    terminals: columnTerminals(500, 1250, ['1', '3'], ['2', '4']),
  },
  connections: { one: boxedDevice(ONE_POLE, pole), two: boxedDevice(TWO_POLES, pole) },
};
