import { shortAutonomy } from '@/diagram/rules/short-autonomy';
import { backupHome } from '@/diagram/document/home';
import { testRule } from '../rule-tester';

// 112 W at 0.85 from 12 V: 10.98 A; 200 Ah vrla aged to 160: 20 (160 / 219.6)^1.1 x 0.5 = 7.06 h.
testRule(shortAutonomy, {
  valid: {
    'no hours asked for': backupHome(),
    'just within': backupHome({ hoursWanted: 7 }),
    'twice the bank in parallel': backupHome({ hoursWanted: 12 }).set('G2', { count: 2, arrangement: 'parallel' }),
  },
  invalid: {
    'just above': {
      drawing: backupHome({ hoursWanted: 7.2 }),
      findings: [{ parts: ['G1'], severity: 'advice', conditions: ['outage'], message: /7\.1 h/ }],
    },
    'the hours at which the Ah are stated count': {
      // 10 (160 / 109.8)^1.1 x 0.5 = 7.56 h for C10 200 Ah: more, as 200 Ah at ten hours is the better battery.
      drawing: backupHome({ hoursWanted: 7.7 }).set('G2', { hours: 10 }),
      findings: [{ parts: ['G1'], message: /7\.6 h/ }],
    },
  },
});
