import { describe, expect, test } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { evaluate } from '@/diagram/circuit/evaluate';
import type { Fault } from '@/diagram/circuit/fault-types';
import { walkFaults, walkFrom } from '@/diagram/circuit/fault-walk';
import { size, solveStanding, standingsOf } from '@/diagram/circuit/steady';
import { tableMm2 } from '@/diagram/rules/readings/earth-needs';
import { buildGraph } from '@/diagram/terminals/graph';
import { record } from './reference';
import { findingsOf } from './rule-tester';
import { secondRcd, twoRcds, twoRooms } from './tricky/tricky';

/** Facts of clauses.json, each by its id with its source there, as the examination and the fault walk show them. */

const fact = (id: string) => `${id}: ${String(record('clauses', id).value)} (${record('clauses', id).source.title})`;
const told = (drawing: Drawing) =>
  findingsOf(drawing.document()).filter(({ severity }) => severity !== 'advice').map(({ rule }) => rule);
const said = (drawing: Drawing) => findingsOf(drawing.document()).map(({ rule }) => rule);
const walk = (drawing: Drawing, faults: Fault[], condition?: string) => {
  const graph = buildGraph(drawing.document());
  return walkFaults(graph, evaluate(graph), faults, condition);
};
const standing = (drawing: Drawing, condition = 'mains') => {
  const graph = buildGraph(drawing.document());
  const evaluated = evaluate(graph).evaluated.find((each) => each.condition.name === condition)!;
  return { graph, standing: standingsOf(graph, evaluated)[0]!.standing };
};
const solved = (drawing: Drawing, condition?: string) => {
  const found = standing(drawing, condition);
  return { ...found, steady: solveStanding(found.graph, found.standing) };
};
/** A standing with all contacts of a part open. */
const open = (drawing: Drawing, part: string) => {
  const found = standing(drawing);
  const closed = found.standing.closed.slice();
  for (const number of found.graph.contactsOf.get(part)!) closed[number] = 0;
  return { graph: found.graph, standing: { ...found.standing, closed } };
};

const neutralThrough = (kind: 'switch' | 'fuse' | 'mcb', id: string) => {
  const home = smallHome();
  if (kind === 'switch') home.part('switch', id, 'study', { rating: 6 });
  else if (kind === 'fuse') home.part('fuse', id, 'study', { rating: 6, standard: 'gG' });
  else home.part('mcb', id, 'study', { poles: 1, rating: 6, curve: 'B', icn: 6000 });
  return home.cut('JN11', 'E1').neutral('JN11', `${id}:1`).neutral(`${id}:2`, 'E1:N', 'cE1');
};

describe('single-pole devices', () => {
  test(fact('132.14.1'), () => {
    expect(told(neutralThrough('switch', 'S9'))).toEqual(['switched-neutral']);
    expect(told(neutralThrough('fuse', 'F5'))).toEqual(['fused-neutral']);
    expect(told(neutralThrough('mcb', 'Q5'))).toEqual(['fused-neutral']);
  });
  test(fact('132.14.2'), () => expect(told(smallHome().set('Q11', { poles: 2 }))).toEqual([]));
  test(fact('fact-switch-in-neutral'), () => {
    const { graph, standing: off } = open(neutralThrough('switch', 'S9'), 'S9');
    const steady = solveStanding(graph, off);
    expect(steady.loadVolts('E1')).toBeLessThan(0.1);
    expect(size(steady.volts(graph.node('E1', 'L')!))).toBeGreaterThan(229);
    expect(size(steady.volts(graph.node('E1', 'N')!))).toBeGreaterThan(229);
  });
  test(fact('461.2'), () =>
    expect(
      told(smallHome().part('isolator', 'Q9', 'study', { poles: 1 }).cut('JE11', 'E1').earth('JE11', 'Q9:1').earth('Q9:2', 'E1:E')),
    ).toEqual(['switched-earth']));
  test(fact('462.1.201'), () => {
    const single = (practice: 'GB' | 'IEC') =>
      smallHome({ practice }).set('Q1', { poles: 1 }).cut('P1:3', 'Q1').cut('Q1:4', 'NB0').neutral('P1:3', 'NB0');
    expect(told(single('GB'))).toContain('single-pole-main');
  });
});

