import { expect, it } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import { highDrop } from '@/diagram/rules/high-drop';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/**
 * An outlet of 2300 W, 10 A, at the end of 2.5 mm2. Copper of 2.5 mm2 has 7.41 ohm/km at 20 degC (IEC 60228) and
 * 1 + 0.00393 x 50 = 1.1965 times that at 70 degC: 17.73 mV/A/m for both legs. 5 % of 230 V are 11.5 V, lost over 64.85 m.
 */
const far = (metres: number, load = 2300) =>
  smallHome()
    .way('Q12', 'study', { rating: 16 }, { csa: 2.5, length: metres })
    .socket('X5', 'Q12', { rating: 16, load });

/** A lamp of 414 W at 0.9, 2 A, at the end of 1.5 mm2: 28.96 mV/A/m, and 3 % of 230 V, 6.9 V, are lost over 119.1 m. */
const dim = (metres: number) =>
  new Home()
    .place('study')
    .way('Q11', 'study', {}, { length: metres - 5 })
    .lamp('E1', 'S1', 'Q11', { watts: 414 });

testRule(highDrop, {
  valid: {
    'a small home': smallHome(),
    '5 % of an outlet, just held': far(64.8),
    // Over 100 m the limit rises by 0.005 % a metre: 119.6 m lose 3.012 % and may lose 3.098 % (Table G.52.1, note)
    '3 % of a lamp on a long run, just held': dim(119.6),
    'a load without watts is not judged': far(500)
      .set('X5', { load: undefined })
      .heater('E5', 'S5', 'Q12', { watts: undefined }),
  },
  invalid: {
    '5 % just passed': {
      drawing: far(64.9),
      findings: [{ parts: ['Q12', 'X5'], severity: 'defect', conditions: ['mains'], message: /5 %/ }],
    },
    'a lamp beyond 3 %': { drawing: dim(124), findings: [{ parts: ['Q11', 'E1'], message: /3\.12 %/ }] },
    'two outlets behind one long run are one finding': {
      drawing: far(80, 1150).socket('X6', 'Q12', { rating: 16, load: 1150 }),
      findings: [{ parts: ['Q12', 'X5'] }],
    },
    'half the load in half the length still adds up: the drop is that of the farthest': {
      drawing: far(60, 2000)
        .cable('k9', 2.5, 30)
        .part('socket', 'X6', 'study', { rating: 16, load: 1000 })
        .line('JL12', 'X6:L', 'k9')
        .neutral('JN12', 'X6:N', 'k9')
        .earth('JE12', 'X6:E', 'k9'),
      findings: [{ parts: ['Q12', 'X6'] }],
    },
  },
});

testRemedies(highDrop, { 'the next size in its place': { drawing: far(80), offers: ['Pull 4 mm2 in its place'] } });

it('waits for the cable of a run from place to place', () => {
  const home = far(10);
  const bare = new Home()
    .place('study')
    .part('socket', 'X9', 'study', { rating: 6, load: 50 })
    .part('mcb', 'Q12', 'hall', { rating: 6, curve: 'B', icn: 6000 })
    .line('LB', 'Q12:1')
    .line('Q12:2', 'X9:L')
    .neutral('NB', 'X9:N')
    .earth('EB', 'X9:E');
  expect(lacksOf(highDrop, home)).toEqual([]);
  expect(lacksOf(highDrop, bare)).toEqual([
    'the cable of the wire from Q12 to X9',
    'the cable of the wire from the neutral bar in Hall to X9',
  ]);
});
