import { Home, smallHome } from '@/diagram/document/home';
import { fusedNeutral } from '@/diagram/rules/fused-neutral';
import { testRule } from '../rule-tester';

const inNeutral = (home: Home, kind: 'fuse' | 'mcb') =>
  home
    .part(
      kind,
      'F5',
      'hall',
      kind === 'fuse' ? { rating: 10, standard: 'gG' } : { rating: 10, poles: 1, curve: 'B', icn: 6000 },
    )
    .cut('NB', 'JN11')
    .neutral('NB', 'F5:1')
    .neutral('F5:2', 'JN11', 'k11');

testRule(fusedNeutral, {
  valid: {
    'a fuse in the line': smallHome(),
    'a two-pole breaker': new Home()
      .place('study')
      .part('mcb', 'Q11', 'hall', { poles: 2, rating: 6, curve: 'B', icn: 6000, label: 'Study' })
      .cable('k', 1.5, 9)
      .part('socket', 'X1', 'study', { rating: 6, load: 100 })
      .line('LB', 'Q11:1')
      .neutral('NB', 'Q11:3')
      .line('Q11:2', 'X1:L', 'k')
      .neutral('Q11:4', 'X1:N', 'k')
      .earth('EB', 'X1:E', 'k'),
    'the poles of an rcd': smallHome(),
    'a whole home with supply line and neutral changed over is reversed polarity': {
      drawing: smallHome().move('F1:1', 'SUP:L', 'P1:2').move('P1:2', 'SUP:N', 'F1:1'),
      also: ['reversed-polarity'],
    },
  },
  invalid: {
    'a fuse in the neutral of a way': {
      drawing: inNeutral(smallHome(), 'fuse'),
      findings: [{ parts: ['F5'], severity: 'danger' }],
    },
    'a single-pole breaker in the neutral of a way': {
      drawing: inNeutral(smallHome(), 'mcb'),
      findings: [{ parts: ['F5'] }],
    },
    'two fuses one after the other are two findings': {
      drawing: inNeutral(smallHome(), 'fuse')
        .part('fuse', 'F2', 'hall', { rating: 63, standard: 'gG' })
        .cut('SUP:N', 'P1:2')
        .neutral('SUP:N', 'F2:1')
        .neutral('F2:2', 'P1:2'),
      findings: [{ parts: ['F2'] }, { parts: ['F5'] }],
    },
    'a fuse in the supply neutral': {
      drawing: smallHome()
        .part('fuse', 'F2', 'hall', { rating: 63, standard: 'gG' })
        .cut('SUP:N', 'P1:2')
        .neutral('SUP:N', 'F2:1')
        .neutral('F2:2', 'P1:2'),
      findings: [{ parts: ['F2'] }],
    },
  },
});
