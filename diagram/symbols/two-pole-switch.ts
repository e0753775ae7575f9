import type { SymbolFamily } from './family';
import { TWO_POLES, boxedDevice, columnTerminals } from './poles';
import { circle, contact } from './strokes';

export const twoPoleSwitch: SymbolFamily = {
  id: 'switch-2pole',
  name: 'two-pole switch',
  standard: 'IEC 60617, two-pole switch (from memory)',
  kinds: ['switch-2pole'],
  overview: {
    width: 750,
    height: 750,
    strokes: [{ d: 'M250 0V750' }, circle(250, 500, 94, 'ink'), { d: 'M250 500L469 125L594 200M406 233L531 308' }],
    terminals: columnTerminals(250, 750, ['1', '3'], ['2', '4']),
  },
  connections: boxedDevice(TWO_POLES, contact),
};
