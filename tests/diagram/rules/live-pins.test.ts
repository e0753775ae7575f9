import { backupHome, smallHome } from '@/diagram/document/home';
import { livePins } from '@/diagram/rules/live-pins';
import { testRule } from '../rule-tester';

/** The inverter fed by plug PL1 in outlet X5 on the mains bar. */
const plugged = (ratings: Parameters<typeof backupHome>[0] = {}) =>
  backupHome(ratings)
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
    .earth('PL1:E', 'G1:in.E');

testRule(livePins, {
  valid: {
    'a plug fed only from its socket': smallHome()
      .part('plug', 'PL1', 'study', { in: 'X1' })
      .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 2 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl'),
    'a hanging plug of an appliance': smallHome()
      .part('plug', 'PL1', 'study')
      .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 2 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl'),
    'the input plug of an inverter whose loads return to it': plugged(),
    'the same without a bond: its neutral floats, but no load ties it to earth': {
      drawing: plugged({ bond: false }),
      also: ['no-earth-reference-on-backup'],
    },
  },
  invalid: {
    'a hanging plug wired to a live joint': {
      drawing: smallHome()
        .part('plug', 'PL1', 'study')
        .line('JL11', 'PL1:L')
        .neutral('JN11', 'PL1:N')
        .earth('JE11', 'PL1:E'),
      findings: [{ parts: ['PL1'], severity: 'danger', conditions: ['mains'] }],
    },
    'a plug in an outlet, live from the far side': {
      drawing: backupHome()
        .socket('X3', 'Q11')
        .part('plug', 'PL9', 'study', { in: 'X3' })
        .cable('k9', 1.5, 9)
        .line('Q4:2', 'PL9:L', 'k9')
        .neutral('Q4:4', 'PL9:N', 'k9')
        .earth('EB', 'PL9:E', 'k9'),
      findings: [{ parts: ['PL9'] }],
      also: ['backfeed'],
    },
    'a load that returns by the input plug of an inverter without bond': {
      drawing: plugged({ bond: false }).move('NB2', 'JN21', 'NB'),
      findings: [{ parts: ['PL1'], message: /through a load/, conditions: ['outage'] }],
      also: ['backup-neutral-lost', 'no-earth-reference-on-backup'],
    },
    'a load whose neutral hangs on a plug that is pulled': {
      drawing: smallHome()
        .part('plug', 'PL1', 'study')
        .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 2 })
        .line('JL11', 'E9:L')
        .neutral('E9:N', 'PL1:N'),
      findings: [{ parts: ['PL1'], message: /through a load/ }],
    },
  },
});
