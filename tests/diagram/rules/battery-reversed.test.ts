import { batteryReversed } from '@/diagram/rules/battery-reversed';
import { backupHome } from '@/diagram/document/home';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

const second = { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' } as const;

testRule(batteryReversed, {
  valid: {
    'plus to plus': backupHome(),
    'two in series, minus of the one to plus of the other': backupHome()
      .part('battery', 'G3', 'hall', second)
      .cut('G2:-', 'G1:bat.-')
      .wire('dc-', 'G2:-', 'G3:+', 'kd')
      .wire('dc-', 'G3:-', 'G1:bat.-', 'kd'),
  },
  invalid: {
    'both leads exchanged': {
      drawing: backupHome()
        .cut('G2:+', 'F2:1')
        .cut('G2:-', 'G1:bat.-')
        .wire('dc+', 'G2:-', 'F2:1', 'kd')
        .wire('dc-', 'G2:+', 'G1:bat.-', 'kd'),
      findings: [{ parts: ['G1', 'G2'], severity: 'danger' }],
    },
    'the second of a string turned': {
      drawing: backupHome()
        .part('battery', 'G3', 'hall', second)
        .cut('G2:-', 'G1:bat.-')
        .wire('dc-', 'G2:-', 'G3:-', 'kd')
        .wire('dc-', 'G3:+', 'G1:bat.-', 'kd'),
      findings: [{ parts: ['G1', 'G3'] }],
    },
  },
});

testRemedies(batteryReversed, {
  'exchanged at the inverter, where the fuse is at the battery as it should be': {
    drawing: backupHome()
      .cut('F2:2', 'G1:bat.+')
      .cut('G2:-', 'G1:bat.-')
      .wire('dc+', 'F2:2', 'G1:bat.-', 'kd')
      .wire('dc-', 'G2:-', 'G1:bat.+', 'kd'),
    offers: ['Exchange plus and minus at G1'],
  },
  'turned at the battery, where the fuse is at its minus': {
    drawing: backupHome()
      .cut('G2:+', 'F2:1')
      .cut('G2:-', 'G1:bat.-')
      .wire('dc+', 'G2:-', 'F2:1', 'kd')
      .wire('dc-', 'G2:+', 'G1:bat.-', 'kd'),
    offers: ['Turn G2 round'],
  },
  'one of a string by itself': {
    drawing: backupHome()
      .part('battery', 'G3', 'hall', second)
      .cut('G2:-', 'G1:bat.-')
      .wire('dc-', 'G2:-', 'G3:-', 'kd')
      .wire('dc-', 'G3:+', 'G1:bat.-', 'kd'),
    offers: ['Turn G3 round'],
  },
});
