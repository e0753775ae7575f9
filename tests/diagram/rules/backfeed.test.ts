import { backupHome, smallHome } from '@/diagram/document/home';
import { backfeed } from '@/diagram/rules/backfeed';
import { testRule } from '../rule-tester';

const changeover = (poles: 1 | 2) =>
  smallHome()
    .backup()
    .place('shed')
    .part('changeover', 'Q8', 'hall', { poles, rating: 16 })
    .part('mcb', 'Q31', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed, mains' })
    .part('mcb', 'Q32', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed, backup' })
    .part('socket', 'X8', 'shed', { rating: 6, load: 50 })
    .cable('k8', 1.5, 8)
    .line('LB', 'Q31:1')
    .line('Q31:2', 'Q8:A1')
    .line('LB2', 'Q32:1')
    .line('Q32:2', 'Q8:B1')
    .line('Q8:2', 'X8:L', 'k8')
    .earth('EB', 'X8:E', 'k8');

const lead = () =>
  backupHome()
    .socket('X3', 'Q11')
    .part('plug', 'PL9', 'study', { in: 'X3' })
    .cable('k9', 1.5, 9)
    .line('Q4:2', 'PL9:L', 'k9')
    .neutral('Q4:4', 'PL9:N', 'k9')
    .earth('EB', 'PL9:E', 'k9');

testRule(backfeed, {
  valid: {
    'a backup source that ends at its own ways': backupHome(),
    'a two-pole changeover that excludes it': changeover(2)
      .neutral('NB', 'Q8:A3')
      .neutral('NB2', 'Q8:B3')
      .neutral('Q8:4', 'X8:N', 'k8'),
    'an inverter fed by a plug in a mains outlet': backupHome()
      .part('plug', 'PL1', 'hall', { in: 'X5' })
      .part('socket', 'X5', 'hall', { rating: 10 })
      .cut('Q3:2', 'G1:in.L')
      .cut('Q3:4', 'G1:in.N')
      .cut('EB', 'G1:in.E')
      .line('Q3:2', 'X5:L')
      .neutral('Q3:4', 'X5:N')
      .earth('EB', 'X5:E')
      .line('PL1:L', 'G1:in.L')
      .neutral('PL1:N', 'G1:in.N')
      .earth('PL1:E', 'G1:in.E')
      .move('LB0', 'Q3:1', 'LB')
      .move('NB0', 'Q3:3', 'NB'),
  },
  invalid: {
    'a lead from the backup output in a mains outlet': {
      drawing: lead(),
      findings: [{ parts: ['G1', 'PL9', 'X3'], severity: 'danger', conditions: ['outage'] }],
      also: ['live-pins'],
    },
    'mains and backup ways joined in a switchboard': {
      drawing: backupHome().line('JL11', 'JL21'),
      findings: [{ parts: ['G1'], conditions: ['outage'] }],
      also: ['mixed-feeds'],
    },
    'the bars joined': {
      drawing: backupHome().line('LB', 'LB2'),
      findings: [{ parts: ['G1'] }],
      also: ['mixed-feeds'],
    },
    'before the main switch: in both conditions': {
      drawing: backupHome().line('P1:4', 'LB2'),
      findings: [{ conditions: ['outage', 'main-off'] }],
      also: ['mixed-feeds'],
    },
    'through a switch that only joins them when it is on': {
      drawing: backupHome().part('switch', 'S9', 'hall').line('LB', 'S9:1').line('LB2', 'S9:2'),
      findings: [{ parts: ['G1'] }],
      also: ['mixed-feeds'],
    },
  },
});
