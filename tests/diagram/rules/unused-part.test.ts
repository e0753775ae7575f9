import { smallHome } from '@/diagram/document/home';
import { unusedPart } from '@/diagram/rules/unused-part';
import { testRule } from '../rule-tester';

testRule(unusedPart, {
  valid: {
    'all joined': smallHome(),
    'a spare breaker': smallHome().part('mcb', 'Q12', 'hall', {
      poles: 1,
      rating: 6,
      curve: 'B',
      icn: 6000,
      spare: true,
    }),
  },
  invalid: {
    'a lamp in the air': {
      drawing: smallHome().part('lamp', 'E9', 'study', { watts: 9, class: 2 }),
      findings: [{ parts: ['E9'], severity: 'advice' }],
    },
    'a joint in the air': { drawing: smallHome().part('joint', 'J9', 'study'), findings: [{ parts: ['J9'] }] },
  },
});
