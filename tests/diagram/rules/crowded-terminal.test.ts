import { smallHome } from '@/diagram/document/home';
import { crowdedTerminal } from '@/diagram/rules/crowded-terminal';
import { testRule } from '../rule-tester';

testRule(crowdedTerminal, {
  valid: {
    'two wires at an outlet': smallHome().socket('X2', 'Q11').cut('JL11', 'X2').line('X1:L', 'X2:L'),
    'many at a joint': smallHome().socket('X2', 'Q11').socket('X3', 'Q11').socket('X4', 'Q11'),
  },
  invalid: {
    'three at an outlet': {
      drawing: smallHome()
        .socket('X2', 'Q11')
        .socket('X3', 'Q11')
        .cut('JL11', 'X2')
        .cut('JL11', 'X3')
        .line('X1:L', 'X2:L')
        .line('X1:L', 'X3:L'),
      findings: [{ parts: ['X1'], severity: 'advice' }],
    },
    'three at a switch': {
      drawing: smallHome()
        .lamp('E7', 'S7', 'Q11')
        .lamp('E8', 'S8', 'Q11')
        .cut('JL11', 'S7')
        .cut('JL11', 'S8')
        .line('S1:1', 'S7:1')
        .line('S1:1', 'S8:1'),
      findings: [{ parts: ['S1'] }],
    },
  },
});
