import type { SymbolFamily } from './family';
import { box } from './strokes';

/** The long plate is the positive one. */
export const battery: SymbolFamily = {
  id: 'battery',
  name: 'battery',
  standard: 'IEC 60617, battery of cells; the longer line is the positive pole (from memory)',
  kinds: ['battery'],
  overview: {
    width: 1000,
    height: 1000,
    strokes: [
      { d: 'M500 0V219M500 781V1000' },
      { d: 'M125 781H875M125 406H875' },
      { d: 'M312 594H688M312 219H688', weight: 'heavy' },
    ],
    terminals: { '-': { x: 500, y: 0, side: 'up' }, '+': { x: 500, y: 1000, side: 'down' } },
  },
  connections: {
    width: 3000,
    height: 2500,
    strokes: [
      box(0, 0, 3000, 2500),
      { d: 'M750 500V1500H1219M2250 500V1500H1781' },
      { d: 'M1219 1062V1938M1594 1062V1938' },
      { d: 'M1406 1281V1719M1781 1281V1719', weight: 'heavy' },
    ],
    terminals: { '+': { x: 750, y: 500, side: 'up' }, '-': { x: 2250, y: 500, side: 'up' } },
  },
};
