import { smallHome } from '@/diagram/document/home';
import { lineRoleMismatch } from '@/diagram/rules/line-role-mismatch';
import { testRule } from '../rule-tester';

testRule(lineRoleMismatch, {
  valid: {
    'every wire drawn as it is': smallHome().twoWay('E3', 'S3', 'S4', 'Q11'),
    'a switched line drawn as line': smallHome().cut('S1', 'E1').line('S1:2', 'E1:L', 'cE1'),
    'a dead wire is nothing': {
      drawing: smallHome().part('joint', 'J9', 'study').part('joint', 'J8', 'study').neutral('J9', 'J8'),
    },
    'the wires of a lamp the wrong way round are the finding of polarity': {
      drawing: smallHome().move('E1:L', 'S1:2', 'E1:N').move('E1:N', 'JN11', 'E1:L'),
      also: ['reversed-polarity'],
    },
  },
  invalid: {
    'a line drawn as neutral': {
      drawing: smallHome().cut('S1', 'E1').neutral('S1:2', 'E1:L', 'cE1'),
      findings: [{ parts: ['S1', 'E1'], severity: 'defect' }],
    },
    'an earth drawn as neutral': {
      drawing: smallHome().cut('JE11', 'X1').neutral('JE11', 'X1:E'),
      findings: [{ parts: ['JE11', 'X1'] }],
    },
    'a neutral drawn as line': {
      drawing: smallHome().cut('JN11', 'X1').line('JN11', 'X1:N'),
      findings: [{ parts: ['JN11', 'X1'] }],
    },
    'the two cores of a way drawn one as the other: two wires at one joint are one slip each': {
      drawing: smallHome()
        .cut('Q11', 'JL11')
        .cut('NB', 'JN11')
        .neutral('Q11:2', 'JL11', 'k11')
        .line('NB', 'JN11', 'k11'),
      findings: [{ parts: ['NB', 'JN11'] }, { parts: ['Q11', 'JL11'] }],
    },
  },
});
