import { backupHome, smallHome } from '@/diagram/document/home';
import { reversedPolarity } from '@/diagram/rules/reversed-polarity';
import { testRule } from '../rule-tester';

const swapPoint = <T extends ReturnType<typeof smallHome>>(home: T, id: string, line: string, neutral: string) =>
  home.move(`${id}:L`, line, `${id}:N`).move(`${id}:N`, neutral, `${id}:L`);

testRule(reversedPolarity, {
  valid: {
    'all right': smallHome(),
    'both poles of an rcd changed over, and back again behind it': smallHome()
      .move('Q2:1', 'LB0', 'Q2:3')
      .move('Q2:3', 'NB0', 'Q2:1')
      .move('Q2:2', 'LB', 'Q2:4')
      .move('Q2:4', 'NB', 'Q2:2'),
    'a lamp that is not fed': {
      drawing: swapPoint(smallHome(), 'E1', 'S1:2', 'JN11').cut('JL11', 'S1:1'),
      also: ['open-line'],
    },
  },
  invalid: {
    'a lamp': {
      drawing: swapPoint(smallHome(), 'E1', 'S1:2', 'JN11'),
      findings: [{ parts: ['E1'], severity: 'danger', conditions: ['mains'] }],
    },
    'an outlet': { drawing: swapPoint(smallHome(), 'X1', 'JL11', 'JN11'), findings: [{ parts: ['X1'] }] },
    'an outlet on the backup way': {
      drawing: swapPoint(backupHome(), 'X2', 'JL21', 'JN21'),
      findings: [{ parts: ['X2'], conditions: ['mains', 'outage', 'main-off'] }],
    },
    'a way changed over at its joints: one finding for all its points': {
      drawing: smallHome().move('JL11:1', 'Q11:2', 'JN11:9').move('JN11:1', 'NB', 'JL11:9'),
      findings: [{ parts: ['E1', 'X1'] }],
    },
    'the supply changed over: one finding for the home': {
      drawing: smallHome().move('F1:1', 'SUP:L', 'P1:2').move('P1:2', 'SUP:N', 'F1:1'),
      findings: [{ parts: ['E1', 'X1'] }],
    },
    'the input of an inverter changed over: wrong on mains only': {
      drawing: backupHome().move('G1:in.L', 'Q3:2', 'G1:in.N').move('G1:in.N', 'Q3:4', 'G1:in.L'),
      findings: [{ parts: ['E2', 'X2'], conditions: ['mains'] }],
      also: [
        'backup-neutral-lost',
        'no-earth-reference-on-backup',
        'backfeed',
        'short-circuit',
        'live-pins',
        'rcd-idle-on-backup',
      ],
    },
    'an appliance on a lead with the cores changed over': {
      drawing: smallHome()
        .part('plug', 'PL1', 'study', { in: 'X1' })
        .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 2 })
        .cable('kl', 1, 2)
        .line('PL1:L', 'E9:N', 'kl')
        .neutral('PL1:N', 'E9:L', 'kl'),
      findings: [{ parts: ['E9'] }],
      also: ['open-terminal'],
    },
  },
});
