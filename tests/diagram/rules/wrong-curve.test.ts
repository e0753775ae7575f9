import { expect, it } from 'vitest';
import { smallHome } from '@/diagram/document/home';
import { wrongCurve } from '@/diagram/rules/wrong-curve';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** A pump of 920 W, 4 A, that starts with so many times its current on a way of 6 A; X5 takes 1 A beside it. */
const pump = (surge: number, curve: 'B' | 'C' | 'D' = 'B') =>
  smallHome()
    .way('Q12', 'study', { rating: 6, curve })
    .heater('E5', 'S5', 'Q12', { watts: 920, surge, label: 'Pump' })
    .socket('X5', 'Q12', { load: 230 });

testRule(wrongCurve, {
  valid: {
    'a small home': smallHome(),
    // IEC 60898-1: type B holds 3 In for an instant: 18 A; the pump starts with 17 A beside 1 A
    'the limit itself: 4.25 x 4 A beside 1 A on B6': pump(4.25),
    'type C holds 30 A': pump(7, 'C'),
    'no start at all': pump(1),
    'a breaker of unknown type is not judged': pump(12).set('Q12', { curve: undefined }),
  },
  invalid: {
    'a hair above on B6': {
      drawing: pump(4.26),
      findings: [{ parts: ['Q12', 'E5'], severity: 'advice', conditions: ['mains'], message: /18 A/ }],
    },
    'and on C6': { drawing: pump(7.5, 'C'), findings: [{ parts: ['Q12', 'E5'] }] },
    'lamp drivers that one switch starts together': {
      drawing: smallHome()
        .lamp('E7', 'S7', 'Q11', { watts: 40, pf: 0.9, surge: 20 })
        .lamp('E8', 'S8', 'Q11', { watts: 200, pf: 0.9, surge: 20 })
        .cable('cc', 1.5, 3)
        .cut('S8:2', 'E8:L')
        .drop('S8')
        .switched('E7:L', 'E8:L', 'cc'),
      findings: [{ parts: ['Q11', 'E7', 'E8'] }],
    },
  },
});

testRemedies(wrongCurve, {
  'the next type': { drawing: pump(5), offers: ['Fit type C'] },
  'none where type C trips as well': { drawing: pump(9), offers: [] },
});

it('waits for the type of a breaker only where something starts', () => {
  expect(lacksOf(wrongCurve, pump(12).set('Q12', { curve: undefined }))).toEqual(['the type B, C or D of Q12']);
  expect(lacksOf(wrongCurve, pump(1).set('Q12', { curve: undefined }))).toEqual([]);
});
