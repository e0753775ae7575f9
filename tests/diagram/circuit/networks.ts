import { REFERENCE, type Network } from '@/diagram/circuit/network';

/** A branch of a test network: an impedance, between nodes or to the reference. */
export interface TestBranch {
  a: number;
  b: number;
  ohm: number;
  /** ohm of reactance, positive when inductive */
  reactance: number;
}

export interface TestNetwork {
  name: string;
  size: number;
  branches: TestBranch[];
  /** ideal sources from the reference */
  held: Map<number, { re: number; im: number }>;
  /** A pushed into nodes from the reference */
  pushed?: Map<number, number>;
}

/** Mulberry32: the same numbers from the same seed on every machine. */
export function random(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** The network as the solver takes it. */
export function toNetwork({ size, branches, held, pushed }: TestNetwork): Network {
  const square = (branch: TestBranch) => branch.ohm ** 2 + branch.reactance ** 2;
  return {
    size,
    from: Int32Array.from(branches, (branch) => branch.a),
    to: Int32Array.from(branches, (branch) => branch.b),
    re: Float64Array.from(branches, (branch) => branch.ohm / square(branch)),
    im: Float64Array.from(branches, (branch) => -branch.reactance / square(branch)),
    injectRe: Float64Array.from({ length: size }, (_, node) => pushed?.get(node) ?? 0),
    injectIm: new Float64Array(size),
    held,
  };
}

const between = (next: () => number, low: number, high: number) => low * (high / low) ** next();

/** A load of some watts at some power factor, lagging or leading, as a series impedance at 230 V. */
function load(next: () => number): { ohm: number; reactance: number } {
  const va = between(next, 5, 3000);
  const pf = 0.5 + 0.5 * next();
  const z = 230 ** 2 / va;
  return { ohm: z * pf, reactance: z * Math.sqrt(1 - pf ** 2) * (next() < 0.8 ? 1 : -1) };
}

/** Line and neutral rails with loads between them, as a run of outlets is. */
export function ladder(seed: number): TestNetwork {
  const next = random(seed);
  const rungs = 3 + Math.floor(next() * 20);
  const branches: TestBranch[] = [{ a: 0, b: 1, ohm: between(next, 0.05, 0.5), reactance: between(next, 0.01, 0.2) }];
  const [first, size] = [1, 1 + 2 * rungs];
  for (let i = 0; i < rungs; i++) {
    const [line, neutral] = [first + 2 * i, first + 2 * i + 1];
    branches.push({ a: line, b: neutral, ...load(next) });
    if (i === 0) branches.push({ a: neutral, b: REFERENCE, ohm: between(next, 0.05, 0.5), reactance: 0 });
    else {
      branches.push({ a: line - 2, b: line, ohm: between(next, 0.005, 0.5), reactance: 0 });
      branches.push({ a: neutral - 2, b: neutral, ohm: between(next, 0.005, 0.5), reactance: 0 });
    }
  }
  return { name: `ladder ${seed}`, size, branches, held: new Map([[0, { re: 230, im: 0 }]]) };
}

/** A grid with chords: nothing like a home, to try the fill. Two sources of different phase. */
export function mesh(seed: number): TestNetwork {
  const next = random(seed);
  const wide = 3 + Math.floor(next() * 5);
  const high = 3 + Math.floor(next() * 5);
  const size = wide * high;
  const branches: TestBranch[] = [];
  const add = (a: number, b: number) =>
    branches.push({ a, b, ohm: between(next, 0.1, 100), reactance: (next() - 0.3) * between(next, 0.1, 50) });
  for (let y = 0; y < high; y++)
    for (let x = 0; x < wide; x++) {
      const n = y * wide + x;
      if (x + 1 < wide) add(n, n + 1);
      if (y + 1 < high) add(n, n + wide);
      if (next() < 0.3) add(n, REFERENCE);
    }
  for (let i = 0; i < size / 3; i++) {
    const [a, b] = [Math.floor(next() * size), Math.floor(next() * size)];
    if (a !== b) add(a, b);
  }
  const angle = next() * Math.PI;
  return {
    name: `mesh ${seed}`,
    size,
    branches,
    held: new Map([
      [0, { re: 230, im: 0 }],
      [size - 1, { re: 110 * Math.cos(angle), im: 110 * Math.sin(angle) }],
    ]),
  };
}

/**
 * Service, bars, ways, boxes and loads, with earth cores, leakage and a ring now and then. Contacts are a tenth of a
 * milliohm: at a microhm the simulator's own current of a contact loses more than six digits.
 */
export function home(seed: number, ways = 0): TestNetwork {
  const next = random(seed);
  const branches: TestBranch[] = [];
  let size = 0;
  const node = () => size++;
  const wire = (a: number, b: number, ohm: number) => branches.push({ a, b, ohm, reactance: 0 });
  const contact = 1e-4;
  const source = node();
  const [line, neutral, earth] = [node(), node(), node()];
  branches.push({ a: source, b: line, ohm: between(next, 0.05, 0.3), reactance: between(next, 0.01, 0.1) });
  wire(neutral, REFERENCE, between(next, 0.02, 0.3));
  wire(earth, REFERENCE, between(next, 0.02, 20));
  const count = ways || 3 + Math.floor(next() * 8);
  for (let w = 0; w < count; w++) {
    const top = node();
    wire(line, top, contact);
    let [l, n, e] = [node(), node(), node()];
    const run = () => between(next, 0.02, 0.4);
    const far = run();
    wire(top, l, far);
    wire(neutral, n, far);
    wire(earth, e, far);
    const boxes = 1 + Math.floor(next() * 5);
    for (let i = 0; i < boxes; i++) {
      if (next() < 0.4) {
        const [sw, lamp, back] = [node(), node(), node()];
        wire(l, sw, contact);
        wire(sw, lamp, run());
        wire(back, n, run());
        branches.push({ a: lamp, b: back, ...load(next) });
        // Leakage from the case's earth, as filters make it.
        branches.push({ a: lamp, b: e, ohm: 0, reactance: -between(next, 1e5, 1e6) });
      } else branches.push({ a: l, b: n, ...load(next) });
      if (i + 1 < boxes) {
        const [l2, n2, e2] = [node(), node(), node()];
        const leg = run();
        wire(l, l2, leg);
        wire(n, n2, leg);
        wire(e, e2, leg);
        [l, n, e] = [l2, n2, e2];
      }
    }
    if (next() < 0.2) {
      wire(top, l, run());
      wire(neutral, n, run());
    }
    if (next() < 0.1) branches.push({ a: l, b: e, ohm: between(next, 0.5, 500), reactance: 0 });
  }
  return { name: `home ${seed}`, size, branches, held: new Map([[source, { re: 230, im: 0 }]]) };
}
