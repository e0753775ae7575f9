import { chargerOverload } from '@/diagram/rules/charger-overload';
import { backupHome } from '@/diagram/document/home';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

const flooded = (charge: number) =>
  backupHome({ charge })
    .set('G2', { chemistry: 'flooded' })
    .place('hall', 'intake', { name: 'Hall', ventilated: true });

testRule(chargerOverload, {
  valid: {
    'a tenth': backupHome(),
    'flooded, a fifth is the most': flooded(40),
    'a twentieth is the least': backupHome({ charge: 10 }),
    'an inverter that does not charge': backupHome({ charge: 0 }),
    'lithium takes half': backupHome({ charge: 100 }).set('G2', { chemistry: 'lfp' }),
    'two in parallel take twice': backupHome({ charge: 80 }).set('G2', { count: 2, arrangement: 'parallel' }),
  },
  invalid: {
    'flooded, above a fifth': { drawing: flooded(41), findings: [{ parts: ['G1'], severity: 'defect' }] },
    'never full': { drawing: backupHome({ charge: 9 }), findings: [{ parts: ['G1'] }] },
    'two in series take no more than one': {
      drawing: backupHome({ charge: 80, cutoff: 21 }).set('G2', { count: 2, arrangement: 'series' }),
      findings: [{ parts: ['G1'] }],
      // 80 A at 24 V is more than the inverter's way carries, too.
      also: ['overloaded-way'],
    },
  },
});

testRemedies(chargerOverload, {
  'a tenth of its Ah': { drawing: backupHome({ charge: 90 }), offers: ['Set the charger to 20 A'] },
});
