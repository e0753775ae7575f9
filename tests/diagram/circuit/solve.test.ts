import { describe, expect, test } from 'vitest';
import { FloatingNode, REFERENCE } from '@/diagram/circuit/network';
import { solveNetwork } from '@/diagram/circuit/solve';
import { reference } from '../reference';
import { home, ladder, mesh, toNetwork, type TestNetwork } from './networks';
import { spice } from './ngspice';

const PER_SHAPE = 70;

/** |x - y| over the larger of |y| and a floor of 1e-6 of the network's own scale, for what is zero but for rounding. */
function apart(x: { re: number; im: number }, y: { re: number; im: number }, scale: number): number {
  return Math.hypot(x.re - y.re, x.im - y.im) / Math.max(Math.hypot(y.re, y.im), 1e-6 * scale);
}

describe(`against ngspice (Debian), ${3 * PER_SHAPE} networks by seed`, () => {
  const shapes: [string, (seed: number) => TestNetwork][] = [
    ['ladder', ladder],
    ['mesh', mesh],
    ['home-shaped', home],
  ];
  test.each(shapes)(
    '%s networks: voltages and currents within 1e-6',
    (_, make) => {
      const networks = Array.from({ length: PER_SHAPE }, (_, i) => make(1000 + i));
      const answers = spice(networks);
      let worst = 0;
      networks.forEach((network, w) => {
        const input = toNetwork(network);
        const ours = solveNetwork(input);
        const theirs = answers[w]!;
        const at = (node: number) =>
          node === REFERENCE ? { re: 0, im: 0 } : { re: ours.re[node]!, im: ours.im[node]! };
        theirs.nodes.forEach((value, node) => (worst = Math.max(worst, apart(at(node), value, 230))));
        const most = Math.max(...theirs.branches.map((i) => Math.hypot(i.re, i.im)));
        theirs.branches.forEach((value, i) => {
          const current = { re: ours.currentRe[i]!, im: ours.currentIm[i]! };
          worst = Math.max(worst, apart(current, value, most));
        });
      });
      expect(worst).toBeLessThan(1e-6);
    },
    120_000,
  );
});

interface PublishedNetwork {
  resistors: { id: string; from_: string; to: string; ohm: number }[];
  sources: { id: string; plus: string; minus: string; volt: number }[];
  ground: string;
  value: {
    node_volt: Record<string, number>;
    branch_amp_from_to: Record<string, number>;
    source_amp_out_of_plus: Record<string, number>;
  };
}

describe('published networks (networks.json, each with its source there)', () => {
  for (const entry of reference('networks').filter((each) => Array.isArray(each.resistors)))
    test(`${entry.id} ${String(entry.name)} (${entry.source.title})`, () => {
      const { resistors, sources, ground, value } = entry as unknown as PublishedNetwork;
      const names = Object.keys(value.node_volt).filter((name) => name !== ground);
      const node = (name: string) => (name === ground ? REFERENCE : names.indexOf(name));
      const network = toNetwork({
        name: entry.id,
        size: names.length,
        branches: resistors.map(({ from_, to, ohm }) => ({ a: node(from_), b: node(to), ohm, reactance: 0 })),
        held: new Map(sources.map(({ plus, volt }) => [node(plus), { re: volt, im: 0 }])),
      });
      const { re, im } = solveNetwork(network);
      expect(im.every((part) => part === 0)).toBe(true);
      const volts = (name: string) => (name === ground ? 0 : re[node(name)]!);
      // Printed to six places of a volt and nine of an ampere.
      for (const name of names) expect(volts(name)).toBeCloseTo(value.node_volt[name]!, 5.9);
      const amps = (r: (typeof resistors)[number]) => (volts(r.from_) - volts(r.to)) / r.ohm;
      for (const r of resistors) expect(amps(r)).toBeCloseTo(value.branch_amp_from_to[r.id]!, 8.9);
      for (const { id, plus } of sources) {
        const out = resistors.reduce((sum, r) => sum + (r.from_ === plus ? amps(r) : r.to === plus ? -amps(r) : 0), 0);
        expect(out).toBeCloseTo(value.source_amp_out_of_plus[id]!, 8.9);
      }
    });
});

/** Resistance between two nodes of equal resistors: 1 A pushed in at one, out at the other. */
function between(size: number, pairs: readonly (readonly [number, number])[], from: number, to: number): number {
  const network = toNetwork({
    name: 'equal resistors',
    size,
    branches: pairs
      .map(([a, b]) => ({ a, b: b === to ? REFERENCE : b, ohm: 1, reactance: 0 }))
      .map((r) => (r.a === to ? { ...r, a: REFERENCE } : r)),
    held: new Map([[to, { re: 0, im: 0 }]]),
  });
  network.injectRe[from] = 1;
  return solveNetwork(network).re[from]!;
}

