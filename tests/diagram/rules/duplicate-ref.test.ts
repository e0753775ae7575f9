import { smallHome } from '@/diagram/document/home';
import { duplicateRef } from '@/diagram/rules/duplicate-ref';
import { testRule } from '../rule-tester';

testRule(duplicateRef, {
  valid: {
    'each its own': smallHome(),
    'parts without any': smallHome().set('E1', { ref: undefined }).set('S1', { ref: undefined }),
    'the same label': smallHome().set('E1', { label: 'desk' }).set('S1', { label: 'desk' }),
  },
  invalid: {
    'two parts': {
      drawing: smallHome().set('S1', { ref: 'Q11' }),
      findings: [{ parts: ['Q11', 'S1'], severity: 'defect' }],
    },
    'three parts are one finding': {
      drawing: smallHome().set('S1', { ref: 'A' }).set('E1', { ref: 'A' }).set('X1', { ref: 'A' }),
      findings: [{ parts: ['E1', 'S1', 'X1'] }],
    },
  },
});