describe('one neutral a circuit', () => {
  const borrowed = () => twoRcds().lamp('E3', 'S3', 'Q11').move('JN11', 'E3', 'JN12');
  test(fact('314.4'), () => expect(told(borrowed())).toEqual(['borrowed-neutral']));
  test(fact('521.8.2'), () =>
    expect(told(twoRooms().lamp('E3', 'S3', 'Q11').move('JN11', 'E3', 'JN12'))).toEqual(['borrowed-neutral']));
  test(fact('fact-borrowed-neutral'), () => {
    const { steady } = solved(borrowed());
    const lamp = 12 / 0.9 / 230;
    expect(steady.residualAmps('Q2')).toBeCloseTo(lamp, 3);
    expect(steady.residualAmps('Q6')).toBeCloseTo(lamp, 3);
    const { graph, standing: isolated } = open(borrowed(), 'Q12');
    // The den is isolated, and the lamp of the study still sends its current through the den's neutral.
    const { wires } = borrowed().document();
    const core = wires.find(({ from, to }) => from[0] === 'NB3' && to[0] === 'JN12')!;
    expect(solveStanding(graph, isolated).wireAmps(core.id)).toBeCloseTo(lamp, 3);
  });
});

describe('residual-current devices', () => {
  test(fact('fact-neutral-earth'), () => {
    // The breaker of the faulted way is off: the current of the other way returns round the rcd, and it trips.
    const { graph, standing: off } = open(twoRooms(), 'Q11');
    expect(walkFrom(graph, off, [{ kind: 'neutral-to-earth', at: 'E1' }])).toMatchObject({ cleared: true, by: 'Q2' });
    // Without any load elsewhere nothing flows, and nothing trips.
    const idle = { ...off, off: new Set(['E2', 'X2', 'E1', 'X1']) };
    expect(walkFrom(graph, idle, [{ kind: 'neutral-to-earth', at: 'E1' }]).by).toBeNull();
  });
  test(fact('536.4.1.4'), () => {
    const series = (upper: { sensitivity: number; delay: 'none' | 'S' }) =>
      smallHome()
        .part('rcd', 'Q6', 'hall', { rating: 63, type: 'A', ...upper })
        .cut('LB0', 'Q2')
        .cut('NB0', 'Q2')
        .line('LB0', 'Q6:1')
        .neutral('NB0', 'Q6:3')
        .line('Q6:2', 'Q2:1')
        .neutral('Q6:4', 'Q2:3');
    expect(said(series({ sensitivity: 0.1, delay: 'S' }))).not.toContain('no-selectivity');
    expect(said(series({ sensitivity: 0.1, delay: 'none' }))).toContain('no-selectivity');
    expect(said(series({ sensitivity: 0.03, delay: 'S' }))).toContain('no-selectivity');
  });
  test(fact('411.3.3'), () => expect(told(smallHome({ rcd: { sensitivity: 0.3 } }))).toEqual(['no-rcd']));
  test(fact('411.3.4'), () => {
    const lampOnly = (practice: 'GB' | 'IEC') =>
      new Home({ practice }).place('den', 'room').way('Q12', 'den', {}, { bars: '0' }).lamp('E2', 'S2', 'Q12');
    expect(told(lampOnly('GB'))).toEqual(['no-rcd']);
    expect(told(lampOnly('IEC'))).toEqual([]);
  });
  test(fact('411.5.3'), () => {
    const onCoarse = (ra: number) =>
      smallHome({ supply: { system: 'TT', ra, zln: 0.3 } })
        .place('den', 'room')
        .way('Q12', 'den', {}, { bars: '0' })
        .lamp('E2', 'S2', 'Q12');
    // 50 V / 0.3 A = 166.7 ohm
    expect(told(onCoarse(166))).toEqual([]);
    expect(told(onCoarse(168))).toEqual(['no-rcd']);
  });
});

