import type { SymbolFamily } from './family';

/** Where the service line comes in. */
export const supplyArrow: SymbolFamily = {
  id: 'supply',
  name: 'supply',
  standard: 'IEC 60617, line with direction of energy (from memory)',
  kinds: ['supply'],
  overview: {
    width: 1000,
    height: 750,
    strokes: [{ d: 'M500 0V750' }, { d: 'M344 156H656L500 469Z', fill: 'ink' }],
    terminals: {
      L: { x: 500, y: 750, side: 'down' },
      N: { x: 500, y: 750, side: 'down' },
      E: { x: 500, y: 750, side: 'down' },
    },
  },
  connections: {
    width: 4500,
    height: 1500,
    strokes: [
      { d: 'M750 0V1000M2250 0V1000M3750 0V1000' },
      { d: 'M594 250H906L750 562ZM2094 250H2406L2250 562ZM3594 250H3906L3750 562Z', fill: 'ink' },
    ],
    terminals: {
      L: { x: 750, y: 1000, side: 'down' },
      N: { x: 2250, y: 1000, side: 'down' },
      E: { x: 3750, y: 1000, side: 'down' },
    },
  },
};
