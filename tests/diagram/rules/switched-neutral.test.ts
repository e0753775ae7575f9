import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { switchedNeutral } from '@/diagram/rules/switched-neutral';
import { testRule } from '../rule-tester';

/** Line straight to the lamp, its neutral through the switch. */
const swap = (home: Home) =>
  home
    .cut('JL11', 'S1')
    .cut('S1', 'E1')
    .cut('JN11', 'E1')
    .line('JL11', 'E1:L')
    .neutral('JN11', 'S1:1')
    .neutral('S1:2', 'E1:N');

const carter = () =>
  smallHome()
    .twoWay('E3', 'S3', 'S4', 'Q11')
    .cut('JL11', 'S3:C')
    .cut('JN11', 'E3:N')
    .line('JL11', 'S3:1')
    .neutral('JN11', 'S3:2')
    .neutral('S3:C', 'E3:N');

testRule(switchedNeutral, {
  valid: {
    'a switch in the line': smallHome(),
    'a two-pole switch that breaks both': smallHome().heater('E5', 'S5', 'Q11'),
    'a two-way pair in the line': smallHome().twoWay('E3', 'S3', 'S4', 'Q11'),
    'a fan on switch and regulator': smallHome().fan('M1', 'S2', 'R2', 'Q11'),
    'a lamp the wrong way round is reversed polarity, its switch is in the line': {
      drawing: smallHome().move('E1:L', 'S1:2', 'E1:N').move('E1:N', 'JN11', 'E1:L'),
      also: ['reversed-polarity'],
    },
    'a whole way the wrong way round is reversed polarity': {
      drawing: smallHome().move('JL11:1', 'Q11:2', 'JN11:9').move('JN11:1', 'NB', 'JL11:9'),
      also: ['reversed-polarity'],
    },
    'a switch that leads nowhere on the neutral': {
      drawing: smallHome().part('switch', 'S9', 'study').neutral('JN11', 'S9:1'),
      also: ['open-terminal'],
    },
  },
  invalid: {
    'a switch in the neutral of a lamp': {
      drawing: swap(smallHome()),
      findings: [{ parts: ['S1'], severity: 'danger', conditions: ['mains'] }],
    },
    'on battery too': {
      drawing: backupHome()
        .cut('JL21', 'S2')
        .cut('S2', 'E2')
        .cut('JN21', 'E2')
        .line('JL21', 'E2:L')
        .neutral('JN21', 'S2:1')
        .neutral('S2:2', 'E2:N'),
      findings: [{ parts: ['S2'], conditions: ['mains', 'outage', 'main-off'] }],
    },
    'a switch before an outlet': {
      drawing: smallHome()
        .part('switch', 'S9', 'study')
        .cut('JN11', 'X1')
        .neutral('JN11', 'S9:1')
        .neutral('S9:2', 'X1:N'),
      findings: [{ parts: ['S9'] }],
    },
    'one pole of a two-pole switch, the line led past it': {
      drawing: smallHome().heater('E5', 'S5', 'Q11').cut('S5:1', 'JL11').move('S5:2', 'E5:L', 'JL11'),
      findings: [{ parts: ['S5'] }],
    },
    'a regulator in the neutral': {
      drawing: smallHome()
        .fan('M1', 'S2', 'R2', 'Q11')
        .move('R2:1', 'S2:2', 'M1:L')
        .cut('R2:2', 'M1:L')
        .move('M1:N', 'JN11', 'R2:1')
        .neutral('R2:2', 'M1:N'),
      findings: [{ parts: ['R2'] }],
    },
    'a two-way switch that sends line or neutral: the neutral is switched in some position': {
      drawing: carter(),
      findings: [{ parts: ['S3', 'S4'] }],
      also: ['line-role-mismatch'],
    },
    'line and neutral at both two-way switches, the lamp between their commons': {
      drawing: smallHome()
        .part('switch-2way', 'S3', 'study')
        .part('switch-2way', 'S4', 'study')
        .part('lamp', 'E9', 'study', { watts: 10, pf: 1, class: 2 })
        .line('JL11', 'S3:1')
        .neutral('JN11', 'S3:2')
        .line('JL11', 'S4:1')
        .neutral('JN11', 'S4:2')
        .switched('S3:C', 'E9:L')
        .switched('S4:C', 'E9:N'),
      findings: [{ parts: ['S3', 'S4'] }],
    },
    'two switches in series in one neutral are one finding': {
      drawing: swap(smallHome())
        .part('switch', 'S8', 'study')
        .cut('S1:1', 'JN11')
        .neutral('JN11', 'S8:1')
        .neutral('S8:2', 'S1:1'),
      findings: [{ parts: ['S1', 'S8'] }],
    },
    'three lamps behind one switch in the neutral are one finding': {
      drawing: swap(smallHome())
        .part('lamp', 'E7', 'study', { watts: 9, class: 2 })
        .part('switch', 'S7', 'study')
        .line('JL11', 'S7:1')
        .switched('S7:2', 'E7:L')
        .neutral('S1:2', 'E7:N'),
      findings: [{ parts: ['S1'] }],
    },
  },
});
