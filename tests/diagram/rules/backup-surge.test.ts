import { backupSurge } from '@/diagram/rules/backup-surge';
import { backupHome } from '@/diagram/document/home';
import { testRule } from '../rule-tester';

const withFan = (surge: number, inverter = {}) =>
  backupHome(inverter).fan('M1', 'S3', 'R1', 'Q21', { watts: 90, pf: 0.9, surge });

// Running 12 / 0.9 + 100 + 100 VA = 213.3 VA; the fan starts with 100 VA times its surge.
testRule(backupSurge, {
  valid: {
    'nothing starts above its running': backupHome({ surge: 120 }),
    'a start within the surge': withFan(6),
    'exactly at it': withFan(2, { surge: 12 / 0.9 + 100 + 200 }),
  },
  invalid: {
    'a start above it': {
      drawing: withFan(15),
      findings: [{ parts: ['G1', 'M1'], severity: 'advice', message: /1613 VA/ }],
    },
    'only the largest start counts, not all at once': {
      drawing: withFan(4, { surge: 500 }).fan('M2', 'S4', 'R2', 'Q21', { watts: 45, pf: 0.9, surge: 6 }),
      // Running 263.3, the larger start 100 x 3 more: 563.3, above 500; both together would be 813.
      findings: [{ parts: ['G1', 'M1'], message: /563 VA/ }],
    },
  },
});
