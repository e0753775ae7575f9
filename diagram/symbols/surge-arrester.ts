import type { SymbolFamily } from './family';
import { box } from './strokes';
import type { Stroke } from './types';

const gap = (x: number, y: number): Stroke[] => [
  box(x - 156, y + 250, 312, 750),
  { d: `M${x} ${y}V${y + 500}M${x} ${y + 1250}V${y + 750}` },
  {
    d: `M${x - 78} ${y + 406}H${x + 78}L${x} ${y + 562}ZM${x - 78} ${y + 844}H${x + 78}L${x} ${y + 688}Z`,
    fill: 'ink',
  },
];

export const surgeArrester: SymbolFamily = {
  id: 'spd',
  name: 'surge arrester',
  standard: 'IEC 60617, surge diverter (from memory)',
  kinds: ['spd'],
  overview: {
    width: 1000,
    height: 1750,
    strokes: [...gap(500, 0), { d: 'M250 1250H750M344 1375H656M438 1500H562' }],
    terminals: {
      L: { x: 500, y: 0, side: 'up' },
      N: { x: 500, y: 0, side: 'up' },
      E: { x: 500, y: 1250, side: 'down' },
    },
  },
  connections: {
    width: 3000,
    height: 2750,
    strokes: [
      box(0, 0, 3000, 2750),
      { d: 'M750 1750V1875H2250V1750M1500 1875V2250' },
      ...gap(750, 500),
      ...gap(2250, 500),
    ],
    terminals: {
      L: { x: 750, y: 500, side: 'up' },
      N: { x: 2250, y: 500, side: 'up' },
      E: { x: 1500, y: 2250, side: 'down' },
    },
  },
};
