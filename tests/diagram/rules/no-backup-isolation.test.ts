import { noBackupIsolation } from '@/diagram/rules/no-backup-isolation';
import { backupHome } from '@/diagram/document/home';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** The output breaker and its rcd taken out: the bars hang on the inverter. */
const bare = () =>
  backupHome()
    .way('Q22', 'bedroom', {}, { bars: '2' })
    .lamp('E3', 'S3', 'Q22')
    .drop('Q4')
    .drop('Q5')
    .line('G1:out.L', 'LB2')
    .neutral('G1:out.N', 'NB2');

testRule(noBackupIsolation, {
  valid: {
    'a two-pole breaker at the output': backupHome(),
    'an isolator alone, both poles': {
      drawing: backupHome()
        .drop('Q4')
        .part('isolator', 'Q4', 'hall', { poles: 2, rating: 25 })
        .line('G1:out.L', 'Q4:1')
        .neutral('G1:out.N', 'Q4:3')
        .line('Q4:2', 'Q5:1')
        .neutral('Q4:4', 'Q5:3'),
      also: ['no-overcurrent', 'rcd-underrated'],
    },
  },
  invalid: {
    'nothing between inverter and bars': {
      drawing: bare(),
      findings: [{ parts: ['G1'], severity: 'defect', conditions: ['outage', 'main-off'] }],
      also: ['rcd-idle-on-backup', 'no-overcurrent', 'slow-disconnection', 'no-rcd'],
    },
    'a single-pole breaker leaves the neutral': {
      drawing: bare()
        .part('mcb', 'Q4', 'hall', { poles: 1, rating: 6, curve: 'C', icn: 6000 })
        .cut('G1:out.L', 'LB2')
        .line('G1:out.L', 'Q4:1')
        .line('Q4:2', 'LB2'),
      findings: [{ parts: ['G1', 'Q4'] }],
      also: ['rcd-idle-on-backup', 'slow-disconnection', 'no-rcd'],
    },
  },
});

testRemedies(noBackupIsolation, {
  'two poles where one cuts the line alone': {
    drawing: backupHome()
      .drop('Q5')
      .set('Q4', { poles: 1 })
      .cut('G1:out.N', 'Q4:3')
      .line('Q4:2', 'LB2')
      .neutral('G1:out.N', 'NB2'),
    offers: ['Fit a two-pole breaker and lead the neutral through it'],
  },
});
