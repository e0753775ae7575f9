import { backupHome, Home } from '@/diagram/document/home';
import { sharedBoxLines } from '@/diagram/rules/shared-box-lines';
import { testRule } from '../rule-tester';

const box = (options: ConstructorParameters<typeof Home>[0] = {}) =>
  new Home(options)
    .place('study', 'room', { name: 'Study' })
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'study')
    .lamp('E2', 'S2', 'Q12');

testRule(sharedBoxLines, {
  valid: {
    'two ways behind one rcd': box(),
    'one way': new Home({ rcd: false }).place('study').way('Q11', 'study').lamp('E1', 'S1', 'Q11'),
    'a mains and a backup way: the notice of two sources is for that': backupHome()
      .way('Q12', 'bedroom')
      .socket('X12', 'Q12'),
    'two ways in two rooms': new Home({ rcd: false })
      .place('study')
      .place('den')
      .way('Q11', 'study')
      .lamp('E1', 'S1', 'Q11')
      .way('Q12', 'den')
      .lamp('E2', 'S2', 'Q12'),
  },
  invalid: {
    'two ways with nothing but the main switch before both': {
      drawing: box({ rcd: false }),
      findings: [{ parts: ['Q11', 'Q12'], severity: 'advice', message: /Study/ }],
    },
  },
});
