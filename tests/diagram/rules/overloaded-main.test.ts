import { expect, it } from 'vitest';
import { backupHome, Home } from '@/diagram/document/home';
import { overloadedMain } from '@/diagram/rules/overloaded-main';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/**
 * Heaters of so many watts, each on its own way of 32 A in 6 mm2. GN1 Table H2: heating and power counts whole to 10 A and
 * by half above, so two of 30 A count as 10 + 0.5 x 50 = 35 A.
 */
const heaters = (watts: readonly number[], home = new Home()) =>
  watts.reduce<Home>(
    (drawn, each, i) =>
      drawn
        .way(`Q${11 + i}`, 'study', { rating: 32 }, { csa: 6, length: 5 })
        .heater(`E${11 + i}`, `S${11 + i}`, `Q${11 + i}`, { watts: each })
        .cable(`cE${11 + i}`, 6, 1),
    home.place('study'),
  );

const two = () => heaters([6900, 6900]);

testRule(overloadedMain, {
  valid: {
    'the limit itself: 35 A on 35 A': two().set('Q1', { rating: 35 }),
    'without a rating nothing is judged': two().set('Q1', { rating: undefined }),
    'without the watts of a load nothing is judged': two().set('Q1', { rating: 10 }).set('E11', { watts: undefined }),
    'a way that is overloaded is that rule': { drawing: heaters([9000]), also: ['overloaded-way'] },
  },
  invalid: {
    'a main switch of 32 A before 35 A': {
      drawing: two().set('Q1', { rating: 32 }),
      findings: [{ parts: ['Q1'], severity: 'defect', conditions: ['mains'], message: /35 A/ }],
    },
    'service fuse, meter, switch and rcd in series are one finding': {
      drawing: two()
        .set('F1', { rating: 32 })
        .set('P1', { rating: 32 })
        .set('Q1', { rating: 32 })
        .set('Q2', { rating: 32 }),
      findings: [{ parts: ['F1', 'P1', 'Q1', 'Q2'] }],
      also: [],
    },
    'the breaker at the output of an inverter, on battery too': {
      drawing: backupHome().set('X2', { load: 1300 }).set('G1', { va: 1500, surge: 3000 }).set('Q4', { rating: 5 }),
      findings: [{ parts: ['Q4'], conditions: ['mains', 'outage', 'main-off'] }],
      also: ['thin-battery-lead'],
    },
    'an rcd alone': { drawing: two().set('Q2', { rating: 25 }), findings: [{ parts: ['Q2'] }] },
  },
});

testRemedies(overloadedMain, {
  'a larger main switch': { drawing: two().set('Q1', { rating: 32 }), offers: ['Fit one of 40 A'] },
  'a larger rcd would still be below its fuse, so it is not offered': {
    drawing: two().set('Q2', { rating: 25 }),
    offers: [],
  },
});

it('names what it waits for', () => {
  expect(lacksOf(overloadedMain, two().set('Q1', { rating: undefined }))).toEqual(['the rated current of Q1']);
});