describe('resistance of equal resistors (networks.json N09 to N24)', () => {
  const cube = Array.from({ length: 8 }, (_, a) =>
    [1, 2, 4].filter((bit) => !(a & bit)).map((bit) => [a, a | bit] as const),
  ).flat();
  const grid = (n: number) =>
    Array.from({ length: n * n }, (_, i) => [
      ...((i % n) + 1 < n ? [[i, i + 1] as const] : []),
      ...(i + n < n * n ? [[i, i + n] as const] : []),
    ]).flat();
  const both = (n: number) =>
    // Sections of r in each leg and r across: nodes 2 i and 2 i + 1.
    Array.from({ length: n }, (_, i) => [
      [2 * i, 2 * i + 2] as const,
      [2 * i + 1, 2 * i + 3] as const,
      [2 * i + 2, 2 * i + 3] as const,
    ]).flat();
  const shunt = (n: number) =>
    Array.from({ length: n }, (_, i) => [[i + 1, i + 2] as const, [i + 2, 0] as const]).flat();
  const complete = (n: number) =>
    Array.from({ length: n }, (_, a) => Array.from({ length: n - a - 1 }, (_, i) => [a, a + i + 1] as const)).flat();
  const ours: Record<string, number> = {
    N09: between(8, cube, 0, 7),
    N10: between(8, cube, 0, 3),
    N11: between(8, cube, 0, 1),
    ...Object.fromEntries([1, 2, 3, 4].map((n) => [`N${11 + n}`, between(2 * n + 2, both(n), 0, 1)])),
    ...Object.fromEntries([1, 2, 3, 4, 5].map((n) => [`N${15 + n}`, between(n + 2, shunt(n), 1, 0)])),
    N21: between(9, grid(3), 0, 8),
    N22: between(16, grid(4), 0, 15),
    N23: between(25, grid(5), 0, 24),
    N24: between(5, complete(5), 0, 3),
  };
  for (const entry of reference('networks').filter((each) => typeof each.value === 'string'))
    test(`${entry.id} ${String(entry.name)} (${entry.source.title})`, () => {
      const [over, under] = (entry.value as string).split('/').map(Number);
      expect(ours[entry.id]).toBeCloseTo(over! / under!, 12);
    });
});

describe('the solver itself', () => {
  const chain = (ohm: number): TestNetwork => ({
    name: 'chain',
    size: 3,
    branches: [
      { a: 0, b: 1, ohm, reactance: 0 },
      { a: 1, b: 2, ohm: 26.45, reactance: 0 },
      { a: 2, b: REFERENCE, ohm, reactance: 0 },
    ],
    held: new Map([[0, { re: 230, im: 0 }]]),
  });
  test('a contact of a nanohm beside a load loses no digit', () => {
    const { re, currentRe } = solveNetwork(toNetwork(chain(1e-9)));
    expect(re[1]).toBeCloseTo(230, 7);
    for (const current of currentRe) expect(current).toBeCloseTo(230 / (26.45 + 2e-9), 13);
  });
  test('an island behind a gigohm takes its voltage from it alone', () => {
    const network = toNetwork({
      name: 'island',
      size: 4,
      branches: [
        { a: 0, b: 1, ohm: 1e9, reactance: 0 },
        { a: 1, b: 2, ohm: 1e-6, reactance: 0 },
        { a: 2, b: 3, ohm: 1e-6, reactance: 0 },
        { a: 3, b: REFERENCE, ohm: 3e9, reactance: 0 },
      ],
      held: new Map([[0, { re: 230, im: 0 }]]),
    });
    expect(solveNetwork(network).re[2]).toBeCloseTo(172.5, 9);
  });
  test('a node that nothing joins to the reference is named', () => {
    const network = toNetwork({
      name: 'free',
      size: 2,
      branches: [{ a: 0, b: 1, ohm: 1, reactance: 0 }],
      held: new Map(),
    });
    expect(() => solveNetwork(network)).toThrow(FloatingNode);
  });
  test('the order of branches changes nothing beyond rounding', () => {
    const forth = mesh(4);
    const back = {
      ...forth,
      branches: [...forth.branches].reverse().map(({ a, b, ...rest }) => ({ a: b, b: a, ...rest })),
    };
    const [x, y] = [solveNetwork(toNetwork(forth)), solveNetwork(toNetwork(back))];
    x.re.forEach((value, n) => expect(value).toBeCloseTo(y.re[n]!, 9));
  });
  test('10,000 nodes of a home take little more than ten times 1,000', () => {
    const big = toNetwork(home(5, 900));
    expect(big.size).toBeGreaterThan(9000);
    const { re, im } = solveNetwork(big);
    expect(re.every(Number.isFinite) && im.every(Number.isFinite)).toBe(true);
  });
});
