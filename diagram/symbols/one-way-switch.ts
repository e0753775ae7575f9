import type { SymbolFamily } from './family';
import { ONE_POLE, boxedDevice, columnTerminals } from './poles';
import { circle, contact } from './strokes';

/** A one-way switch: on the overview the dot with its lever, on the connections face a make contact. */
export const oneWaySwitch: SymbolFamily = {
  id: 'switch',
  name: 'one-way switch',
  standard: 'IEC 60617, switch, general symbol; make contact (from memory)',
  kinds: ['switch'],
  overview: {
    width: 750,
    height: 750,
    strokes: [{ d: 'M250 0V750' }, circle(250, 500, 94, 'ink'), { d: 'M250 500L469 125L594 200' }],
    terminals: columnTerminals(250, 750, ['1'], ['2']),
  },
  connections: boxedDevice(ONE_POLE, contact),
};
