import type { SymbolFamily } from './family';
import { box, circle } from './strokes';
import type { Shape } from './family';
import type { Stroke, TerminalPlace } from './types';

/** Two fixed contacts and the blade between them, drawn at rest on neither. */
const pole = (a: number, b: number, out: number, y: number): Stroke[] => [
  {
    d: `M${a} ${y}V${y + 375}M${b} ${y}V${y + 375}M${out} ${y + 875}V${y + 1250}M${out} ${y + 875}L${a + 60} ${y + 400}`,
  },
  circle(a, y + 375, 62, 'paper'),
  circle(b, y + 375, 62, 'paper'),
];

function boxed(marks: readonly (readonly [string, string, string])[]): Shape {
  const terminals: Record<string, TerminalPlace> = {};
  const strokes: Stroke[] = [box(0, 0, 3000 * marks.length, 2500)];
  marks.forEach(([a, b, out], n) => {
    const x = 3000 * n;
    strokes.push(
      { d: `M${x + 750} 500V625M${x + 2250} 500V625M${x + 1500} 1875V2000` },
      ...pole(x + 750, x + 2250, x + 1500, 625),
    );
    terminals[a] = { x: x + 750, y: 500, side: 'up' };
    terminals[b] = { x: x + 2250, y: 500, side: 'up' };
    terminals[out] = { x: x + 1500, y: 2000, side: 'down' };
  });
  if (marks.length > 1) strokes.push({ d: 'M1125 1250H4125', weight: 'thin', dash: 'short' });
  return { width: 3000 * marks.length, height: 2500, strokes, terminals };
}

export const changeover: SymbolFamily = {
  id: 'changeover',
  name: 'changeover switch',
  standard: 'IEC 60617, change-over contact, off position in the centre (from memory)',
  kinds: ['changeover'],
  overview: {
    width: 1000,
    height: 1250,
    strokes: pole(250, 750, 500, 0),
    terminals: {
      A1: { x: 250, y: 0, side: 'up' },
      A3: { x: 250, y: 0, side: 'up' },
      B1: { x: 750, y: 0, side: 'up' },
      B3: { x: 750, y: 0, side: 'up' },
      '2': { x: 500, y: 1250, side: 'down' },
      '4': { x: 500, y: 1250, side: 'down' },
    },
  },
  connections: {
    one: boxed([['A1', 'B1', '2']]),
    two: boxed([
      ['A1', 'B1', '2'],
      ['A3', 'B3', '4'],
    ]),
  },
};
