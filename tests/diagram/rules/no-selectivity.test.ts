import { Home, smallHome } from '@/diagram/document/home';
import { noSelectivity } from '@/diagram/rules/no-selectivity';
import { testRule } from '../rule-tester';

/** A way behind a breaker of its own in series. */
const series = (upper: number, lower: number) =>
  new Home()
    .place('study')
    .part('mcb', 'Q8', 'hall', { poles: 1, rating: upper, curve: 'C', icn: 6000, label: 'Feeder' })
    .part('line-bar', 'LB8', 'hall', { rating: 63 })
    .line('LB', 'Q8:1')
    .line('Q8:2', 'LB8')
    .way('Q11', 'study', { rating: lower }, { csa: 6 })
    .move('LB', 'Q11:1', 'LB8')
    .socket('X1', 'Q11', { rating: 6 });

const rcds = (sensitivity: number, delay: 'none' | 'S') =>
  smallHome()
    .part('rcd', 'Q9', 'hall', { rating: 63, sensitivity, type: 'A', delay })
    .cut('LB0', 'Q2:1')
    .cut('NB0', 'Q2:3')
    .line('LB0', 'Q9:1')
    .neutral('NB0', 'Q9:3')
    .line('Q9:2', 'Q2:1')
    .neutral('Q9:4', 'Q2:3');

testRule(noSelectivity, {
  valid: {
    'a small home': smallHome(),
    'ratings 1.6 apart: 16 before 10 A': series(16, 10),
    'a rating that is not given leaves it open': series(16, 16).set('Q8', { rating: undefined }),
    'an rcd of type S, 100 mA, before 30 mA': rcds(0.1, 'S'),
  },
  invalid: {
    '20 before 13 A': { drawing: series(20, 13), findings: [{ parts: ['Q8', 'Q11'], severity: 'advice' }] },
    '16 before 16 A': { drawing: series(16, 16), findings: [{ parts: ['Q8', 'Q11'] }] },
    'two rcds of 30 mA without delay': {
      drawing: rcds(0.03, 'none'),
      findings: [{ parts: ['Q9', 'Q2'], message: /delay/ }],
    },
    'an rcd of 300 mA without delay': { drawing: rcds(0.3, 'none'), findings: [{ parts: ['Q9', 'Q2'] }] },
    // three times 30 mA are 90 mA: BS 7671 536.4.1.4, from memory
    'type S but only 80 mA': { drawing: rcds(0.08, 'S'), findings: [{ parts: ['Q9', 'Q2'] }] },
  },
});
