import type { Stroke } from './types';

/**
 * Pieces that several symbols share, drawn at a place of their own. Lengths are 1/100 mm; a device's glyph enters at
 * (x, y) and leaves at (x, y + 1250).
 */
export const GLYPH_HEIGHT = 1250;

/** A make contact: fixed contact above, blade hinged below, drawn open to the left. */
export const contact = (x: number, y: number): Stroke[] => [
  { d: `M${x} ${y}V${y + 375}M${x} ${y + 1250}V${y + 875}` },
  { d: `M${x} ${y + 875}L${x - 310} ${y + 344}` },
];

/** The cross of a circuit-breaker, on the fixed contact. */
export const cross = (x: number, y: number): Stroke => ({
  d: `M${x - 120} ${y + 255}L${x + 120} ${y + 495}M${x + 120} ${y + 255}L${x - 120} ${y + 495}`,
});

/** The overcurrent release, a small box that rides on the blade. */
export const release = (x: number, y: number): Stroke => ({
  d: `M${x - 110} ${y + 688}L${x - 200} ${y + 532}L${x - 347} ${y + 618}L${x - 257} ${y + 774}Z`,
  fill: 'paper',
});

/** The bar and ring of a switch-disconnector, on the fixed contact. */
export const disconnector = (x: number, y: number): Stroke[] => [
  { d: `M${x - 150} ${y + 240}H${x + 150}` },
  circle(x, y + 345, 92, 'paper'),
];

/** The summation ring round the conductor, and the dashed link by which it opens the contact. */
export const summationRing = (x: number, y: number, width = 240): Stroke[] => [
  {
    d: `M${x - width} ${y + 1062}A${width} 110 0 1 0 ${x + width} ${y + 1062}A${width} 110 0 1 0 ${x - width} ${y + 1062}`,
  },
  { d: `M${x - width} ${y + 1062}H${x - 440}V${y + 610}H${x - 160}`, weight: 'thin', dash: 'short' },
];

export function circle(
  x: number,
  y: number,
  r: number,
  fill: Stroke['fill'] = 'none',
  weight?: Stroke['weight'],
): Stroke {
  const d = `M${x - r} ${y}A${r} ${r} 0 1 0 ${x + r} ${y}A${r} ${r} 0 1 0 ${x - r} ${y}Z`;
  return weight ? { d, fill, weight } : { d, fill };
}

export function box(x: number, y: number, width: number, height: number, fill: Stroke['fill'] = 'paper'): Stroke {
  return { d: `M${x} ${y}H${x + width}V${y + height}H${x}Z`, fill };
}

/** A mechanical link between the blades of two poles. */
export const link = (x: number, y: number, to: number): Stroke => ({
  d: `M${x - 155} ${y + 610}H${to - 155}`,
  weight: 'thin',
  dash: 'short',
});
