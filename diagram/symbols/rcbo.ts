import type { SymbolFamily } from './family';
import { TWO_POLES, boxedDevice, columnTerminals } from './poles';
import { bothThroughRing } from './residual-current-device';
import { contact, cross, release, summationRing } from './strokes';

const pole = (x: number, y: number) => [...contact(x, y), cross(x, y), release(x, y)];

/** Circuit-breaker and residual-current device in one. */
export const rcbo: SymbolFamily = {
  id: 'rcbo',
  name: 'rcbo, both in one',
  standard: 'IEC 60617, residual current circuit-breaker with overcurrent release (from memory)',
  kinds: ['rcbo'],
  overview: {
    width: 1000,
    height: 1250,
    strokes: [...pole(500, 0), ...summationRing(500, 0)],
    terminals: columnTerminals(500, 1250, ['1', '3'], ['2', '4']),
  },
  connections: boxedDevice(TWO_POLES, (x, y, n) => [...pole(x, y), ...(n === 1 ? bothThroughRing(x, y) : [])]),
};
