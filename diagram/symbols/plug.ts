import type { SymbolFamily } from './family';
import { box } from './strokes';

export const plug: SymbolFamily = {
  id: 'plug',
  name: 'plug',
  standard: 'IEC 60617, plug, male contact (from memory)',
  kinds: ['plug'],
  overview: {
    width: 500,
    height: 750,
    strokes: [
      { d: 'M188 0H312V250H188Z', fill: 'ink' },
      { d: 'M62 250H438V438L312 563H188L62 438Z', fill: 'paper' },
      { d: 'M250 563V750' },
    ],
    terminals: {
      L: { x: 250, y: 750, side: 'down' },
      N: { x: 250, y: 750, side: 'down' },
      E: { x: 250, y: 750, side: 'down' },
    },
  },
  connections: {
    width: 4500,
    height: 2000,
    strokes: [
      box(0, 250, 4500, 1750),
      { d: 'M625 0H875V250H625ZM2125 0H2375V250H2125ZM3625 0H3875V250H3625Z', fill: 'ink' },
    ],
    terminals: {
      L: { x: 750, y: 1250, side: 'down' },
      N: { x: 2250, y: 1250, side: 'down' },
      E: { x: 3750, y: 1250, side: 'down' },
    },
  },
};
