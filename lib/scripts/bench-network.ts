import { REFERENCE, type Network } from '@/diagram/circuit/network';

/** The same numbers in every run: mulberry32. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

export interface Branch {
  a: number;
  b: number;
  ohm: number;
  reactance: number;
}

/**
 * A home's network of about so many nodes: bars, ways of line, neutral and earth, boxes, switched lamps, some rings.
 */
export function homeNetwork(nodes: number): { size: number; branches: Branch[] } {
  const next = seeded(nodes);
  const branches: Branch[] = [];
  let size = 3;
  const [line, neutral, earth] = [0, 1, 2];
  const wire = (a: number, b: number, ohm: number) => branches.push({ a, b, ohm, reactance: 0 });
  const load = (a: number, b: number) => {
    const z = 230 ** 2 / (5 + 2000 * next() ** 3);
    const pf = 0.6 + 0.4 * next();
    branches.push({ a, b, ohm: z * pf, reactance: z * Math.sqrt(1 - pf * pf) });
  };
  wire(line, REFERENCE, 0.2);
  wire(neutral, REFERENCE, 0.1);
  wire(earth, REFERENCE, 0.2);
  while (size < nodes) {
    const top = size++;
    wire(line, top, 1e-3);
    let [l, n, e] = [top, neutral, earth];
    const boxes = 3 + Math.floor(next() * 6);
    for (let i = 0; i < boxes; i++) {
      const run = 0.02 + 0.2 * next();
      const [l2, n2, e2] = [size++, size++, size++];
      wire(l, l2, run);
      wire(n, n2, run);
      wire(e, e2, run);
      load(l2, n2);
      const [contact, lamp] = [size++, size++];
      wire(l2, contact, 1e-3);
      wire(contact, lamp, run);
      load(lamp, n2);
      [l, n, e] = [l2, n2, e2];
    }
    if (next() < 0.2) wire(l, top, 0.2);
  }
  return { size, branches };
}

/** A pushed in at the line: 230 V behind its 0.2 ohm */
export const AMPS = 230 / 0.2;

/** The same as the solver takes it. */
export function toNetwork({ size, branches }: ReturnType<typeof homeNetwork>): Network {
  const square = ({ ohm, reactance }: Branch) => ohm * ohm + reactance * reactance;
  const injectRe = new Float64Array(size);
  injectRe[0] = AMPS;
  return {
    size,
    from: Int32Array.from(branches, ({ a }) => a),
    to: Int32Array.from(branches, ({ b }) => b),
    re: Float64Array.from(branches, (branch) => branch.ohm / square(branch)),
    im: Float64Array.from(branches, (branch) => -branch.reactance / square(branch)),
    injectRe,
    injectIm: new Float64Array(size),
  };
}
