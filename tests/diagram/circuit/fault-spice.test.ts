import { beforeAll, describe, expect, test } from 'vitest';
import { evaluate } from '@/diagram/circuit/evaluate';
import type { Fault, FaultWalk } from '@/diagram/circuit/fault-types';
import { walkFaults, walkFrom } from '@/diagram/circuit/fault-walk';
import { standingsOf } from '@/diagram/circuit/steady';
import { backupHome, smallHome } from '@/diagram/document/home';
import type { Installation } from '@/diagram/document/schema';
import { buildGraph } from '@/diagram/terminals/graph';
import { spice, type SpiceAnswer } from './ngspice';
import { networkOf, type State, type Written } from './netlist-of';

type Condition = State['condition'];

/** A source that is not held to its greatest current in these: the netlist has no limiter. */
const strong = { shortCircuit: 5000 };
const backup = (options: Parameters<typeof backupHome>[0] = {}, supply: Parameters<typeof backupHome>[1] = {}) =>
  backupHome({ ...strong, ...options }, supply).document();
const wireTo = (doc: Installation, part: string): string =>
  doc.wires.find(({ to, role }) => role === 'neutral' && to[0] === part)!.id;

const tncs = smallHome({ supply: { system: 'TN-C-S', ze: 0.35, zln: 0.35 } })
  .heater('E9', 'S9', 'Q11', { watts: 400 })
  .document();
const tt = smallHome({ supply: { system: 'TT', ra: 60, zln: 0.5 } }).document();
const bonded = backup();
const floating = backup({ bond: false });
const apart = backup({ neutral: 'separate', bond: true });

const slower = backupHome({ ...strong, neutral: 'separate', bond: true }, { supply: { system: 'TT', ra: 60, zln: 0.5 } })
  .set('Q0', { sensitivity: 0.03, delay: 'none' })
  .set('Q5', { sensitivity: 0.3, delay: 'S' })
  .document();

const CASES: [name: string, doc: Installation, condition: Condition, faults: Fault[]][] = [
  ['line to case on mains, TN-S', bonded, 'mains', [{ kind: 'line-to-case', at: 'X1' }]],
  ['line to case on mains, TT', tt, 'mains', [{ kind: 'line-to-case', at: 'X1' }]],
  ['line to case on battery, bonded', bonded, 'outage', [{ kind: 'line-to-case', at: 'X2' }]],
  ['line to case behind an open main switch, bonded', apart, 'main-off', [{ kind: 'line-to-case', at: 'E2' }]],
  ['line to case behind an open main switch, floating', floating, 'main-off', [{ kind: 'line-to-case', at: 'X2' }]],
  ['line to neutral on mains', bonded, 'mains', [{ kind: 'line-to-neutral', at: 'E1' }]],
  ['line to neutral on battery', apart, 'outage', [{ kind: 'line-to-neutral', at: 'X2' }]],
  ['neutral to earth on mains', bonded, 'mains', [{ kind: 'neutral-to-earth', at: 'E1' }]],
  ['neutral to earth on battery', bonded, 'outage', [{ kind: 'neutral-to-earth', at: 'X2' }]],
  ["the supply's joint conductor lost, TN-C-S", tncs, 'mains', [{ kind: 'neutral-open', at: 'SUP' }]],
  ["the supply's neutral lost, TN-S", bonded, 'mains', [{ kind: 'neutral-open', at: 'SUP' }]],
  ["the supply's neutral lost, TT", tt, 'mains', [{ kind: 'neutral-open', at: 'SUP' }]],
  ['one neutral core open', bonded, 'mains', [{ kind: 'neutral-open', at: 'E1', wire: wireTo(bonded, 'E1') }]],
  [
    'two faults on a floating source: a case, then a neutral',
    floating,
    'main-off',
    [
      { kind: 'line-to-case', at: 'X2' },
      { kind: 'neutral-to-earth', at: 'E2' },
    ],
  ],
  [
    'the joint conductor lost, then a case',
    tncs,
    'mains',
    [
      { kind: 'neutral-open', at: 'SUP' },
      { kind: 'line-to-case', at: 'X1' },
    ],
  ],
];

