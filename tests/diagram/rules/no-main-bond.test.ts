import { smallHome } from '@/diagram/document/home';
import { noMainBond } from '@/diagram/rules/no-main-bond';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

const pipe = () => smallHome().part('bond', 'BW', 'hall', { to: 'water' });
const bonded = () => pipe().cable('kb', 10, 4, { cores: 1 }).earth('EB', 'BW:E', 'kb');

testRule(noMainBond, {
  valid: {
    'a small home without any pipe': smallHome(),
    'a pipe on the earth bar': bonded(),
    'a second pipe through the first': bonded().part('bond', 'BG', 'hall', { to: 'gas' }).earth('BW:E', 'BG:E', 'kb'),
    'a home without main earth is that rule: the pipe hangs on its bar': {
      drawing: bonded().cut('SUP:E', 'EB'),
      also: ['no-main-earth'],
    },
  },
  invalid: {
    'a pipe joined to nothing': { drawing: pipe(), findings: [{ parts: ['BW'], severity: 'defect' }] },
    'a pipe joined to the neutral bar is not bonded': {
      drawing: pipe().cable('kb', 10, 4).earth('NB0', 'BW:E', 'kb'),
      findings: [{ parts: ['BW'] }],
      also: ['line-role-mismatch', 'earth-neutral-joined'],
    },
    'each pipe by itself': {
      drawing: pipe().part('bond', 'BG', 'hall', { to: 'gas' }),
      findings: [{ parts: ['BG'] }, { parts: ['BW'] }],
    },
  },
});

testRemedies(noMainBond, {
  'a bonding conductor': { drawing: pipe(), offers: ['Bond it to the earth bar with 10 mm2'] },
});
