import { smallHome } from '@/diagram/document/home';
import { residualImbalance } from '@/diagram/rules/residual-imbalance';
import { testRule } from '../rule-tester';

testRule(residualImbalance, {
  valid: {
    'out and back through one rcd': smallHome(),
    'a class 2 load': smallHome().set('E1', { class: 2 }).cut('JE11', 'E1'),
    'two neutral bars behind one rcd, joined twice': smallHome()
      .part('neutral-bar', 'NB9', 'hall')
      .neutral('NB', 'NB9')
      .neutral('Q2:4', 'NB9'),
    'neutral and earth joined behind it is that rule': {
      drawing: smallHome().neutral('NB', 'EB'),
      also: ['earth-neutral-joined'],
    },
  },
  invalid: {
    'a way whose neutral goes round the rcd': {
      drawing: smallHome().socket('X2', 'Q11').cut('JN11', 'X2').neutral('NB0', 'X2:N', 'k11'),
      findings: [{ parts: ['Q2', 'X2'], severity: 'defect' }],
    },
    'every neutral past the rcd: one finding at the rcd': {
      drawing: smallHome().cut('Q2:3', 'NB0').cut('Q2:4', 'NB').neutral('NB0', 'NB'),
      findings: [{ parts: ['Q2'] }],
      also: ['open-terminal', 'no-rcd'],
    },
    'a link round the neutral pole of the rcd': {
      drawing: smallHome().neutral('NB0', 'NB'),
      findings: [{ parts: ['Q2', 'NB0', 'NB'] }],
    },
  },
});
