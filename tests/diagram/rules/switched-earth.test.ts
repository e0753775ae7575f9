import { smallHome } from '@/diagram/document/home';
import { switchedEarth } from '@/diagram/rules/switched-earth';
import { testRule } from '../rule-tester';

testRule(switchedEarth, {
  valid: {
    'earth in one piece': smallHome(),
    'earth past a two-pole switch': smallHome().heater('E5', 'S5', 'Q11'),
  },
  invalid: {
    'a switch in the earth': {
      drawing: smallHome()
        .part('switch', 'S9', 'study')
        .cut('JE11', 'X1:E')
        .earth('JE11', 'S9:1')
        .earth('S9:2', 'X1:E'),
      findings: [{ parts: ['S9'], severity: 'danger' }],
    },
    'a fuse in the earth of a way': {
      drawing: smallHome()
        .part('fuse', 'F5', 'hall', { rating: 10 })
        .cut('EB', 'JE11')
        .earth('EB', 'F5:1')
        .earth('F5:2', 'JE11', 'k11'),
      findings: [{ parts: ['F5'] }],
    },
    'the earth of a lamp through the second pole of a switch': {
      drawing: smallHome()
        .part('switch-2pole', 'S9', 'study')
        .cut('JL11', 'S1:1')
        .cut('JE11', 'E1:E')
        .line('JL11', 'S9:1')
        .line('S9:2', 'S1:1')
        .earth('JE11', 'S9:3')
        .earth('S9:4', 'E1:E'),
      findings: [{ parts: ['S9'] }],
    },
    'the supply earth through a pole of the main switch': {
      drawing: smallHome()
        .part('isolator', 'Q9', 'hall', { poles: 1 })
        .cut('SUP:E', 'EB')
        .earth('SUP:E', 'Q9:1')
        .earth('Q9:2', 'EB'),
      findings: [{ parts: ['Q9'] }],
    },
  },
});
