import { backupHome, smallHome } from '@/diagram/document/home';
import { openTerminal } from '@/diagram/rules/open-terminal';
import { testRule } from '../rule-tester';

testRule(openTerminal, {
  valid: {
    'wired whole': backupHome(),
    'a spare breaker': smallHome()
      .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, spare: true })
      .line('LB', 'Q12:1'),
    'a part joined to nothing is another rule': smallHome().part('switch', 'S9', 'study'),
    'E of a class 2 lamp': smallHome().set('E1', { class: 2 }).cut('JE11', 'E1'),
    'a two-pole switch of which one pole is used': smallHome()
      .part('switch-2pole', 'S9', 'study')
      .cut('JL11', 'S1')
      .line('JL11', 'S9:1')
      .line('S9:2', 'S1:1'),
    'a two-way switch used as a plain one': smallHome()
      .part('switch-2way', 'S9', 'study')
      .cut('JL11', 'S1')
      .line('JL11', 'S9:C')
      .line('S9:2', 'S1:1'),
    'the empty terminal before an open line is told there': {
      drawing: smallHome().cut('S1', 'E1'),
      also: ['open-line'],
    },
    'the empty terminal before an open neutral is told there': {
      drawing: smallHome().cut('Q2:4', 'NB'),
      also: ['open-neutral'],
    },
  },
  invalid: {
    'a breaker with nothing behind it': {
      drawing: smallHome()
        .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'x' })
        .line('LB', 'Q12:1'),
      findings: [{ parts: ['Q12'], severity: 'defect' }],
    },
    'a switch with one wire': {
      drawing: smallHome().part('switch', 'S9', 'study').line('JL11', 'S9:1'),
      findings: [{ parts: ['S9'] }],
    },
    'a battery without its minus': {
      drawing: backupHome().cut('G2:-', 'G1:bat.-'),
      findings: [{ parts: ['G1', 'G2'] }],
    },
    'a surge arrester without earth': {
      drawing: smallHome().cut('F9:E', 'EB'),
      findings: [{ parts: ['F9'] }],
      also: ['no-spd'],
    },
    'a cross switch with three wires': {
      drawing: smallHome()
        .twoWay('E3', 'S3', 'S4', 'Q11')
        .part('switch-cross', 'S5', 'study')
        .cut('S3:1', 'S4:1')
        .wire('strapper', 'S3:1', 'S5:1')
        .wire('strapper', 'S5:2', 'S4:1')
        .wire('strapper', 'S5:3', 'S3:2'),
      findings: [{ parts: ['S5'], message: /4/ }],
      also: ['two-way-miswired'],
    },
  },
});
