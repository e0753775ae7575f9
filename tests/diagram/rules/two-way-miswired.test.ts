import { Home, smallHome } from '@/diagram/document/home';
import { twoWayMiswired } from '@/diagram/rules/two-way-miswired';
import { testRule } from '../rule-tester';

const pair = () => smallHome().twoWay('E3', 'S3', 'S4', 'Q11');

/** Three places: a cross switch between the pair. */
const three = () =>
  pair()
    .part('switch-cross', 'S5', 'study', { rating: 6 })
    .cut('S3:1', 'S4:1')
    .cut('S3:2', 'S4:2')
    .wire('strapper', 'S3:1', 'S5:1')
    .wire('strapper', 'S3:2', 'S5:3')
    .wire('strapper', 'S5:2', 'S4:1')
    .wire('strapper', 'S5:4', 'S4:2');

const turned = (home: Home) =>
  home.cut('S3:1', 'S4:1').cut('S3:2', 'S4:2').wire('strapper', 'S3:1', 'S4:2').wire('strapper', 'S3:2', 'S4:1');

testRule(twoWayMiswired, {
  valid: {
    'a pair': pair(),
    'strappers changed over: only the levers read otherwise': turned(pair()),
    'three places with a cross switch': three(),
    'a two-way switch used as a plain one': smallHome()
      .part('switch-2way', 'S9', 'study')
      .part('lamp', 'E9', 'study', { watts: 9, pf: 1, class: 2 })
      .line('JL11', 'S9:C')
      .switched('S9:1', 'E9:L')
      .neutral('JN11', 'E9:N'),
    'a two-way switch that chooses between two lamps': smallHome()
      .part('switch-2way', 'S9', 'study')
      .part('lamp', 'E8', 'study', { watts: 9, pf: 1, class: 2 })
      .part('lamp', 'E9', 'study', { watts: 9, pf: 1, class: 2 })
      .line('JL11', 'S9:C')
      .switched('S9:1', 'E8:L')
      .switched('S9:2', 'E9:L')
      .neutral('JN11', 'E8:N')
      .neutral('JN11', 'E9:N'),
    'two pairs of one way': pair().twoWay('E6', 'S6', 'S7', 'Q11'),
    'a pair on a main switch of its own': pair()
      .part('switch', 'S9', 'study')
      .cut('JL11', 'S3')
      .line('JL11', 'S9:1')
      .line('S9:2', 'S3:C'),
  },
  invalid: {
    'line on a strapper terminal of the first': {
      drawing: pair().cut('JL11', 'S3').cut('S3:1', 'S4:1').line('JL11', 'S3:1').wire('strapper', 'S3:C', 'S4:1'),
      findings: [{ parts: ['S3', 'S4'], severity: 'defect' }],
    },
    'the lamp on a strapper terminal of the last': {
      drawing: pair().cut('S4:C', 'E3').cut('S3:1', 'S4:1').switched('S4:1', 'E3:L').wire('strapper', 'S3:1', 'S4:C'),
      findings: [{ parts: ['S3', 'S4'] }],
    },
    'one strapper missing': {
      drawing: pair().cut('S3:2', 'S4:2'),
      findings: [{ parts: ['S3', 'S4'] }],
      also: ['open-terminal'],
    },
    'both strappers joined': { drawing: pair().wire('strapper', 'S3:1', 'S3:2'), findings: [{ parts: ['S3', 'S4'] }] },
    'a cross switch with in and out mixed': {
      drawing: three()
        .cut('S3:2', 'S5')
        .cut('S5:2', 'S4')
        .wire('strapper', 'S3:2', 'S5:2')
        .wire('strapper', 'S5:3', 'S4:1'),
      findings: [{ parts: ['S3', 'S4', 'S5'] }],
    },
  },
});
