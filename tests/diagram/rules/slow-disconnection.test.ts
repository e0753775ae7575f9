import { expect, it } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import { slowDisconnection } from '@/diagram/rules/slow-disconnection';
import { lacksOf, testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

type Options = ConstructorParameters<typeof Home>[0];

/**
 * A fixed heater, 0 m from the joint, on a way without rcd. B16 must have 0.95 x 230 / 80 = 2.73125 ohm or less (printed
 * 2.73, BS 7671 Table 41.3). With Ze 0.4 ohm, 2.33125 ohm are left for line and earth of 1.5 mm2: 2 x 12.1 x 1.1965 =
 * 28.9553 mohm/m (IEC 60228, 70 degC), so 80.51 m.
 */
const heated = (metres: number, device: object = { rating: 16, curve: 'B' }, options: Options = { rcd: false }) =>
  new Home(options)
    .place('study')
    .way('Q12', 'study', device, { length: metres })
    .heater('E5', 'S5', 'Q12', { watts: 100 })
    .cable('cE5', 1.5, 0);

/** RA 0.05 ohm is no electrode but a buried grid: only so does a breaker alone clear a fault on TT. */
const onTt = (ra: number, device: object, rcd: boolean = false) =>
  heated(1, device, { rcd, supply: { system: 'TT', ra } })
    .drop('Q0')
    .line('Q1:2', 'LB0')
    .neutral('Q1:4', 'NB0');

testRule(slowDisconnection, {
  valid: {
    'a small home': smallHome(),
    'the limit itself, to the centimetre': heated(80.5),
    'the same run twice as long behind an rcd': heated(160, { rating: 16, curve: 'B' }, {}),
    // 1.16 ohm: C16 has 1.365 ohm at most
    'type C on a short run': heated(26, { rating: 16, curve: 'C' }),
    // distribution and fixed loads above 32 A may take 5 s: type D takes 10 In then, 0.95 x 230 / 400 = 0.546 ohm
    'a fixed load above 32 A in 5 s': {
      drawing: heated(5, { rating: 40, curve: 'D' }),
      also: ['undersized-cable', 'thin-earth'],
    },
    'without the loop of the supply nothing is judged': heated(500, {}, { rcd: false, supply: { ze: undefined } }),
    'a device of unknown type is not judged': heated(500, { rating: 16, curve: undefined }),
    'a class 2 lamp has no case': new Home({ rcd: false })
      .place('study')
      .way('Q12', 'study', {}, { length: 900 })
      .lamp('E1', 'S1', 'Q12', { class: 2, watts: 1 }),
    'on TT an rcd of 30 mA clears it': onTt(40, { rating: 16, curve: 'B' }, true),
  },
  invalid: {
    'a hand further': {
      drawing: heated(80.6),
      findings: [
        {
          parts: ['Q12', 'E5'],
          severity: 'danger',
          conditions: ['mains'],
          message: /2\.73 ohm.*2\.73 ohm is the most for 400 ms/,
        },
      ],
    },
    'type C at the run that type B clears': {
      drawing: heated(60, { rating: 16, curve: 'C' }),
      findings: [{ parts: ['Q12', 'E5'] }],
    },
    'a run outdoors that no cable core earths well': { drawing: heated(200), findings: [{ message: /A it takes/ }] },
    'an outlet by 0.4 s even at 40 A: 20 x 40 A of type D are never met': {
      drawing: heated(5, { rating: 40, curve: 'D' }).socket('X5', 'Q12'),
      findings: [{ parts: ['Q12', 'SUP'] }],
      also: ['undersized-cable', 'no-rcd'],
    },
    'several ways behind a poor supply are one finding': {
      drawing: heated(1, {}, { rcd: false, supply: { ze: 8 } })
        .way('Q13', 'study')
        .lamp('E1', 'S1', 'Q13'),
      findings: [{ parts: ['Q12', 'Q13', 'SUP'], message: /8 ohm/ }],
    },
    'on TT without rcd the electrode decides': {
      drawing: onTt(40, { rating: 6, curve: 'B' }),
      findings: [{ parts: ['Q12', 'XE'], severity: 'danger' }],
      also: ['no-rcd'],
    },
  },
});

testRemedies(slowDisconnection, {
  'type B where C is too slow': {
    drawing: heated(60, { rating: 16, curve: 'C' }),
    offers: ['Fit type B', 'Fit an rcbo of 30 mA, the neutral through it'],
  },
  'an rcbo alone where B is too slow as well': {
    drawing: heated(90),
    offers: ['Fit an rcbo of 30 mA, the neutral through it'],
  },
  'nothing for several ways behind a poor supply': {
    drawing: heated(1, {}, { rcd: false, supply: { ze: 8 } })
      .way('Q13', 'study')
      .lamp('E1', 'S1', 'Q13'),
    offers: [],
  },
});

it('names what it waits for', () => {
  expect(lacksOf(slowDisconnection, heated(1, {}, { rcd: false, supply: { ze: undefined } }))).toEqual([
    'the earth fault loop of the supply',
  ]);
  expect(lacksOf(slowDisconnection, heated(500, { rating: 16, curve: undefined }))).toEqual([
    'the type B, C or D of Q12',
  ]);
  expect(lacksOf(slowDisconnection, smallHome({ supply: { system: 'TT', ra: undefined } }))).toEqual([
    'the resistance of the earth electrode',
  ]);
});
