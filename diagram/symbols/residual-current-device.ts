import type { SymbolFamily } from './family';
import { POLE_PITCH, TWO_POLES, boxedDevice, columnTerminals } from './poles';
import { contact, cross, summationRing } from './strokes';
import type { Stroke } from './types';

const pole = (x: number, y: number): Stroke[] => [...contact(x, y), cross(x, y)];

/** One ring round both conductors, drawn with the last pole. */
export function bothThroughRing(x: number, y: number): Stroke[] {
  const left = x - POLE_PITCH;
  return [
    {
      d: `M${left - 130} ${y + 952}H${x + 130}A110 110 0 0 1 ${x + 130} ${y + 1172}H${left - 130}A110 110 0 0 1 ${left - 130} ${y + 952}Z`,
    },
    { d: `M${left - 240} ${y + 1062}H${left - 440}V${y + 610}H${left - 160}`, weight: 'thin', dash: 'short' },
  ];
}

export const residualCurrentDevice: SymbolFamily = {
  id: 'rcd',
  name: 'residual-current device',
  standard: 'IEC 60617, residual current circuit-breaker, summation transformer tied to the contact (from memory)',
  kinds: ['rcd'],
  overview: {
    width: 1000,
    height: 1250,
    strokes: [...pole(500, 0), ...summationRing(500, 0)],
    terminals: columnTerminals(500, 1250, ['1', '3'], ['2', '4']),
  },
  connections: boxedDevice(TWO_POLES, (x, y, n) => [...pole(x, y), ...(n === 1 ? bothThroughRing(x, y) : [])]),
};
