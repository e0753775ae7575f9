import { Home } from '@/diagram/document/home';
import { tooManyPoints } from '@/diagram/rules/too-many-points';
import { testRule } from '../rule-tester';

/** A way of so many lamps, and one of so many heavy outlets. Study note on Indian sub-circuits: 10 points or 800 W; 2 outlets or 3000 W. */
const lamps = (count: number, watts: number, practice: 'IN' | 'IEC' = 'IN') =>
  Array.from({ length: count }, (_, i) => i).reduce<Home>(
    (home, i) => home.lamp(`E${i}`, `S${i}`, 'Q11', { watts, pf: 1 }),
    new Home({ practice }).place('study').way('Q11', 'study'),
  );
const outlets = (count: number, load: number) =>
  Array.from({ length: count }, (_, i) => i).reduce<Home>(
    (home, i) => home.socket(`X${i}`, 'Q12', { rating: 16, load }),
    new Home({ practice: 'IN' }).place('study').way('Q12', 'study', { rating: 16 }, { csa: 4 }),
  );

testRule(tooManyPoints, {
  valid: {
    'ten lamps of 80 W: the limit itself': lamps(10, 80),
    'two heavy outlets of 1500 W: the limit itself': outlets(2, 1500),
    'eleven lamps where the practice has no limit': lamps(11, 10, 'IEC'),
    'small outlets alone are no way of lamps': Array.from({ length: 12 }, (_, i) => i).reduce<Home>(
      (home, i) => home.socket(`X${i}`, 'Q11', { rating: 6, load: 10 }),
      new Home({ practice: 'IN' }).place('study').way('Q11', 'study'),
    ),
  },
  invalid: {
    'eleven lamps': { drawing: lamps(11, 10), findings: [{ parts: ['Q11'], severity: 'advice' }] },
    'ten lamps of 81 W': { drawing: lamps(10, 81), findings: [{ parts: ['Q11'], message: /810 W/ }] },
    'ten lamps and a small outlet': { drawing: lamps(10, 10).socket('X9', 'Q11'), findings: [{ parts: ['Q11'] }] },
    'three heavy outlets': { drawing: outlets(3, 500), findings: [{ parts: ['Q12'] }] },
    'two heavy outlets of 1501 W': { drawing: outlets(2, 1501), findings: [{ parts: ['Q12'], message: /3002 W/ }] },
  },
});
