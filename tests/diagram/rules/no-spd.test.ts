import { Home, smallHome } from '@/diagram/document/home';
import { noSpd } from '@/diagram/rules/no-spd';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

testRule(noSpd, {
  valid: { 'an arrester at the origin': smallHome(), 'nothing is fed yet': new Home().drop('F9') },
  invalid: {
    'no arrester': {
      drawing: smallHome().drop('F9'),
      findings: [{ parts: ['Q1'], severity: 'advice', conditions: ['mains'] }],
    },
    'one whose line is not joined': {
      drawing: smallHome().cut('LB0', 'F9:L'),
      findings: [{}],
      also: ['open-terminal'],
    },
    'one without earth': { drawing: smallHome().cut('F9:E', 'EB'), findings: [{}], also: ['open-terminal'] },
  },
});

testRemedies(noSpd, {
  'an arrester behind the main switch': {
    drawing: smallHome().drop('F9'),
    offers: ['Fit a surge arrester behind the main switch'],
  },
  'none without an earth to lead it to': { drawing: smallHome().drop('F9').drop('EB'), offers: [] },
});
