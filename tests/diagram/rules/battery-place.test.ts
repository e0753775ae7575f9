import { batteryPlace } from '@/diagram/rules/battery-place';
import { backupHome } from '@/diagram/document/home';
import { testRule } from '../rule-tester';

const standing = (
  id: string,
  kind: 'room' | 'passage' | 'outdoor',
  more: { sleeping?: boolean; ventilated?: boolean },
) => backupHome().place(id, kind, more).set('G2', { chemistry: 'flooded', place: id });

testRule(batteryPlace, {
  valid: {
    'sealed, anywhere': backupHome().set('G2', { place: 'bedroom' }),
    'flooded, ventilated': standing('stair', 'passage', { ventilated: true }),
    'flooded, outdoors': standing('yard', 'outdoor', {}),
  },
  invalid: {
    'flooded, where people sleep': {
      drawing: standing('nook', 'room', { sleeping: true, ventilated: true }),
      findings: [{ parts: ['G2'], severity: 'advice' }],
    },
    'flooded, not ventilated': {
      drawing: standing('cupboard', 'passage', { ventilated: false }),
      findings: [{ parts: ['G2'] }],
    },
  },
});
