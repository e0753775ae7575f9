import { smallHome } from '@/diagram/document/home';
import { looseWire } from '@/diagram/rules/loose-wire';
import { testRule } from '../rule-tester';

testRule(looseWire, {
  valid: {
    'every end exists': smallHome(),
    'any number is a terminal of a bar': smallHome().neutral('NB:40', 'JN11:30'),
  },
  invalid: {
    'a part that is not there': {
      drawing: smallHome().line('JL11', 'GONE:1'),
      findings: [{ parts: ['JL11'], severity: 'defect' }],
    },
    'a terminal that is not there': {
      drawing: smallHome().line('JL11', 'S1:3'),
      findings: [{ parts: ['JL11', 'S1'] }],
    },
    'a terminal of a bar beyond its count': {
      drawing: smallHome().set('NB', { count: 4 }).neutral('NB:5', 'JN11'),
      findings: [{ parts: ['NB', 'JN11'] }],
    },
    'both ends': { drawing: smallHome().line('A:1', 'B:2'), findings: [{ parts: [] }] },
    'the second pole of a single-pole breaker': {
      drawing: smallHome().neutral('NB', 'Q11:3'),
      findings: [{ parts: ['NB', 'Q11'] }],
    },
  },
});
