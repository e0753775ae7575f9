import type { SymbolFamily } from './family';
import { box } from './strokes';

/** Mains in at the left (overview) or above (connections), output at the right or below, the battery apart from both. */
export const inverter: SymbolFamily = {
  id: 'inverter',
  name: 'inverter',
  standard: 'IEC 60617, converter, ac and dc (from memory)',
  kinds: ['inverter'],
  overview: {
    width: 2000,
    height: 1500,
    strokes: [
      box(0, 0, 2000, 1500),
      { d: 'M0 1500L2000 0', weight: 'thin' },
      { d: 'M250 344H700M250 500H406M544 500H700' },
      { d: 'M1188 1156C1265 900 1390 900 1469 1100C1548 1300 1673 1300 1750 1044' },
    ],
    terminals: {
      'in.L': { x: 0, y: 750, side: 'left' },
      'in.N': { x: 0, y: 750, side: 'left' },
      'in.E': { x: 0, y: 750, side: 'left' },
      'out.L': { x: 2000, y: 750, side: 'right' },
      'out.N': { x: 2000, y: 750, side: 'right' },
      'out.E': { x: 2000, y: 750, side: 'right' },
      'bat.+': { x: 1000, y: 0, side: 'up' },
      'bat.-': { x: 1500, y: 0, side: 'up' },
    },
  },
  connections: {
    width: 6500,
    height: 5000,
    strokes: [
      box(0, 0, 6500, 5000),
      box(1250, 1500, 2500, 2000),
      { d: 'M1250 3500L3750 1500', weight: 'thin' },
      { d: 'M1562 1906H2200M1562 2125H1781M1981 2125H2200' },
      { d: 'M2700 3062C2800 2750 2950 2750 3050 3000C3150 3250 3300 3250 3400 2938' },
    ],
    terminals: {
      'in.L': { x: 1000, y: 500, side: 'up' },
      'in.N': { x: 2500, y: 500, side: 'up' },
      'in.E': { x: 4000, y: 500, side: 'up' },
      'out.L': { x: 1000, y: 4500, side: 'down' },
      'out.N': { x: 2500, y: 4500, side: 'down' },
      'out.E': { x: 4000, y: 4500, side: 'down' },
      'bat.+': { x: 6000, y: 1500, side: 'right' },
      'bat.-': { x: 6000, y: 3500, side: 'right' },
    },
  },
};
