import { backupHome } from '@/diagram/document/home';
import { rcdIdleOnBackup } from '@/diagram/rules/rcd-idle-on-backup';
import { testRule } from '../rule-tester';

/** The backup output straight on its bars; the inverter fed from behind the rcd of the mains. */
const behindMainsRcd = (home = backupHome()) =>
  home.drop('Q5').line('Q4:2', 'LB2').neutral('Q4:4', 'NB2').move('LB0', 'Q3:1', 'LB').move('NB0', 'Q3:3', 'NB');

testRule(rcdIdleOnBackup, {
  valid: {
    'an rcd in the backup output': backupHome(),
    'only lamps on battery, TN, IEC': behindMainsRcd().drop('X2'),
    'an rcbo at the way': behindMainsRcd()
      .drop('Q21')
      .part('rcbo', 'Q22', 'hall', {
        poles: 1,
        rating: 6,
        curve: 'B',
        icn: 6000,
        sensitivity: 0.03,
        type: 'A',
        label: 'Bedroom',
      })
      .line('LB2', 'Q22:1')
      .neutral('NB2', 'Q22:3')
      .line('Q22:2', 'JL21', 'k21')
      .cut('NB2', 'JN21')
      .neutral('Q22:4', 'JN21', 'k21'),
  },
  invalid: {
    'an outlet whose rcd stands before the inverter': {
      drawing: behindMainsRcd(),
      findings: [{ parts: ['G1', 'Q21', 'X2'], severity: 'danger', conditions: ['outage', 'main-off'] }],
    },
    'lamps on battery on TT: a defect': {
      drawing: behindMainsRcd(backupHome({}, { supply: { system: 'TT', ra: 40 } })).drop('X2'),
      findings: [{ severity: 'defect' }],
      also: ['slow-disconnection'],
    },
    'an rcd of 300 mA serves no outlet': {
      drawing: backupHome().set('Q5', { sensitivity: 0.3 }),
      findings: [{ severity: 'danger' }],
      also: ['no-rcd'],
    },
    'household lighting in Great Britain': {
      drawing: behindMainsRcd(backupHome({}, { practice: 'GB' })).drop('X2'),
      findings: [{ parts: ['G1', 'Q21', 'E2'], severity: 'defect' }],
    },
  },
});
