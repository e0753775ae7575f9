import { backupHome, smallHome } from '@/diagram/document/home';
import { liveAfterMainOff } from '@/diagram/rules/live-after-main-off';
import { testRule } from '../rule-tester';

testRule(liveAfterMainOff, {
  valid: {
    'a home without backup': smallHome(),
    'an inverter that feeds nothing': smallHome().backup(),
    'an inverter that is switched off': backupHome({ state: 'off' }),
  },
  invalid: {
    'a backed-up way': {
      drawing: backupHome(),
      findings: [{ parts: ['G1', 'Q21', 'X2'], severity: 'advice', conditions: ['main-off'], message: /Bedroom/ }],
    },
  },
});
