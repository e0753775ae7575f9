import { backupHome, smallHome } from '@/diagram/document/home';
import { backupNeutralLost } from '@/diagram/rules/backup-neutral-lost';
import { testRule } from '../rule-tester';

testRule(backupNeutralLost, {
  valid: {
    'each way its own neutral bar': backupHome(),
    'separate neutral, own bar': backupHome({ neutral: 'separate' }),
    'a backed-up load behind a changeover on mains need not reach the inverter': smallHome()
      .backup()
      .place('shed')
      .part('changeover', 'Q8', 'hall', { poles: 2, rating: 16 })
      .part('mcb', 'Q31', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed, mains' })
      .part('mcb', 'Q32', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed, backup' })
      .part('socket', 'X8', 'shed', { rating: 6, load: 50 })
      .cable('k8', 1.5, 8)
      .line('LB', 'Q31:1')
      .line('Q31:2', 'Q8:A1')
      .neutral('NB', 'Q8:A3')
      .line('LB2', 'Q32:1')
      .line('Q32:2', 'Q8:B1')
      .neutral('NB2', 'Q8:B3')
      .line('Q8:2', 'X8:L', 'k8')
      .neutral('Q8:4', 'X8:N', 'k8')
      .earth('EB', 'X8:E', 'k8'),
    'a mains load on the mains bar': backupHome(),
  },
  invalid: {
    'a neutral on the bar of the mains rcd': {
      drawing: backupHome().move('NB2', 'JN21', 'NB'),
      findings: [{ parts: ['E2', 'X2'], severity: 'danger', conditions: ['outage', 'main-off'] }],
    },
    'a neutral on the main bar, before all rcds: gone when the input breaker is off': {
      drawing: backupHome().move('NB2', 'JN21', 'NB0'),
      findings: [{ parts: ['E2', 'X2'] }],
    },
    'a separate neutral, one lamp on the mains bar': {
      drawing: backupHome({ neutral: 'separate' }).move('JN21', 'E2', 'JN11'),
      findings: [{ parts: ['E2'], conditions: ['outage', 'main-off'] }],
    },
    'through the plug of the inverter input': {
      drawing: backupHome()
        .part('plug', 'PL1', 'hall', { in: 'X5' })
        .part('socket', 'X5', 'hall', { rating: 10 })
        .cut('Q3:2', 'G1:in.L')
        .cut('Q3:4', 'G1:in.N')
        .cut('EB', 'G1:in.E')
        .move('LB0', 'Q3:1', 'LB')
        .move('NB0', 'Q3:3', 'NB')
        .line('Q3:2', 'X5:L')
        .neutral('Q3:4', 'X5:N')
        .earth('EB', 'X5:E')
        .line('PL1:L', 'G1:in.L')
        .neutral('PL1:N', 'G1:in.N')
        .earth('PL1:E', 'G1:in.E')
        .move('NB2', 'JN21', 'NB'),
      findings: [{ parts: ['E2', 'X2'], message: /PL1/ }],
    },
  },
});
