import { expect, it } from 'vitest';
import { smallHome } from '@/diagram/document/home';
import { weakBreakingCapacity } from '@/diagram/rules/weak-breaking-capacity';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** A home near the transformer: prospective 1.1 x 230 V over the loop (IEC 60909-0, Cmax 1.1, from memory). */
const near = (zln: number, icn: number, fuse = 63, more: { ze?: number } = {}) =>
  smallHome({ supply: { zln, ze: 0.4, ...more } })
    .set('F1', { rating: fuse })
    .set('Q11', { icn });

testRule(weakBreakingCapacity, {
  valid: {
    'a small home': smallHome(),
    // 1.1 x 230 / 0.0843333 = 3000 A
    '3000 A at a breaker of 3000 A': near(253 / 3000, 3000),
    // 253 / 0.025 = 10.1 kA behind a gG fuse of 100 A: BS EN 61439-3 annex ZB, 16 kA conditional (from memory)
    '10 kA at a breaker of 6 kA behind a fuse of 100 A': near(0.025, 6000, 100),
    'without the loop of the supply nothing is judged': smallHome({ supply: { zln: undefined } }).set('Q11', {
      icn: 1500,
    }),
    'without a breaking capacity nothing is judged': near(0.01, 6000).set('Q11', { icn: undefined }),
  },
  invalid: {
    '3001 A at a breaker of 3000 A': {
      drawing: near(253 / 3001, 3000),
      findings: [{ parts: ['Q11'], severity: 'danger', conditions: ['mains'], message: /3001 A/ }],
    },
    'a breaker of 6 kA beyond 16 kA, whatever the fuse': {
      drawing: near(253 / 16001, 6000, 100),
      findings: [{ parts: ['Q11'] }],
    },
    'a breaker of 6 kA behind a fuse of more than 100 A': {
      drawing: near(0.025, 6000, 125),
      findings: [{ parts: ['Q11'] }],
      also: ['rcd-underrated'],
    },
    'all weak breakers of a home are one finding': {
      drawing: near(0.05, 3000).way('Q12', 'study', { icn: 4500 }).socket('X5', 'Q12'),
      findings: [{ parts: ['Q11', 'Q12'] }],
    },
    'the loop to earth may be the smaller one': {
      drawing: near(0.3, 3000, 63, { ze: 0.05 }),
      findings: [{ parts: ['Q11'], message: /5060 A/ }],
    },
  },
});

testRemedies(weakBreakingCapacity, {
  'breakers that break it': { drawing: near(0.05, 3000), offers: ['Fit a breaker of 6000 A breaking capacity'] },
});

it('names what it waits for', () => {
  expect(lacksOf(weakBreakingCapacity, smallHome({ supply: { zln: undefined } }))).toEqual([
    'the line-neutral loop of the supply',
  ]);
  expect(lacksOf(weakBreakingCapacity, smallHome().set('Q11', { icn: undefined }))).toEqual([
    'the breaking capacity of Q11',
  ]);
});
