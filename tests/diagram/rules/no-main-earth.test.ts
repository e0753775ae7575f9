import { Drawing } from '@/diagram/document/builder';
import { smallHome } from '@/diagram/document/home';
import { noMainEarth } from '@/diagram/rules/no-main-earth';
import { testRule } from '../rule-tester';

const TT = { supply: { system: 'TT', ra: 40 } } as const;

testRule(noMainEarth, {
  valid: {
    'TN-S, bar on the supply earth': smallHome(),
    'TT, bar on an electrode': smallHome(TT),
    'TN-C-S, bar joined to the supply neutral before the meter': smallHome({ supply: { system: 'TN-C-S' } })
      .cut('SUP:E', 'EB')
      .earth('SUP:N', 'EB'),
    'a drawing that has only begun': new Drawing().place('hall', 'intake').part('supply', 'SUP', 'hall'),
    'bar on the supply through a joint': smallHome()
      .part('joint', 'JE', 'hall')
      .cut('SUP:E', 'EB')
      .earth('SUP:E', 'JE')
      .earth('JE', 'EB'),
  },
  invalid: {
    'bar joined to nothing, and not said again for each part': {
      drawing: smallHome().cut('SUP:E', 'EB'),
      findings: [{ parts: ['EB', 'SUP'], severity: 'danger' }],
      also: ['slow-disconnection'],
    },
    'TT, electrode not joined': { drawing: smallHome(TT).cut('XE:E', 'EB'), findings: [{ parts: ['EB', 'XE'] }] },
    'TT, no electrode': { drawing: smallHome(TT).drop('XE'), findings: [{ parts: ['EB'] }] },
    'no earth bar': {
      drawing: smallHome().drop('EB'),
      findings: [{ parts: ['SUP'] }],
      also: ['open-terminal', 'slow-disconnection', 'missing-earth'],
    },
    'TN with nothing but an electrode': {
      drawing: smallHome().cut('SUP:E', 'EB').part('electrode', 'XE', 'hall').earth('XE:E', 'EB'),
      findings: [{ parts: ['EB', 'SUP'] }],
      also: ['slow-disconnection'],
    },
  },
});
