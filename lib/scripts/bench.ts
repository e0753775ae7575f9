import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { complex, lusolve, matrix, sparse, type Complex, type Matrix } from 'mathjs';
import { REFERENCE, type Network } from '@/diagram/circuit/network';
import { timeEdits } from './bench-edits';
import { homeOf } from './bench-home';
import { AMPS, homeNetwork, toNetwork } from './bench-network';
import { median, milliseconds } from './bench-time';
import { solveNetwork } from '@/diagram/circuit/solve';
import { examine } from '@/diagram/rules/examine';

/**
 * npm run bench [-- engine|canvas] [-- --json]
 * Each measure is a ratio of two times taken side by side in this run, medians of many, or a figure against its bar.
 * With
 * --json one object a line: { name, ratio, bar, holds }. Exits 1 when one does not hold.
 */

interface Measure {
  name: string;
  ratio: number;
  bar: number;
  /** the ratio must be at least the bar, or at most */
  want: 'at least' | 'at most';
  unit: string;
  /** the same for each kind of a set of which `ratio` is the median */
  kinds?: Record<string, number>;
}

const short = (ratio: number): number => Number(ratio.toPrecision(4));
const shorten = (kinds: Record<string, number>) =>
  Object.fromEntries(Object.entries(kinds).map(([kind, ratio]) => [kind, short(ratio)]));

/** The nodal matrix of the same network, as mathjs holds it. */
function nodalMatrix({ size, from, to, re, im }: Network): { admittance: Matrix; current: Matrix } {
  const entries = new Map<number, { re: number; im: number }>();
  const add = (row: number, column: number, sign: number, i: number) => {
    const key = row * size + column;
    const entry = entries.get(key) ?? { re: 0, im: 0 };
    entries.set(key, { re: entry.re + sign * re[i]!, im: entry.im + sign * im[i]! });
  };
  for (let i = 0; i < from.length; i++) {
    const [a, b] = [from[i]!, to[i]!];
    if (a >= 0) add(a, a, 1, i);
    if (b >= 0) add(b, b, 1, i);
    if (a >= 0 && b >= 0) {
      add(a, b, -1, i);
      add(b, a, -1, i);
    }
  }
  const admittance = sparse();
  admittance.resize([size, size]);
  for (const [key, value] of entries) admittance.set([Math.floor(key / size), key % size], complex(value.re, value.im));
  const current = matrix(Array.from({ length: size }, (_, node) => [complex(node === 0 ? AMPS : 0, 0)]));
  return { admittance, current };
}

function againstMathjs(): Measure {
  const network = toNetwork(homeNetwork(1000));
  const { admittance, current } = nodalMatrix(network);
  let theirs!: Matrix;
  for (let i = 0; i < 50; i++) solveNetwork(network);
  const theirMs = milliseconds(() => (theirs = lusolve(admittance, current) as Matrix), 3);
  const ourMs = milliseconds(() => solveNetwork(network), 101);
  const { re, im } = solveNetwork(network);
  (theirs.toArray() as unknown as Complex[][]).forEach(([value], node) => {
    const apart = Math.hypot(value!.re - re[node]!, value!.im - im[node]!);
    if (apart > 1e-6 * 230) throw new Error(`node ${node}: the two answers are ${apart} V apart`);
  });
  return {
    name: 'solve, against mathjs sparse LU at 1,000 unknowns',
    ratio: theirMs / ourMs,
    bar: 40,
    want: 'at least',
    unit: 'times',
  };
}

