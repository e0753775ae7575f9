import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { assemble } from '@/diagram/circuit/assemble';
import { evaluate } from '@/diagram/circuit/evaluate';
import { size, solveStanding, standingsOf } from '@/diagram/circuit/steady';
import { supplyModel } from '@/diagram/circuit/supply-model';
import { readDocument } from '@/diagram/document/schema';
import { buildGraph } from '@/diagram/terminals/graph';
import type { TestNetwork } from './networks';
import { spice } from './ngspice';

const load = (name: string) => {
  const read = readDocument(
    JSON.parse(readFileSync(new URL(`../../fixtures/homes/${name}.json`, import.meta.url), 'utf8')),
  );
  if (!read.ok) throw new Error(`${name} is not a document`);
  const graph = buildGraph(read.document);
  return { graph, evaluated: evaluate(graph).evaluated };
};
const solved = (name: string, condition: string) => {
  const { graph, evaluated } = load(name);
  const [first] = standingsOf(
    graph,
    evaluated.find((each) => each.condition.name === condition)!,
  );
  return { graph, standing: first!.standing, steady: solveStanding(graph, first!.standing) };
};

describe('homes against ngspice (Debian)', () => {
  const homes: [string, string][] = [
    ['clean-flat', 'mains'],
    ['clean-backup-home', 'mains'],
    ['clean-backup-home', 'outage'],
    ['backup-neutral-other-rcd', 'outage'],
    ['lost-earth-reference', 'mains'],
    ['borrowed-neutral', 'mains'],
  ];
  test('voltages and currents of six steady states within 1e-6', () => {
    const cases = homes.map(([name, condition]) => solved(name, condition));
    const networks = cases.map(({ graph, standing }, w): TestNetwork => {
      const { network } = assemble(graph, standing);
      const branches = Array.from(network.from, (a, i) => {
        const square = network.re[i]! ** 2 + network.im[i]! ** 2;
        return { a, b: network.to[i]!, ohm: network.re[i]! / square, reactance: -network.im[i]! / square };
      });
      const pushed = new Map(
        [...network.injectRe].flatMap((amps, node) => (amps === 0 ? [] : [[node, amps] as const])),
      );
      return { name: homes[w]![0], size: network.size, branches, held: new Map(), pushed };
    });
    spice(networks).forEach(({ nodes, branches }, w) => {
      const { solution } = cases[w]!.steady;
      nodes.forEach((value, node) => {
        const apart = Math.hypot(value.re - solution.re[node]!, value.im - solution.im[node]!);
        expect(apart).toBeLessThan(1e-6 * Math.max(Math.hypot(value.re, value.im), 1));
      });
      branches.forEach((value, i) => {
        // Beside a microhm the simulator's own currents lose digits: what has a resistance is compared.
        if (networks[w]!.branches[i]!.ohm < 1e-3) return;
        const apart = Math.hypot(value.re - solution.currentRe[i]!, value.im - solution.currentIm[i]!);
        expect(apart).toBeLessThan(1e-6 * Math.max(Math.hypot(value.re, value.im), 1));
      });
    });
  });
});

describe('what a steady state tells', () => {
  test('a clean home: nothing astray at any rcd, every load near its voltage', () => {
    const { graph, steady } = solved('clean-backup-home', 'mains');
    for (const id of ['Q2', 'Q5']) expect(steady.residualAmps(id)).toBeLessThan(1e-4);
    for (const id of ['E1', 'E2', 'E3', 'M1', 'X1', 'X2', 'X3']) expect(steady.loadVolts(id)).toBeGreaterThan(227);
    expect(size(steady.volts(graph.node('EB1', '1')!))).toBeLessThan(1e-3);
  });
  test('networks.json H04: a neutral behind another rcd shows its whole current at both', () => {
    const { steady } = solved('backup-neutral-other-rcd', 'outage');
    // The sewing room: 18 + 6 + 40 W, 0.9 of the lamps.
    const amps = (18 + 6) / 0.9 / 230 + 40 / 230;
    for (const id of ['Q2', 'Q5']) expect(steady.residualAmps(id)).toBeCloseTo(amps, 1);
  });
  test('a plain load by hand: 3600 W at 13 m and 1.5 m of 4 mm2', () => {
    const { steady } = solved('clean-flat', 'mains');
    const z = 230 ** 2 / 3600;
    const run = 0.00461 * 1.1965 * 14.5;
    // Alone on its run; the rest of the home lowers the bars by what 1.9 A loses in the source.
    expect(steady.loadVolts('E5')).toBeCloseTo((224.9 * z) / (z + 2 * run), 0);
    expect(steady.wireAmps('w037')).toBeCloseTo(steady.poleAmps('Q13')[0]!, 6);
  });
  test('Kirchhoff holds at every terminal', () => {
    const { graph, steady } = solved('clean-backup-home', 'mains');
    const { network } = steady.assembly;
    const left = Float64Array.from(network.injectRe);
    network.from.forEach((a, i) => {
      if (a >= 0) left[a]! -= steady.solution.currentRe[i]!;
      if (network.to[i]! >= 0) left[network.to[i]!]! += steady.solution.currentRe[i]!;
    });
    for (let node = 0; node < graph.size; node++) expect(Math.abs(left[node]!)).toBeLessThan(1e-9);
  });
});

describe('the external loop', () => {
  const base = { voltage: 230, frequency: 50 };
  test('TN-S: half of ze in the earth where zeEarth is not given; the neutral has what the line leaves of zln', () => {
    expect(supplyModel({ ...base, system: 'TN-S', ze: 0.4, zln: 0.3 })).toEqual({
      line: 0.2,
      earth: 0.2,
      neutral: expect.closeTo(0.1, 12),
      joined: false,
    });
    expect(supplyModel({ ...base, system: 'TN-S', ze: 0.8, zeEarth: 0.6, zln: 0.3 })).toMatchObject({
      line: expect.closeTo(0.2, 12),
      earth: 0.6,
    });
  });
  test('TT: by halves, no earth conductor', () =>
    expect(supplyModel({ ...base, system: 'TT', zln: 0.5, ra: 20 })).toEqual({
      line: 0.25,
      neutral: 0.25,
      earth: null,
      joined: false,
    }));
  test('TN-C-S: one joint conductor', () =>
    expect(supplyModel({ ...base, system: 'TN-C-S', ze: 0.35, zln: 0.35 }).joined).toBe(true));
});
