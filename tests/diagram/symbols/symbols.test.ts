import { describe, expect, it } from 'vitest';
import { KIND_NAME, isBar, terminalsOf } from '@/diagram/document/kinds';
import type { Kind, Part } from '@/diagram/document/schema';
import { legend, symbolById, symbolFor, terminalAt } from '@/diagram/symbols';
import { barLength, barTerminal } from '@/diagram/symbols/bar';
import { turnedPoint, turnedSize, turnedTerminal } from '@/diagram/symbols/turn';
import { MODULE, type SymbolData } from '@/diagram/symbols/types';

const KINDS = Object.keys(KIND_NAME) as Kind[];
const BOTH = ['overview', 'connections'] as const;

/** Every picture of a kind: on each face, with one pole and with two where it can have either. */
const pictures = KINDS.flatMap((kind) =>
  BOTH.flatMap((face) =>
    ([1, 2] as const).map((poles) => {
      const part = { id: 'p', kind, poles } as unknown as Part;
      return { name: `${kind}, ${face}, ${poles} pole`, face, part, symbol: symbolFor(part, face) };
    }),
  ),
);

const numbers = (symbol: SymbolData): number[] => [
  symbol.width,
  symbol.height,
  ...Object.values(symbol.terminals).flatMap(({ x, y }) => [x, y]),
  ...symbol.strokes.flatMap(({ d }) => (d.match(/-?\d+(\.\d+)?/g) ?? []).map(Number)),
];

describe('symbols', () => {
  it.each(pictures)('$name has a terminal for every mark of the kind', ({ part, symbol }) => {
    const marks = isBar(part.kind) ? [] : terminalsOf(part);
    expect(Object.keys(symbol.terminals)).toEqual(expect.arrayContaining([...marks]));
  });

  it.each(pictures)('$name stands on the module, in whole hundredths of a millimetre', ({ symbol }) => {
    for (const place of Object.values(symbol.terminals)) {
      expect(place.x % MODULE).toBe(0);
      expect(place.y % MODULE).toBe(0);
    }
    expect(symbol.width % MODULE).toBe(0);
    expect(symbol.height % MODULE).toBe(0);
    expect(numbers(symbol).filter((n) => !Number.isInteger(n))).toEqual([]);
  });

  it.each(pictures)(
    '$name keeps its terminals inside its box, and shows each apart on the connections face',
    ({ face, symbol }) => {
      const places = Object.values(symbol.terminals);
      for (const { x, y } of places) {
        expect(x).toBeGreaterThanOrEqual(0);
        expect(x).toBeLessThanOrEqual(symbol.width);
        expect(y).toBeGreaterThanOrEqual(0);
        expect(y).toBeLessThanOrEqual(symbol.height);
      }
      if (face === 'connections') expect(new Set(places.map(({ x, y }) => `${x} ${y}`)).size).toBe(places.length);
    },
  );

  it.each(pictures)('$name is drawn with move, line, arc and curve commands, absolute', ({ symbol }) => {
    for (const { d } of symbol.strokes) expect(d).toMatch(/^M[MLHVCAZ0-9 .-]*$/);
    expect(symbol.strokes.length).toBeGreaterThan(0);
  });

  it('names each symbol once and finds it again by its id', () => {
    const symbols = legend();
    expect(new Set(symbols.map((symbol) => symbol.name)).size).toBe(symbols.length);
    expect(new Set(symbols.flatMap((symbol) => symbol.kinds))).toEqual(new Set(KINDS));
    for (const { symbol } of pictures) expect(symbolById(symbol.id, symbol.width)).toEqual(symbol);
  });

  it('lists only the kinds that are asked for', () => {
    expect(legend(new Set<Kind>(['lamp', 'fan'])).map((symbol) => symbol.id)).toEqual(['lamp', 'fan']);
  });

  it('draws a kind it does not know as the crossed box', () => {
    expect(symbolFor({ kind: 'windmill' } as unknown as Part, 'overview').id).toBe('unknown');
    expect(symbolById('windmill').id).toBe('unknown');
  });

  it('tells the poles of a device apart on the connections face', () => {
    const mcb = (poles: 1 | 2) => symbolFor({ id: 'Q1', kind: 'mcb', poles }, 'connections');
    expect(Object.keys(mcb(1).terminals)).toEqual(['1', '2']);
    expect(Object.keys(mcb(2).terminals).sort()).toEqual(['1', '2', '3', '4']);
  });

  it('makes a bar as long as its terminals ask for', () => {
    const last = barTerminal('neutral-bar', 11);
    expect(last.x).toBeLessThan(barLength('neutral-bar', 12));
    expect(symbolFor({ kind: 'neutral-bar' }, 'connections', 12).width).toBe(barLength('neutral-bar', 12));
  });
});

describe('turning', () => {
  it('brings a terminal home after four quarter turns', () => {
    for (const { symbol } of pictures)
      for (const place of Object.values(symbol.terminals)) {
        let at = place;
        let size = turnedSize(symbol, 0);
        for (let i = 0; i < 4; i++) {
          at = turnedTerminal(at, size, 1);
          size = turnedSize(size, 1);
        }
        expect(at).toEqual(place);
      }
  });

  it('turns a point clockwise about its box', () => {
    expect(turnedPoint(0, 0, { width: 1000, height: 500 }, 1)).toEqual({ x: 500, y: 0 });
    expect(turnedPoint(0, 0, { width: 1000, height: 500 }, 2)).toEqual({ x: 1000, y: 500 });
    expect(turnedPoint(0, 0, { width: 1000, height: 500 }, 3)).toEqual({ x: 0, y: 1000 });
  });

  it('puts the upper terminal of a device laid on its side at the left', () => {
    const part: Part = { id: 'Q1', kind: 'mcb' };
    expect(terminalAt(part, '1', { x: 10_000, y: 5000, turn: 3 }, 'overview')).toEqual({
      x: 10_000,
      y: 5500,
      side: 'left',
    });
    expect(terminalAt(part, '9', { x: 0, y: 0 }, 'overview')).toBeNull();
  });
});
