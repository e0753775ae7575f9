import { backupHome, smallHome } from '@/diagram/document/home';
import { openLine } from '@/diagram/rules/open-line';
import { testRule } from '../rule-tester';

testRule(openLine, {
  valid: {
    'all fed': backupHome(),
    'a load on mains only is rightly dead in an outage': backupHome(),
    'a part joined to nothing is not a load without line': smallHome().part('lamp', 'E9', 'study', {
      watts: 9,
      class: 2,
    }),
    'an appliance on a lead that hangs': smallHome()
      .part('plug', 'PL1', 'study')
      .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 2 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl'),
    'a load behind a changeover: dead at 0 and in outage/A': smallHome()
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
  },
  invalid: {
    'a switch without its line': {
      drawing: smallHome().cut('JL11', 'S1'),
      findings: [{ parts: ['S1', 'E1'], severity: 'defect' }],
    },
    'a way that is not joined to the bar': {
      drawing: smallHome().cut('LB', 'Q11'),
      findings: [{ parts: ['Q11', 'E1', 'X1'] }],
    },
    'two lamps cut in two places': {
      drawing: smallHome().lamp('E7', 'S7', 'Q11').cut('S1', 'E1').cut('S7', 'E7'),
      findings: [{ parts: ['E1'] }, { parts: ['E7'] }],
      also: ['open-terminal'],
    },
    'a whole cable to a room missing': {
      drawing: smallHome().cut('Q11', 'JL11').cut('NB', 'JN11').cut('EB', 'JE11'),
      findings: [{ parts: ['JL11', 'E1', 'X1'] }],
      also: ['missing-earth'],
    },
    'backed up, and dead on mains': {
      drawing: backupHome().cut('Q3:2', 'G1:in.L'),
      findings: [{ parts: ['G1', 'E2', 'X2'], conditions: ['mains'] }],
      also: ['open-terminal'],
    },
    'mains and the input of the inverter starved by one gap': {
      drawing: backupHome().cut('Q1:2', 'LB0'),
      findings: [{ parts: ['LB', 'LB0', 'E1', 'X1', 'E2', 'X2'], message: /On mains E2 and X2/ }],
    },
    'a supply that is not joined to the meter': {
      drawing: smallHome().cut('SUP:L', 'F1:1'),
      findings: [{ parts: ['F1', 'E1', 'X1'] }],
    },
  },
});
