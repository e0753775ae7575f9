import { backupOverload } from '@/diagram/rules/backup-overload';
import { backupHome } from '@/diagram/document/home';
import { testRule } from '../rule-tester';

// What runs on battery in backupHome(): lamp E2 12 W at 0.9 and outlet X2 100 W: 112 W, 113.3 VA.
testRule(backupOverload, {
  valid: {
    'well within': backupHome(),
    'exactly the running VA': backupHome({ va: 12 / 0.9 + 100, surge: 1400 }),
    'a load on the mains only does not count': backupHome().heater('E9', 'S9', 'Q11', { watts: 500 }),
  },
  invalid: {
    'a little below the running VA': {
      drawing: backupHome({ va: 113 }),
      findings: [{ parts: ['G1'], conditions: ['outage'] }],
    },
    'VA above, watts below': {
      drawing: backupHome({ va: 112.5 }),
      findings: [{ parts: ['G1'], severity: 'defect' }],
    },
    'one kettle too many': {
      drawing: backupHome().set('X2', { load: 1000 }),
      findings: [{ parts: ['G1'], message: /1012 W/ }],
    },
  },
});
