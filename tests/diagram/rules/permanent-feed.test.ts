import { smallHome } from '@/diagram/document/home';
import { permanentFeed } from '@/diagram/rules/permanent-feed';
import { testRule } from '../rule-tester';

testRule(permanentFeed, {
  valid: {
    'a lamp on a switch': smallHome(),
    'a fan on its regulator alone': smallHome()
      .fan('M1', 'S2', 'R2', 'Q11')
      .cut('JL11', 'S2')
      .cut('S2', 'R2')
      .drop('S2')
      .line('JL11', 'R2:1'),
    'an appliance and an outlet': smallHome()
      .part('appliance', 'E9', 'study', { watts: 20, pf: 1, class: 2, fixed: true })
      .line('JL11', 'E9:L')
      .neutral('JN11', 'E9:N'),
    'a lamp on a lead': smallHome()
      .part('plug', 'PL1', 'study', { in: 'X1' })
      .part('lamp', 'E9', 'study', { watts: 9, pf: 1, class: 2 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl'),
    'a bypassed switch is said at the switch': {
      drawing: smallHome().line('JL11', 'E1:L'),
      also: ['bypassed-contact'],
    },
    'a switch in the neutral is said at the switch': {
      drawing: smallHome()
        .cut('JL11', 'S1')
        .cut('S1', 'E1')
        .cut('JN11', 'E1')
        .line('JL11', 'E1:L')
        .neutral('JN11', 'S1:1')
        .neutral('S1:2', 'E1:N'),
      also: ['switched-neutral'],
    },
  },
  invalid: {
    'a lamp straight on its way': {
      drawing: smallHome().cut('JL11', 'S1').cut('S1', 'E1').drop('S1').line('JL11', 'E1:L', 'cE1'),
      findings: [{ parts: ['E1'], severity: 'defect' }],
    },
    'a fan': {
      drawing: smallHome()
        .part('fan', 'M1', 'study', { watts: 50, pf: 0.9, surge: 2, class: 2 })
        .line('JL11', 'M1:L')
        .neutral('JN11', 'M1:N'),
      findings: [{ parts: ['M1'] }],
    },
  },
});
