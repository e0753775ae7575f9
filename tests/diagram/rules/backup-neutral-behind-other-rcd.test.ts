import { backupHome } from '@/diagram/document/home';
import { backupNeutralBehindOtherRcd } from '@/diagram/rules/backup-neutral-behind-other-rcd';
import { testRule } from '../rule-tester';

testRule(backupNeutralBehindOtherRcd, {
  valid: {
    'both inside one rcd': backupHome(),
    'both outside': {
      drawing: backupHome().cut('Q5:1', 'Q4').cut('Q5:3', 'Q4').drop('Q5').line('Q4:2', 'LB2').neutral('Q4:4', 'NB2'),
      also: ['rcd-idle-on-backup', 'no-rcd'],
    },
    'a neutral that is lost with the other rcd: the stronger rule says it': {
      drawing: backupHome().move('NB2', 'JN21', 'NB'),
      also: ['backup-neutral-lost'],
    },
  },
  invalid: {
    'line through the backup rcd, neutral past it': {
      drawing: backupHome().cut('NB2', 'JN21').neutral('Q4:4', 'JN21', 'k21'),
      findings: [{ parts: ['Q5'], severity: 'defect', conditions: ['outage', 'main-off'] }],
      also: ['no-rcd'],
    },
    'one outlet of the way past it': {
      drawing: backupHome().cut('JN21', 'X2').neutral('Q4:4', 'X2:N', 'k21'),
      findings: [{ parts: ['X2'] }],
    },
    'the neutral bars of mains and backup joined': {
      drawing: backupHome().neutral('NB', 'NB2'),
      findings: [{ parts: ['NB', 'NB2'] }],
    },
  },
});
