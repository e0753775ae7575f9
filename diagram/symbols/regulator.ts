import type { SymbolFamily } from './family';
import { ONE_POLE, boxedDevice, columnTerminals } from './poles';
import { box } from './strokes';
import type { Stroke } from './types';

const variable = (x: number, y: number): Stroke[] => [
  box(x - 250, y + 125, 500, 500),
  {
    d: `M${x} ${y}V${y + 125}M${x} ${y + 625}V${y + 750}M${x - 312} ${y + 688}L${x + 312} ${y + 62}M${x + 140} ${y + 62}H${x + 312}V${y + 234}`,
  },
];
const boxed = boxedDevice(ONE_POLE, (x, y) => [
  { d: `M${x} ${y}V${y + 250}M${x} ${y + 1000}V${y + 1250}` },
  ...variable(x, y + 250),
]);

/** Fan speed. */
export const regulator: SymbolFamily = {
  id: 'regulator',
  name: 'fan regulator',
  standard: 'IEC 60617, variability, general symbol (from memory)',
  kinds: ['regulator'],
  overview: { width: 1000, height: 750, strokes: variable(500, 0), terminals: columnTerminals(500, 750, ['1'], ['2']) },
  connections: boxed,
};
