import type { SymbolFamily } from './family';
import { box, circle } from './strokes';

/** C at the top; the strapper terminals leave the dot sideways on the overview. */
export const twoWaySwitch: SymbolFamily = {
  id: 'switch-2way',
  name: 'two-way switch',
  standard: 'IEC 60617, two-way switch, single pole; change-over contact (from memory)',
  kinds: ['switch-2way'],
  overview: {
    width: 750,
    height: 1000,
    strokes: [
      { d: 'M250 0V500' },
      { d: 'M250 500L469 125L594 200M250 500L31 875L156 950' },
      circle(250, 500, 94, 'ink'),
    ],
    terminals: {
      C: { x: 250, y: 0, side: 'up' },
      '1': { x: 250, y: 500, side: 'right' },
      '2': { x: 250, y: 500, side: 'right' },
    },
  },
  connections: {
    width: 2500,
    height: 2500,
    strokes: [box(0, 0, 2500, 2500), { d: 'M1250 500V812M500 2000V1750M2000 2000V1750' }, { d: 'M1250 812L560 1690' }],
    terminals: {
      C: { x: 1250, y: 500, side: 'up' },
      '1': { x: 500, y: 2000, side: 'down' },
      '2': { x: 2000, y: 2000, side: 'down' },
    },
  },
};
