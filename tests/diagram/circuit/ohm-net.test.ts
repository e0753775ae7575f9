import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { OhmNet, type OhmBranch } from '@/diagram/circuit/ohm-net';

/** Solves the node equations of a small net by plain elimination: V below the root, for given currents drawn. */
function plain(
  branches: readonly OhmBranch[],
  root: number,
  size: number,
  drawn: ReadonlyMap<number, number>,
): number[] {
  const rows = Array.from({ length: size }, (_, i) =>
    Array.from({ length: size + 1 }, (_v, j) => (j === size ? (drawn.get(i) ?? 0) : 0)),
  );
  for (const { a, b, ohm } of branches) {
    if (a === b) continue;
    rows[a]![a]! += 1 / ohm;
    rows[b]![b]! += 1 / ohm;
    rows[a]![b]! -= 1 / ohm;
    rows[b]![a]! -= 1 / ohm;
  }
  rows[root] = Array.from({ length: size + 1 }, (_, j) => (j === root ? 1 : 0));
  for (let k = 0; k < size; k++) {
    const pivot = rows.findIndex(
      (row, i) => i >= k && Math.abs(row[k]!) === Math.max(...rows.slice(k).map((each) => Math.abs(each[k]!))),
    );
    [rows[k], rows[pivot]] = [rows[pivot]!, rows[k]!];
    for (let i = 0; i < size; i++) {
      if (i === k) continue;
      const factor = rows[i]![k]! / rows[k]![k]!;
      rows[i] = rows[i]!.map((value, j) => value - factor * rows[k]![j]!);
    }
  }
  return rows.map((row, i) => row[size]! / row[i]!);
}

describe('a net of conductors', () => {
  it('adds resistances in series and shares them in parallel', () => {
    const line = new OhmNet(
      [
        { a: 0, b: 1, ohm: 2 },
        { a: 1, b: 2, ohm: 3 },
      ],
      0,
    );
    expect(line.ohmTo(2)).toBeCloseTo(5, 12);
    // A ring: halfway round, two legs of 1 + 1 ohm in parallel.
    const ring = new OhmNet(
      [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
      ].map(([a, b]) => ({ a: a!, b: b!, ohm: 1 })),
      0,
    );
    expect(ring.ohmTo(2)).toBeCloseTo(1, 12);
    expect(ring.ohmTo(1)).toBeCloseTo(0.75, 12);
  });

  // Networks N09 to N11 of the reference: a cube of 1 ohm, across body, face and edge 5/6, 3/4, 7/12 ohm.
  it('agrees with the resistor cube', () => {
    const cube: OhmBranch[] = [];
    for (let corner = 0; corner < 8; corner++)
      for (const bit of [1, 2, 4]) if (!(corner & bit)) cube.push({ a: corner, b: corner | bit, ohm: 1 });
    const net = new OhmNet(cube, 0);
    expect(net.ohmTo(7)).toBeCloseTo(5 / 6, 12);
    expect(net.ohmTo(3)).toBeCloseTo(3 / 4, 12);
    expect(net.ohmTo(1)).toBeCloseTo(7 / 12, 12);
  });

  it('joins what lies at 0 ohm, and knows what it does not reach', () => {
    const net = new OhmNet(
      [
        { a: 0, b: 1, ohm: 0 },
        { a: 1, b: 2, ohm: 4 },
        { a: 8, b: 9, ohm: 1 },
      ],
      0,
    );
    expect(net.ohmTo(1)).toBe(0);
    expect(net.ohmTo(2)).toBeCloseTo(4, 12);
    expect(net.ohmTo(9)).toBeUndefined();
    expect(net.ohmTo(77)).toBeUndefined();
    expect(net.drops(new Map([[9, 5]]))(9)).toBe(0);
  });

  it('gives the resistances and drops of plain elimination, for any net', () => {
    const branch = (size: number) =>
      fc.record({ a: fc.nat(size - 1), b: fc.nat(size - 1), ohm: fc.double({ min: 0.01, max: 50, noNaN: true }) });
    const net = fc.integer({ min: 2, max: 12 }).chain((size) =>
      fc.record({
        size: fc.constant(size),
        // A tree first, so that everything is joined; then what closes rings.
        tree: fc.tuple(
          ...Array.from({ length: size - 1 }, (_, i) =>
            fc.record({ a: fc.nat(i), b: fc.constant(i + 1), ohm: fc.double({ min: 0.01, max: 50, noNaN: true }) }),
          ),
        ),
        more: fc.array(branch(size), { maxLength: 10 }),
        amps: fc.array(fc.double({ min: 0, max: 30, noNaN: true }), { minLength: size, maxLength: size }),
      }),
    );
    fc.assert(
      fc.property(net, ({ size, tree, more, amps }) => {
        const branches = [...tree, ...more];
        const drawn = new Map(amps.map((value, node) => [node, node === 0 ? 0 : value]));
        const ours = new OhmNet(branches, 0);
        const drops = ours.drops(drawn);
        plain(branches, 0, size, drawn).forEach((volts, node) => expect(drops(node)).toBeCloseTo(volts, 6));
        for (let node = 1; node < size; node++)
          expect(ours.ohmTo(node)).toBeCloseTo(plain(branches, 0, size, new Map([[node, 1]]))[node]!, 8);
      }),
      { numRuns: 200 },
    );
  });
});
