import { Home, smallHome } from '@/diagram/document/home';
import { rcdUnderrated } from '@/diagram/rules/rcd-underrated';
import { expect, it } from 'vitest';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** Ways of these ratings behind an rcd, behind a fuse of 63 A. */
const behind = (rating: number, ways: readonly number[]) =>
  ways.reduce<Home>(
    (home, each, i) =>
      home.way(`Q${11 + i}`, 'study', { rating: each }, { csa: 6 }).socket(`X${11 + i}`, `Q${11 + i}`, { rating: 6 }),
    new Home({ rcd: { rating } }).place('study'),
  );

testRule(rcdUnderrated, {
  valid: {
    'a small home': smallHome(),
    'as large as the device before it': behind(63, [32, 32, 32]),
    'as large as the ways after it together': behind(40, [16, 16, 8]),
    'a way without rating leaves it open': behind(25, [16, 16]).set('Q11', { rating: undefined }),
  },
  invalid: {
    'below both: 40 A, 63 A before, 41 A after': {
      drawing: behind(40, [16, 16, 9]),
      findings: [{ parts: ['Q2'], severity: 'defect', message: /40 A.*63 A.*41 A/ }],
    },
  },
});

testRemedies(rcdUnderrated, {
  'one that is large enough': { drawing: behind(40, [16, 16, 9]), offers: ['Fit an rcd of 50 A'] },
});

it('names what it waits for', () => {
  expect(lacksOf(rcdUnderrated, smallHome().set('Q2', { rating: undefined }))).toEqual(['the rated current of Q2']);
});
