import { backupHome, smallHome } from '@/diagram/document/home';
import { missingEarth } from '@/diagram/rules/missing-earth';
import { testRule } from '../rule-tester';

testRule(missingEarth, {
  valid: {
    'every case earthed': smallHome(),
    'a class 2 lamp': smallHome().cut('JE11', 'E1:E').set('E1', { class: 2 }),
    'a class 2 outlet': smallHome().cut('JE11', 'X1:E').set('X1', { class: 2 }),
    'an outlet earthed through the next outlet': smallHome()
      .socket('X9', 'Q11')
      .cut('JE11', 'X9:E')
      .earth('X1:E', 'X9:E'),
    'a second earth bar on the first': smallHome()
      .part('earth-bar', 'EB2', 'study')
      .cable('ke', 4, 9)
      .earth('EB', 'EB2', 'ke')
      .cut('JE11', 'X1:E')
      .earth('EB2', 'X1:E'),
    'a class 1 appliance on a lead': smallHome()
      .part('plug', 'PL1', 'study', { in: 'X1' })
      .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 1 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl')
      .earth('PL1:E', 'E9:E', 'kl'),
    'a class 1 appliance on a lead that hangs': smallHome()
      .part('plug', 'PL1', 'study')
      .part('appliance', 'E9', 'study', { watts: 60, pf: 1, class: 1 })
      .cable('kl', 1, 2)
      .line('PL1:L', 'E9:L', 'kl')
      .neutral('PL1:N', 'E9:N', 'kl')
      .earth('PL1:E', 'E9:E', 'kl'),
    'no main earth at all is one finding of its own': {
      drawing: smallHome().cut('SUP:E', 'EB'),
      also: ['no-main-earth', 'slow-disconnection'],
    },
  },
  invalid: {
    'the earth wire of an outlet': {
      drawing: smallHome().cut('JE11', 'X1:E'),
      findings: [{ parts: ['X1'], severity: 'danger' }],
    },
    'the earth core of a way: one finding for the parts behind': {
      drawing: smallHome().cut('EB', 'JE11'),
      findings: [{ parts: ['E1', 'X1', 'JE11'] }],
    },
    'two gaps are two findings': {
      drawing: smallHome().socket('X9', 'Q11').cut('JE11', 'X1:E').cut('JE11', 'X9:E'),
      findings: [{ parts: ['X1'] }, { parts: ['X9'] }],
    },
    'the inverter': { drawing: backupHome().cut('EB', 'G1:in.E'), findings: [{ parts: ['G1'] }] },
    'earth landed on the neutral bar': {
      drawing: smallHome().move('EB', 'JE11', 'NB'),
      findings: [{ parts: ['E1', 'X1', 'JE11'], message: /joined to the neutral/ }],
    },
    'earth and line of an outlet changed over: the case is live, said once': {
      drawing: smallHome().move('X1:L', 'JL11', 'X1:E').move('X1:E', 'JE11', 'X1:L'),
      findings: [{ parts: ['X1'], message: /joined to the line/ }],
    },
    'earth and neutral of an outlet changed over, said once': {
      drawing: smallHome().move('X1:N', 'JN11', 'X1:E').move('X1:E', 'JE11', 'X1:N'),
      findings: [{ parts: ['X1'], message: /joined to the neutral/ }],
    },
    'an earth wire that names a terminal which is not there': {
      drawing: smallHome().move('X1:E', 'JE11', 'X1:PE'),
      findings: [{ parts: ['X1'] }],
      also: ['loose-wire'],
    },
  },
});
