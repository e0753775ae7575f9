import { Home, smallHome } from '@/diagram/document/home';
import { noMainSwitch } from '@/diagram/rules/no-main-switch';
import { testRule } from '../rule-tester';

/** Everything straight from the meter, the main switch taken out. */
const withoutSwitch = (home: Home) => home.drop('Q1').line('P1:4', 'LB0').neutral('P1:3', 'NB0');

testRule(noMainSwitch, {
  valid: {
    'an isolator before everything': smallHome(),
    'an rcd before everything serves': withoutSwitch(smallHome()),
    'a drawing in which nothing is fed yet': new Home(),
  },
  invalid: {
    'two rcds side by side and nothing before them': {
      drawing: withoutSwitch(smallHome())
        .part('rcd', 'Q9', 'hall', { rating: 63, sensitivity: 0.03, type: 'A', delay: 'none' })
        .part('line-bar', 'LB9', 'hall', { rating: 63 })
        .part('neutral-bar', 'NB9', 'hall')
        .line('LB0', 'Q9:1')
        .neutral('NB0', 'Q9:3')
        .line('Q9:2', 'LB9')
        .neutral('Q9:4', 'NB9')
        .way('Q12', 'study', {}, { bars: '9' })
        .socket('X5', 'Q12'),
      findings: [{ parts: ['P1'], severity: 'defect', conditions: ['mains'] }],
    },
    'one way branches off before the switch': {
      drawing: smallHome()
        .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Bell' })
        .part('lamp', 'E9', 'hall', { watts: 5, pf: 1, class: 2, fixed: true })
        .part('switch', 'S9', 'hall', { rating: 6 })
        .line('P1:4', 'Q12:1')
        .line('Q12:2', 'S9:1')
        .switched('S9:2', 'E9:L')
        .neutral('P1:3', 'E9:N'),
      findings: [{ parts: ['P1'] }],
    },
  },
});
