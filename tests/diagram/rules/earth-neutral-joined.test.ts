import { backupHome, smallHome } from '@/diagram/document/home';
import { earthNeutralJoined } from '@/diagram/rules/earth-neutral-joined';
import { testRule } from '../rule-tester';

testRule(earthNeutralJoined, {
  valid: {
    'apart everywhere': smallHome(),
    'the joint inside the supply of TN-C-S': smallHome({ supply: { system: 'TN-C-S' } }),
    'the joint of TN-C-S drawn before the meter': smallHome({ supply: { system: 'TN-C-S' } }).earth('SUP:N', 'EB'),
    "an inverter's own bond on battery": backupHome({ bond: true }),
    'a surge arrester between them': smallHome(),
  },
  invalid: {
    'a link between the bars': {
      drawing: smallHome().neutral('NB', 'EB'),
      findings: [{ parts: ['NB', 'EB'], severity: 'danger' }],
    },
    'a link between the bars drawn as earth': {
      drawing: smallHome().earth('NB0', 'EB'),
      findings: [{ parts: ['NB0', 'EB'] }],
    },
    'a link behind an outlet': { drawing: smallHome().earth('X1:N', 'X1:E'), findings: [{ parts: ['X1'] }] },
    'a link in the home on TN-C-S': {
      drawing: smallHome({ supply: { system: 'TN-C-S' } }).neutral('NB', 'EB'),
      findings: [{ parts: ['NB', 'EB'] }],
    },
    'a link on TT': {
      drawing: smallHome({ supply: { system: 'TT', ra: 40 } }).neutral('NB', 'EB'),
      findings: [{ parts: ['NB', 'EB'] }],
    },
    'a link on the backup bar': {
      drawing: backupHome().neutral('NB2', 'EB'),
      findings: [{ parts: ['NB2', 'EB'], conditions: ['mains', 'outage', 'main-off'] }],
    },
  },
});
