import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { openNeutral } from '@/diagram/rules/open-neutral';
import { testRule } from '../rule-tester';

const sixLamps = () => {
  const home = new Home().place('study').way('Q11', 'study');
  for (let i = 1; i <= 6; i++) home.lamp(`E${i}`, `S${i}`, 'Q11');
  return home;
};

testRule(openNeutral, {
  valid: {
    'all neutrals there': sixLamps(),
    'no line either: that is open-line': {
      drawing: smallHome().cut('JN11', 'E1').cut('JL11', 'S1'),
      also: ['open-line'],
    },
    'an appliance on a lead that hangs': smallHome()
      .part('plug', 'PL1', 'study')
      .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 2 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl'),
    'neutral lost on battery only: backup-neutral-lost': {
      drawing: backupHome({ neutral: 'separate' }).move('NB2', 'JN21', 'NB0'),
      also: ['backup-neutral-lost', 'residual-imbalance'],
    },
  },
  invalid: {
    'the neutral of a way: one finding, not six': {
      drawing: sixLamps().cut('NB', 'JN11'),
      findings: [{ parts: ['JN11', 'E1', 'E2', 'E3', 'E4', 'E5', 'E6'], severity: 'defect' }],
    },
    'the neutral of one lamp': { drawing: smallHome().cut('JN11', 'E1'), findings: [{ parts: ['E1'], wires: [] }] },
    'the supply neutral': { drawing: smallHome().cut('SUP:N', 'P1:2'), findings: [{ parts: ['P1', 'E1', 'X1'] }] },
    'the neutral behind an rcd': { drawing: smallHome().cut('Q2:4', 'NB'), findings: [{ parts: ['NB', 'E1', 'X1'] }] },
    'a neutral wire that names a missing terminal': {
      drawing: smallHome().move('E1:N', 'JN11', 'E1:7'),
      findings: [{ parts: ['E1'] }],
      also: ['loose-wire'],
    },
    'a neutral that goes to the earth bar': {
      drawing: smallHome().move('NB', 'JN11', 'EB'),
      findings: [{ parts: ['JN11', 'E1', 'X1'], severity: 'danger', message: /earth/ }],
    },
    'the neutral to the input of an inverter, on mains only': {
      drawing: backupHome().cut('Q3:4', 'G1:in.N'),
      findings: [{ parts: ['G1', 'E2', 'X2'], conditions: ['mains'] }],
      also: ['no-earth-reference-on-backup'],
    },
  },
});
