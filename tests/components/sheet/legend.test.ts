import { describe, expect, it } from 'vitest';
import { symbolsOn } from '@/components/sheet/foot/legend-lines';
import { KIND_NAME } from '@/diagram/document/kinds';
import type { Face, Kind, Part } from '@/diagram/document/schema';
import type { ScenePart } from '@/diagram/layout/scene';
import { symbolFor } from '@/diagram/symbols';
import { unknownSymbol } from '@/diagram/symbols/unknown';

const KINDS = Object.keys(KIND_NAME) as Kind[];

/** A part of a kind as a face draws it. */
const drawn = (kind: Kind, face: Face): ScenePart => {
  const symbol = symbolFor({ kind } as Part, face);
  const { id, width, height } = symbol;
  return { id: kind, kind, symbol: id, x: 0, y: 0, width, height, turn: 0, feed: 'mains', terminals: [], texts: [] };
};

describe('the legend', () => {
  for (const face of ['overview', 'connections'] as const)
    it(`names every kind of part that stands on the ${face}`, () => {
      const unnamed = KINDS.filter((kind) => {
        const lines = symbolsOn({ parts: [drawn(kind, face)] });
        return lines.length !== 1 || lines[0]!.name === '' || lines[0]!.id === unknownSymbol.id || lines[0]!.strokes.length === 0;
      });
      expect(unnamed).toEqual([]);
    });

  it('says each symbol once, in the order of current', () => {
    const parts = (['lamp', 'mcb', 'lamp', 'supply', 'socket'] as const).map((kind) => drawn(kind, 'overview'));
    expect(symbolsOn({ parts }).map(({ kinds }) => kinds[0])).toEqual(['supply', 'mcb', 'socket', 'lamp']);
  });

  it('tells different kinds apart by name, unless they share a symbol', () => {
    const parts = KINDS.map((kind) => drawn(kind, 'overview'));
    const names = symbolsOn({ parts }).map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
    expect(names.length).toBeGreaterThan(20);
  });
});