describe('two sources', () => {
  const floating = () => backupHome({ bond: false });
  test(fact('fact-island-reference'), () => {
    expect(told(floating())).toEqual(['no-earth-reference-on-backup']);
    const found = walk(floating(), [{ kind: 'line-to-case', at: 'X2' }], 'main-off');
    expect(found.faultAmps).toBeLessThan(1e-3);
    expect(found).toMatchObject({ cleared: false, by: null });
    expect(walk(backupHome(), [{ kind: 'line-to-case', at: 'X2' }], 'main-off')).toMatchObject({ by: 'Q5' });
  });
  test(fact('fact-one-link-only'), () => {
    expect(told(backupHome({ bond: true }))).toEqual([]);
    expect(told(backupHome({ bond: true }).wire('neutral', 'G1:out.N', 'G1:out.E'))).toEqual(['earth-neutral-joined']);
    const { graph, steady } = solved(backupHome({ bond: true }));
    // On mains the inverter's own link is open: no load current in the protective conductor.
    const earth = graph.document.wires.find(({ to }) => to[0] === 'G1' && to[1] === 'in.E')!;
    expect(steady.wireAmps(earth.id)).toBeLessThan(1e-6);
  });
  test(fact('fact-backfeed'), () => {
    const lead = (plugged: boolean) =>
      backupHome()
        .part('plug', 'PL9', 'study', plugged ? { in: 'X1' } : {})
        .cable('k9', 1.5, 9)
        .line('Q4:2', 'PL9:L', 'k9')
        .neutral('Q4:4', 'PL9:N', 'k9')
        .earth('EB', 'PL9:E', 'k9');
    expect(told(lead(true)).sort()).toEqual(['backfeed', 'live-pins']);
    expect(told(lead(false))).toEqual(['live-pins']);
    const { graph, steady } = solved(lead(true), 'outage');
    expect(size(steady.volts(graph.node('SUP', 'L')!))).toBeGreaterThan(200);
  });
  test(fact('fact-shared-neutral-inverter'), () => {
    const shared = (neutral: 'through' | 'separate') =>
      backupHome({ neutral, bond: false }).move('NB2', 'JN21', 'NB');
    const { steady } = solved(shared('through'));
    expect(steady.residualAmps('Q5')).toBeGreaterThan(0.4);
    expect(solved(shared('separate'), 'outage').steady.loadVolts('X2')).toBeLessThan(1);
  });
  test(fact('514.15.1'), () => {
    const bare = backupHome().document();
    const { notices: _notices, ...without } = bare;
    expect(findingsOf(without).map(({ rule }) => rule)).toContain('two-sources-unmarked');
    expect(findingsOf(bare).map(({ rule }) => rule)).not.toContain('two-sources-unmarked');
  });
  test(fact('551.6.1'), () =>
    expect(
      told(backupHome().part('switch', 'S99', 'hall', { rating: 20 }).line('LB', 'S99:1').line('LB2', 'S99:2')).sort(),
    ).toEqual(['backfeed', 'mixed-feeds']));
});

describe('the earth', () => {
  test(fact('411.3.1.1'), () => expect(told(smallHome().cut('JE11', 'E1'))).toEqual(['missing-earth']));
  test(fact('411.3.1.2'), () =>
    expect(told(smallHome().part('bond', 'WATER', 'hall', { to: 'water' }))).toEqual(['no-main-bond']));
  test(fact('fact-pen-loss'), () => {
    const found = walk(smallHome({ supply: { system: 'TN-C-S' } }), [{ kind: 'neutral-open', at: 'SUP' }]);
    expect(found.touchVolts).toBeGreaterThan(200);
    expect(found.by).toBeNull();
  });
});

describe('Table 54.7 of BS 7671, 54.2 of IEC 60364-5-54 (zs-max.json: pe-54.7)', () => {
  test.each([
    ['pe-54.7-a', 'S', 10, 10],
    ['pe-54.7-a', 'S', 16, 16],
    ['pe-54.7-b', 16, 25, 16],
    ['pe-54.7-b', 16, 35, 16],
    ['pe-54.7-c', 'S/2', 70, 35],
  ] as const)('%s: %s, for a line of %d mm2 one of %d', (id, rule, line, earth) => {
    expect(record('zs-max', id).value).toBe(rule);
    expect(tableMm2(line)).toBe(earth);
  });
});

test('two rcds side by side are no series', () =>
  expect(said(secondRcd(new Home().place('den', 'room').way('Q12', 'den').lamp('E2', 'S2', 'Q12')))).not.toContain(
    'no-selectivity',
  ));