interface Moment {
  step: FaultWalk['steps'][number];
  written: Written;
}

/** Where an inverter takes over that a device has parted from the mains. */
const TAKEN_OVER: (typeof CASES)[number][] = [
  ['a lamp behind a slower rcd than the main one, which clears it in the end', slower, 'mains', [{ kind: 'line-to-case', at: 'E2' }]],
  ['the case of the inverter, its neutral floating', floating, 'mains', [{ kind: 'line-to-case', at: 'G1' }]],
];

/** Each step of a walk beside the network that the home then is: faults put in so far, devices opened so far. */
function moments([name, doc, condition, faults]: (typeof CASES)[number], handsOver = false): Moment[] {
  const graph = buildGraph(doc);
  const evaluation = evaluate(graph);
  const walk = handsOver
    ? walkFrom(graph, standingsOf(graph, evaluation.evaluated[0]!)[0]!.standing, faults, { handsOver })
    : walkFaults(graph, evaluation, faults, condition);
  const opened = new Set<string>();
  let put = 0;
  let tookOver = false;
  return walk.steps
    .filter(({ event }) => event !== 'no device opens')
    .map((step) => {
      if (step.takesOver) tookOver = true;
      else if (step.amps === undefined) put++;
      else opened.add(step.part!);
      const state = { condition, tookOver, opened: new Set(opened), faults: faults.slice(0, put) };
      return { step, written: networkOf(doc, name, state) };
    });
}

describe('every step of a fault walk against ngspice (Debian), on networks written apart from the product', () => {
  const cases = [...CASES, ...TAKEN_OVER];
  const walked = cases.map((each) => moments(each, TAKEN_OVER.includes(each)));
  let answers: SpiceAnswer[];
  beforeAll(() => {
    answers = spice(walked.flat().map(({ written }) => written.network));
  }, 60_000);

  test('the inverter takes over in the walks that say so', () => {
    for (const [i, each] of cases.entries())
      expect(walked[i]!.some(({ step }) => step.takesOver)).toBe(TAKEN_OVER.includes(each));
  });

  test.each(cases.map(([name], i) => [name, i] as const))('%s: the volts of all cases and loads, the fault current', (_, i) => {
    const before = walked.slice(0, i).flat().length;
    expect(walked[i]!.length).toBeGreaterThan(0);
    walked[i]!.forEach(({ step, written }, at) => {
      const { nodes, branches } = answers[before + at]!;
      const volts = (part: string, mark: string) => {
        const { re, im } = nodes[written.node(part, mark)]!;
        return Math.hypot(re, im);
      };
      for (const [part, value] of Object.entries(step.caseVolts)) {
        const mark = part.startsWith('G') ? 'out.E' : 'E';
        // Printed to a millivolt; a floating island lies on gigohms, of which the last digits are lost.
        expect([part, Math.abs(volts(part, mark) - value) < 2e-3 + 1e-5 * value]).toEqual([part, true]);
      }
      for (const [part, value] of Object.entries(step.loadVolts)) {
        const [l, n] = [nodes[written.node(part, 'L')]!, nodes[written.node(part, 'N')]!];
        const across = Math.hypot(l.re - n.re, l.im - n.im);
        expect([part, Math.abs(across - value) < 2e-3 + 1e-5 * value]).toEqual([part, true]);
      }
      if (step.faultAmps > 0.01) {
        // The fault's own branch is the last before the insulation; its current by the simulator's ammeter.
        const { network } = written;
        const fault = branches[network.branches.length - network.size - 1]!;
        expect(Math.abs(Math.hypot(fault.re, fault.im) / step.faultAmps - 1)).toBeLessThan(1e-4);
      }
    });
  });
});
