import { expect, it } from 'vitest';
import { smallHome } from '@/diagram/document/home';
import { heavySocketOnLightWay } from '@/diagram/rules/heavy-socket-on-light-way';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

const outlet = (rating: number | undefined, device: number, more: { pattern?: string } = {}) =>
  smallHome({ practice: 'IN' })
    .way('Q12', 'study', { rating: device }, { csa: 2.5 })
    .socket('X5', 'Q12', { rating, ...more });

testRule(heavySocketOnLightWay, {
  valid: {
    '16 A on 16 A': outlet(16, 16),
    '6 A on 6 A': outlet(6, 6),
    'a small outlet on a large device': outlet(6, 20),
    'an outlet without rating or pattern is not judged': outlet(undefined, 6),
  },
  invalid: {
    '16 A on 10 A': {
      drawing: outlet(16, 10),
      findings: [{ parts: ['X5', 'Q12'], severity: 'defect', message: /10 A.*16 A/ }],
    },
    // IS 1293:2019, 16 A pattern
    'by the pattern where the rating is not given': {
      drawing: outlet(undefined, 10, { pattern: 'IS1293-16' }),
      findings: [{ parts: ['X5', 'Q12'] }],
    },
    'two of them on one way are one finding': {
      drawing: outlet(16, 6).socket('X6', 'Q12', { rating: 16 }),
      findings: [{ parts: ['Q12', 'X5', 'X6'] }],
    },
  },
});

testRemedies(heavySocketOnLightWay, {
  'a larger device where the cable carries it': { drawing: outlet(16, 10), offers: ['Fit a device of 16 A'] },
  'none on a cable of 1.5 mm2 bunched': { drawing: outlet(16, 6).cable('k12', 1.5, 9, { method: 'A1' }), offers: [] },
});

it('names what it waits for', () =>
  expect(lacksOf(heavySocketOnLightWay, outlet(undefined, 6))).toEqual(['the rated current of X5']));
