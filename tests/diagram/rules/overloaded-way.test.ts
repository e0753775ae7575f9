import { expect, it } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import { overloadedWay } from '@/diagram/rules/overloaded-way';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** One heater of so many watts on a way of 16 A in 2.5 mm2. */
const heated = (watts: number, options: ConstructorParameters<typeof Home>[0] = {}) =>
  smallHome(options).way('Q12', 'study', { rating: 16 }, { csa: 2.5 }).heater('E5', 'S5', 'Q12', { watts });

testRule(overloadedWay, {
  valid: {
    'a small home': smallHome(),
    'the limit itself: 3680 W at 230 V are 16 A': heated(3680),
    'a load without watts is not judged': heated(1000).set('E5', { watts: undefined }),
    'a device without rating is not judged': heated(5000).set('Q12', { rating: undefined }),
    // GN1 Table H2, worked example WE12: a cooker of 30 A counts as 10 A + 30 % of 20 A = 16 A. GB allows it on one way.
    'a British cooker of 30 A on 16 A': heated(6900, { practice: 'GB' }).set('E5', { label: 'Cooker' }),
    'an outlet with a plug in it counts by what the plug feeds': heated(3600)
      .socket('X5', 'Q12', { load: 1000 })
      .part('plug', 'XP', 'study', { in: 'X5' }),
  },
  invalid: {
    'one watt above 16 A': {
      drawing: heated(3681),
      findings: [{ parts: ['Q12'], severity: 'defect', conditions: ['mains'], message: /16 A/ }],
    },
    'the power factor counts: 3400 W at 0.9 are 16.4 A': {
      drawing: heated(3400).set('E5', { pf: 0.9 }),
      findings: [{ parts: ['Q12'], message: /16\.4 A/ }],
    },
    'the same cooker where the practice has no allowance for one way': {
      drawing: heated(6900).set('E5', { label: 'Cooker' }),
      findings: [{ parts: ['Q12'], message: /30 A/ }],
    },
    'small loads that add up: 12 lamps of 115 W at 0.9 are 6.7 A on 6 A': {
      drawing: Array.from({ length: 12 }, (_, i) => i).reduce<Home>(
        (home, i) => home.lamp(`E${20 + i}`, `S${20 + i}`, 'Q11', { watts: 115 }),
        smallHome(),
      ),
      findings: [{ parts: ['Q11'] }],
    },
    'the feed of an inverter carries its charger: 30 A x 12 V / 0.85 are 424 W, 1.8 A': {
      drawing: smallHome().backup({ charge: 30 }).set('G2', { ah: 300 }).set('Q3', { rating: 1 }),
      findings: [{ parts: ['Q3'], conditions: ['mains'] }],
    },
  },
});

testRemedies(overloadedWay, {
  'a larger device where the cable carries it: 20 A on 27 A of 2.5 mm2': {
    drawing: heated(4000).cable('cE5', 2.5, 1),
    offers: ['Fit a device of 20 A'],
  },
  'none where it does not: 32 A': { drawing: heated(6900), offers: [] },
});

it('names what it waits for', () => {
  expect(
    lacksOf(overloadedWay, heated(1000).set('E5', { watts: undefined }).set('Q12', { rating: undefined })),
  ).toEqual(['the rated current of Q12', 'the watts of E5']);
});
