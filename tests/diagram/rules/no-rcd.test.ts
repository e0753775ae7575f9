import { Home, smallHome } from '@/diagram/document/home';
import { noRcd } from '@/diagram/rules/no-rcd';
import { testRule } from '../rule-tester';

const lampsOnly = (options: ConstructorParameters<typeof Home>[0] = {}) =>
  new Home({ rcd: false, ...options }).place('study').way('Q11', 'study').lamp('E1', 'S1', 'Q11');

testRule(noRcd, {
  valid: {
    'outlets behind 30 mA': smallHome(),
    'lamps on TN without rcd, IEC': lampsOnly(),
    'a fixed appliance on TN': lampsOnly().heater('E5', 'S5', 'Q11'),
    'an outlet above 32 A': lampsOnly()
      .socket('X9', 'Q11', { rating: 63 })
      .set('Q11', { rating: 6 })
      .set('X9', { load: 100 })
      .drop('X9'),
    'TT behind 100 mA, 40 ohm, lamps only': lampsOnly({ rcd: { sensitivity: 0.1 }, supply: { system: 'TT', ra: 40 } }),
    'household lighting in Great Britain behind 30 mA': smallHome({ practice: 'GB' })
      .set('X1', { rating: 13, pattern: 'BS1363' })
      .set('Q11', { rating: 16 })
      .cable('k11', 2.5, 9),
  },
  invalid: {
    'an outlet without rcd': {
      drawing: smallHome({ rcd: false }),
      findings: [{ parts: ['Q11', 'X1'], severity: 'defect' }],
    },
    'an outlet behind 300 mA': {
      drawing: smallHome({ rcd: { sensitivity: 0.3 } }),
      findings: [{ parts: ['Q11', 'X1'] }],
    },
    'a lamp in a wet place': {
      drawing: new Home({ rcd: false }).place('bath', 'wet').way('Q11', 'bath').lamp('E1', 'S1', 'Q11'),
      findings: [{ parts: ['Q11', 'E1'], severity: 'danger' }],
    },
    'lighting in Great Britain': {
      drawing: lampsOnly({ practice: 'GB' }),
      findings: [{ parts: ['Q11', 'E1'], severity: 'defect' }],
    },
    'anything on TT': {
      drawing: lampsOnly({ supply: { system: 'TT', ra: 40 } })
        .cut('Q0:1', 'Q1')
        .cut('Q0:3', 'Q1')
        .drop('Q0')
        .line('Q1:2', 'LB0')
        .neutral('Q1:4', 'NB0'),
      findings: [{ severity: 'danger' }],
      also: ['slow-disconnection'],
    },
    'on TT an rcd too coarse for the electrode': {
      drawing: lampsOnly({ supply: { system: 'TT', ra: 400 } }),
      findings: [{ severity: 'danger', message: /125 mA/ }],
      also: ['slow-disconnection'],
    },
    'two ways, one finding': {
      drawing: smallHome({ rcd: false }).place('den').way('Q12', 'den').socket('X2', 'Q12'),
      findings: [{ parts: ['Q11', 'Q12', 'X1', 'X2'] }],
    },
  },
});
