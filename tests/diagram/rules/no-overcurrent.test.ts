import { backupHome, smallHome } from '@/diagram/document/home';
import { noOvercurrent } from '@/diagram/rules/no-overcurrent';
import { testRule } from '../rule-tester';

testRule(noOvercurrent, {
  valid: {
    'the service line before the fuse': smallHome(),
    'the wire from an inverter to its first device in the same place': backupHome(),
    'a way joined straight to the bar has the service fuse': {
      drawing: smallHome().cut('Q11:2', 'JL11').drop('Q11').line('LB', 'JL11', 'k11'),
      also: [
        'undersized-cable',
        'slow-disconnection',
        'overloaded-way',
        'heavy-socket-on-light-way',
        'thin-earth',
        'weak-breaking-capacity',
      ],
    },
  },
  invalid: {
    'no service fuse: the bar of the ways hangs on the service': {
      drawing: smallHome().cut('SUP:L', 'F1').cut('F1', 'P1').drop('F1').line('SUP:L', 'P1:1'),
      findings: [{ parts: ['SUP', 'LB0'], wires: [] }],
    },
    'a backup output straight on its bars and points': {
      drawing: backupHome()
        .drop('Q4')
        .line('G1:out.L', 'Q5:1')
        .neutral('G1:out.N', 'Q5:3')
        .cut('Q21:2', 'JL21')
        .drop('Q21')
        .line('LB2', 'JL21', 'k21'),
      findings: [{ parts: ['G1', 'E2', 'X2'], severity: 'danger', conditions: ['outage', 'main-off'] }],
      also: [
        'no-backup-isolation',
        'overloaded-way',
        'undersized-cable',
        'slow-disconnection',
        'heavy-socket-on-light-way',
        'thin-earth',
      ],
    },
    'a backup output that runs to a board elsewhere before its breaker': {
      drawing: backupHome()
        .place('loft')
        .set('G1', { place: 'loft' })
        .set('G2', { place: 'loft' })
        .set('F2', { place: 'loft' }),
      findings: [{ parts: ['G1'] }],
      also: ['no-backup-isolation'],
    },
    'an outlet on the service before the fuse': {
      drawing: smallHome()
        .part('socket', 'X9', 'hall', { rating: 16, load: 100 })
        .line('SUP:L', 'X9:L')
        .neutral('NB', 'X9:N')
        .earth('EB', 'X9:E'),
      findings: [{ parts: ['SUP', 'X9'] }],
      also: ['no-rcd', 'borrowed-neutral', 'residual-imbalance', 'no-main-switch'],
    },
  },
});
