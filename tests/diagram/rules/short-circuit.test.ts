import { backupHome, smallHome } from '@/diagram/document/home';
import { shortCircuit } from '@/diagram/rules/short-circuit';
import { testRule } from '../rule-tester';

testRule(shortCircuit, {
  valid: {
    'a lamp between line and neutral': smallHome(),
    'neutral and earth joined is another matter': {
      drawing: smallHome().neutral('NB', 'EB'),
      also: ['earth-neutral-joined'],
    },
    'a switch that leads from line to line': {
      drawing: smallHome().part('switch', 'S9', 'study').line('JL11', 'S9:1').line('S9:2', 'JL11'),
      also: ['bypassed-contact'],
    },
  },
  invalid: {
    'a wire from bar to bar': {
      drawing: smallHome().line('LB', 'NB'),
      findings: [{ parts: ['LB', 'NB'], severity: 'danger' }],
    },
    'a joint of line and neutral in a room': {
      drawing: smallHome().line('JL11', 'JN11'),
      findings: [{ parts: ['JL11', 'JN11'] }],
    },
    'a switched line that goes to the neutral joint: it waits for the switch': {
      drawing: smallHome().part('switch', 'S9', 'study').line('JL11', 'S9:1').switched('S9:2', 'JN11'),
      findings: [{ parts: ['S9', 'JN11'] }],
    },
    'line on the earth contact of an outlet': {
      drawing: smallHome().line('JL11', 'X1:E'),
      findings: [{ parts: ['JL11', 'X1'], message: /earth/ }],
    },
    'a two-way pair in one position only': {
      drawing: smallHome().twoWay('E3', 'S3', 'S4', 'Q11').cut('S3:2', 'S4:2').wire('strapper', 'S3:2', 'JN11'),
      findings: [{ message: /one position/ }],
      also: ['two-way-miswired', 'open-terminal', 'line-role-mismatch'],
    },
    'on the backup side, in every condition': {
      drawing: backupHome().line('LB2', 'NB2'),
      findings: [{ parts: ['LB2', 'NB2'], conditions: ['mains', 'outage', 'main-off'] }],
    },
    'a battery with its poles joined': {
      drawing: backupHome().wire('dc+', 'G2:+', 'G2:-', 'kd'),
      findings: [{ parts: ['G2'] }],
      also: ['no-battery-fuse'],
    },
  },
});
