import { smallHome } from '@/diagram/document/home';
import { bypassedContact } from '@/diagram/rules/bypassed-contact';
import { testRule } from '../rule-tester';

testRule(bypassedContact, {
  valid: {
    'a switch in its line': smallHome(),
    'two switches side by side: each still works': smallHome()
      .part('switch', 'S9', 'study')
      .line('JL11', 'S9:1')
      .switched('S9:2', 'S1:2'),
    'the line pole of a two-pole switch: it then opens the neutral alone': {
      drawing: smallHome().heater('E5', 'S5', 'Q11').line('S5:1', 'S5:2'),
      also: ['switched-neutral'],
    },
    'a two-way pair': smallHome().twoWay('E3', 'S3', 'S4', 'Q11'),
  },
  invalid: {
    'a wire past the switch': {
      drawing: smallHome().line('S1:1', 'S1:2'),
      findings: [{ parts: ['S1'], severity: 'defect' }],
    },
    'a wire from the joint to the lamp as well': {
      drawing: smallHome().line('JL11', 'E1:L'),
      findings: [{ parts: ['S1'] }],
    },
    'the neutral pole of a two-pole switch': {
      drawing: smallHome().heater('E5', 'S5', 'Q11').neutral('S5:3', 'S5:4'),
      findings: [{ parts: ['S5'] }],
    },
    'a regulator': {
      drawing: smallHome().fan('M1', 'S2', 'R2', 'Q11').switched('R2:1', 'R2:2'),
      findings: [{ parts: ['R2'] }],
    },
    'the common and a strapper of a two-way switch': {
      drawing: smallHome().twoWay('E3', 'S3', 'S4', 'Q11').line('S3:C', 'S3:1'),
      findings: [{ parts: ['S3'] }],
    },
  },
});
