import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { mixedFeeds } from '@/diagram/rules/mixed-feeds';
import { testRule } from '../rule-tester';

const twoWays = () =>
  new Home()
    .place('study')
    .place('den')
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'den')
    .lamp('E2', 'S2', 'Q12');

/** A ring of outlets: both ends on one device, as in Great Britain. */
const ring = () =>
  new Home({ practice: 'GB' })
    .place('den')
    .part('mcb', 'Q12', 'hall', { poles: 1, rating: 32, curve: 'B', icn: 6000, label: 'Ring' })
    .part('socket', 'X1', 'den', { rating: 13, pattern: 'BS1363', load: 500 })
    .part('socket', 'X2', 'den', { rating: 13, pattern: 'BS1363', load: 500 })
    .cable('a', 2.5, 12)
    .cable('b', 2.5, 6)
    .cable('c', 2.5, 12)
    .line('LB', 'Q12:1')
    .line('Q12:2', 'X1:L', 'a')
    .neutral('NB', 'X1:N', 'a')
    .earth('EB', 'X1:E', 'a')
    .line('X1:L', 'X2:L', 'b')
    .neutral('X1:N', 'X2:N', 'b')
    .earth('X1:E', 'X2:E', 'b')
    .line('X2:L', 'Q12:2', 'c')
    .neutral('X2:N', 'NB', 'c')
    .earth('X2:E', 'EB', 'c');

testRule(mixedFeeds, {
  valid: {
    'two ways apart': twoWays(),
    'a ring on one device': ring(),
    'devices one after the other': backupHome(),
    'a break-before-make changeover between the sources': smallHome()
      .backup()
      .place('shed')
      .part('changeover', 'Q8', 'hall', { poles: 2, rating: 16 })
      .part('mcb', 'Q31', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed, mains' })
      .part('mcb', 'Q32', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed, backup' })
      .part('socket', 'X8', 'shed', { rating: 6, load: 50 })
      .cable('k8', 1.5, 8)
      .line('LB', 'Q31:1')
      .line('Q31:2', 'Q8:A1')
      .neutral('NB', 'Q8:A3')
      .line('LB2', 'Q32:1')
      .line('Q32:2', 'Q8:B1')
      .neutral('NB2', 'Q8:B3')
      .line('Q8:2', 'X8:L', 'k8')
      .neutral('Q8:4', 'X8:N', 'k8')
      .earth('EB', 'X8:E', 'k8'),
  },
  invalid: {
    'two ways joined in a room': {
      drawing: twoWays().line('JL11', 'JL12'),
      findings: [{ parts: ['Q11', 'Q12', 'JL11', 'JL12'], severity: 'danger', conditions: ['mains'] }],
    },
    'two breakers on one cable': {
      drawing: smallHome()
        .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'too' })
        .line('LB', 'Q12:1')
        .line('Q12:2', 'JL11'),
      findings: [{ parts: ['Q11', 'Q12', 'JL11'] }],
      also: ['missing-data'],
    },
    'a wire past the breaker': {
      drawing: smallHome().line('LB', 'JL11'),
      findings: [{ message: /leads round/ }],
      also: ['undersized-cable', 'no-overcurrent', 'overloaded-way', 'slow-disconnection'],
    },
    'mains and backup joined in a switchboard': {
      drawing: backupHome().line('JL11', 'JL21'),
      findings: [{ severity: 'danger', conditions: ['mains'], message: /outage/ }],
      also: ['backfeed'],
    },
    'a two-way pair fed from two ways': {
      drawing: twoWays()
        .twoWay('E3', 'S3', 'S4', 'Q11')
        .cut('S4:C', 'E3:L')
        .line('JL12', 'S4:C')
        .switched('S4:1', 'E3:L'),
      findings: [{ message: /two-way/ }],
      also: ['two-way-miswired', 'permanent-feed'],
    },
    'an outlet lead between two ways': {
      drawing: twoWays()
        .socket('X1', 'Q11')
        .socket('X2', 'Q12')
        .part('plug', 'PL1', 'study', { in: 'X1' })
        .part('plug', 'PL2', 'study', { in: 'X2' })
        .cable('kl', 1.5, 3)
        .line('PL1:L', 'PL2:L', 'kl')
        .neutral('PL1:N', 'PL2:N', 'kl')
        .earth('PL1:E', 'PL2:E', 'kl'),
      findings: [{}],
      also: ['live-pins', 'borrowed-neutral'],
    },
  },
});
