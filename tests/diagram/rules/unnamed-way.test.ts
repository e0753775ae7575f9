import { smallHome } from '@/diagram/document/home';
import { unnamedWay } from '@/diagram/rules/unnamed-way';
import { testRule } from '../rule-tester';

testRule(unnamedWay, {
  valid: {
    'named ways; the service fuse is no way': smallHome(),
    'a spare breaker': smallHome()
      .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, spare: true })
      .line('LB', 'Q12:1'),
  },
  invalid: {
    'no label': {
      drawing: smallHome().set('Q11', { label: undefined }),
      findings: [{ parts: ['Q11'], severity: 'advice' }],
    },
    'a label of blanks': { drawing: smallHome().set('Q11', { label: '  ' }), findings: [{ parts: ['Q11'] }] },
  },
});
