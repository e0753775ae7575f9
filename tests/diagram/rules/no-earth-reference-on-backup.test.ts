import { backupHome, Home } from '@/diagram/document/home';
import { noEarthReferenceOnBackup } from '@/diagram/rules/no-earth-reference-on-backup';
import { testRule } from '../rule-tester';

const TT = { supply: { system: 'TT', ra: 40 } } as const;

testRule(noEarthReferenceOnBackup, {
  valid: {
    'an inverter with its bond': backupHome(),
    'a separate neutral with its bond': backupHome({ neutral: 'separate' }),
    'TT with bond': backupHome({}, TT),
    'no bond, but a main switch that leaves the neutral': {
      drawing: backupHome({ bond: false })
        .set('Q1', { poles: 1 })
        .cut('Q1:3', 'P1:3')
        .cut('Q1:4', 'NB0')
        .neutral('P1:3', 'NB0'),
      also: ['single-pole-main'],
    },
    'a bond to a case without earth is a missing earth': {
      drawing: backupHome().cut('EB', 'G1:in.E'),
      also: ['missing-earth'],
    },
    'an inverter that feeds nothing': new Home().backup({ bond: false }),
    'an inverter without battery is no source': {
      drawing: backupHome({ bond: false }).drop('G2').drop('F2'),
      also: ['open-terminal'],
    },
  },
  invalid: {
    'no bond: the two-pole main switch takes the earth away': {
      drawing: backupHome({ bond: false }),
      findings: [{ parts: ['G1'], severity: 'danger', conditions: ['main-off'] }],
    },
    'no bond and a separate neutral: in an outage too': {
      drawing: backupHome({ bond: false, neutral: 'separate' }),
      findings: [{ parts: ['G1'], conditions: ['outage', 'main-off'] }],
    },
    'TT, through neutral, no bond': {
      drawing: backupHome({ bond: false }, TT),
      findings: [{ conditions: ['main-off'] }],
    },
  },
});
