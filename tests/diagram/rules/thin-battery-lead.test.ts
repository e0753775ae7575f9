import { thinBatteryLead } from '@/diagram/rules/thin-battery-lead';
import { backupHome } from '@/diagram/document/home';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

// 700 VA at 10.5 V and 0.85: 78.4 A; the fuse is 100 A; 25 mm2 by method C carries 112 A, 16 mm2 85 A.
testRule(thinBatteryLead, {
  valid: {
    '35 mm2, short': backupHome(),
    '25 mm2 carries it': backupHome().cable('kd', 25, 0.5),
  },
  invalid: {
    '16 mm2 carries the current but not the fuse': {
      drawing: backupHome().cable('kd', 16, 0.3),
      findings: [{ parts: ['G1'], severity: 'danger' }],
    },
    '10 mm2 carries neither': {
      drawing: backupHome().cable('kd', 10, 0.3),
      findings: [{ parts: ['G1'], message: /78\.4 A/ }],
    },
    'thick but long: more than 2 % lost': {
      // Three wires of 3 m in 35 mm2: 78.4 x 9 x 0.000627 = 0.44 V of 12 V.
      drawing: backupHome().cable('kd', 35, 3),
      findings: [{ parts: ['G1'], message: /3\.\d+ %/ }],
      also: ['no-battery-fuse'],
    },
    'more VA behind the same leads': {
      drawing: backupHome({ va: 2000, surge: 4000 }),
      findings: [{ parts: ['G1'] }],
    },
  },
});

testRemedies(thinBatteryLead, {
  'the size that carries current and fuse': {
    drawing: backupHome().cable('kd', 16, 0.3),
    offers: ['Fit leads of 25 mm2'],
  },
  'the size that loses little enough': { drawing: backupHome().cable('kd', 16, 0.8), offers: ['Fit leads of 25 mm2'] },
});
