import { noBatteryFuse } from '@/diagram/rules/no-battery-fuse';
import { backupHome } from '@/diagram/document/home';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

const bare = () => backupHome().drop('F2').wire('dc+', 'G2:+', 'G1:bat.+', 'kd');

testRule(noBatteryFuse, {
  valid: {
    'a dc fuse in the plus lead': backupHome(),
    'a breaker instead of a fuse': backupHome()
      .drop('F2')
      .part('mcb', 'F2', 'hall', { poles: 1, rating: 100, curve: 'C', icn: 6000 })
      .wire('dc+', 'G2:+', 'F2:1', 'kd')
      .wire('dc+', 'F2:2', 'G1:bat.+', 'kd'),
    'two in series, one fuse': backupHome()
      .part('battery', 'G3', 'hall', { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' })
      .cut('G2:-', 'G1:bat.-')
      .wire('dc-', 'G2:-', 'G3:+', 'kd')
      .wire('dc-', 'G3:-', 'G1:bat.-', 'kd'),
  },
  invalid: {
    'none at all': { drawing: bare(), findings: [{ parts: ['G2'], severity: 'danger' }] },
    'in the minus lead only': {
      drawing: bare()
        .cut('G2:-', 'G1:bat.-')
        .part('fuse', 'F3', 'hall', { rating: 100, standard: 'dc' })
        .wire('dc-', 'G2:-', 'F3:1', 'kd')
        .wire('dc-', 'F3:2', 'G1:bat.-', 'kd'),
      findings: [{ parts: ['G2'] }],
    },
    'far from the battery': {
      drawing: backupHome().cable('far', 35, 6).cut('G2:+', 'F2:1').wire('dc+', 'G2:+', 'F2:1', 'far'),
      findings: [{ parts: ['G2'] }],
      // Six metres lose too much, too.
      also: ['thin-battery-lead'],
    },
    'one of two in parallel has none': {
      drawing: backupHome()
        .part('battery', 'G3', 'hall', { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' })
        .wire('dc+', 'G3:+', 'G1:bat.+', 'kd')
        .wire('dc-', 'G3:-', 'G1:bat.-', 'kd'),
      findings: [{ parts: ['G3'] }],
    },
  },
});

testRemedies(noBatteryFuse, {
  // 78.4 A at full output and cutoff, a quarter more is 98 A
  'a fuse for the full current at its plus': { drawing: bare(), offers: ['Fit a dc fuse of 100 A at its plus'] },
});