/** The time that ngspice itself reports for one 50 Hz point, ms. */
function ngspiceMs({ branches }: ReturnType<typeof homeNetwork>): number {
  const name = (node: number) => (node === REFERENCE ? '0' : `n${node}`);
  const lines = ['home', `is 0 n0 dc 0 ac ${AMPS}`];
  branches.forEach(({ a, b, ohm, reactance }, i) => {
    lines.push(`r${i} ${name(a)} ${reactance > 0 ? `m${i}` : name(b)} ${ohm}`);
    if (reactance > 0) lines.push(`l${i} m${i} ${name(b)} ${reactance / (2 * Math.PI * 50)}`);
  });
  lines.push('.control', 'ac lin 1 50 50', 'rusage all', 'quit', '.endc', '.end');
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  try {
    const file = join(folder, 'home.cir');
    writeFileSync(file, `${lines.join('\n')}\n`);
    const said = execFileSync('ngspice', ['-b', '-n', file], {
      encoding: 'utf8',
      stdio: ['ignore', 'pipe', 'pipe'],
      maxBuffer: 1e9,
    });
    const reported = /Total analysis time \(seconds\) = ([\d.e+-]+)/.exec(said);
    if (!reported) throw new Error(`ngspice did not report its analysis time:\n${said.slice(-1500)}`);
    return 1000 * Number(reported[1]);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function againstNgspice(): Measure {
  const home = homeNetwork(10_000);
  const network = toNetwork(home);
  for (let i = 0; i < 10; i++) solveNetwork(network);
  const theirs: number[] = [];
  const ours: number[] = [];
  for (let i = 0; i < 3; i++) {
    theirs.push(ngspiceMs(home));
    ours.push(milliseconds(() => solveNetwork(network), 15));
  }
  return {
    name: "solve, against ngspice's own analysis time at 10,000 unknowns",
    ratio: median(theirs) / median(ours),
    bar: 40,
    want: 'at least',
    unit: 'times',
  };
}

function growth(): Measure {
  const sizes = [100, 1000, 5000].map(homeOf).map((doc) => ({ doc, parts: doc.parts.length }));
  for (const { doc } of sizes.slice(0, 2)) for (let i = 0; i < 5; i++) examine(doc);
  const points = sizes.map(({ doc, parts }) => ({
    x: Math.log(parts),
    y: Math.log(milliseconds(() => examine(doc), parts > 2000 ? 3 : 9)),
  }));
  const mean = (of: (point: { x: number; y: number }) => number) =>
    points.reduce((sum, point) => sum + of(point), 0) / points.length;
  const [mx, my] = [mean(({ x }) => x), mean(({ y }) => y)];
  const slope =
    points.reduce((sum, { x, y }) => sum + (x - mx) * (y - my), 0) /
    points.reduce((sum, { x }) => sum + (x - mx) ** 2, 0);
  return {
    name: 'examination, growth from 100 to 1,000 to 5,000 parts',
    ratio: slope,
    bar: 1.2,
    want: 'at most',
    unit: 'exponent',
  };
}

/** Examining a home after one edit, against from scratch: each kind of edit, and the median of the kinds. */
function incremental(): Measure {
  const home = homeOf(1000);
  for (let i = 0; i < 10; i++) examine(home);
  const kinds = timeEdits(home);
  return {
    name: 'examination after one edit, against from scratch at 1,000 parts',
    ratio: median(Object.values(kinds)),
    bar: 10,
    want: 'at least',
    unit: 'times',
    kinds,
  };
}

/** Resident memory that examining 5,000 parts adds to a process, MB: measured in one of its own. */
function memory(): Measure {
  const said = execFileSync(
    process.execPath,
    [
      '--import',
      'tsx',
      ...process.execArgv.filter((arg) => arg.startsWith('--tsconfig')),
      import.meta.filename,
      '--memory',
    ],
    { encoding: 'utf8' },
  );
  return { name: 'memory, 5,000 parts examined', ratio: Number(said), bar: 200, want: 'at most', unit: 'MB' };
}

function measureMemory(): void {
  const doc = homeOf(5000);
  const before = process.memoryUsage().rss;
  examine(doc);
  const peak = process.resourceUsage().maxRSS * 1024;
  process.stdout.write(String((peak - before) / 1e6));
}

function main(): void {
  const json = process.argv.includes('--json');
  let failed = false;
  for (const measure of [againstMathjs, againstNgspice, growth, incremental, memory]) {
    const { name, ratio, bar, want, unit, kinds } = measure();
    const holds = want === 'at least' ? ratio >= bar : ratio <= bar;
    failed ||= !holds;
    const line = json
      ? JSON.stringify({ name, ratio: short(ratio), bar, holds, ...(kinds && { kinds: shorten(kinds) }) })
      : `${holds ? 'holds' : 'MISSES'}  ${ratio.toPrecision(3)} ${unit}, ${want} ${bar}: ${name}`;
    process.stdout.write(`${line}\n`);
    if (kinds && !json)
      for (const [kind, each] of Object.entries(kinds)) process.stdout.write(`         ${each.toPrecision(3)} ${unit}: ${kind}\n`);
  }
  process.exitCode = failed ? 1 : 0;
}

async function canvas(): Promise<void> {
  // Loaded only when it is asked for: it brings a browser and a builder with it.
  const { benchCanvas } = await import('./bench-canvas');
  if (!(await benchCanvas(process.argv.includes('--json')))) process.exitCode = 1;
}

if (process.argv.includes('--memory')) measureMemory();
else {
  if (!process.argv.includes('canvas')) main();
  if (!process.argv.includes('engine')) await canvas();
}
