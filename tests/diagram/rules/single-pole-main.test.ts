import { Home, smallHome } from '@/diagram/document/home';
import { singlePoleMain } from '@/diagram/rules/single-pole-main';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** A one-pole main switch, the neutral straight to its bar. */
const onePole = (home: Home) =>
  home.set('Q1', { poles: 1 }).cut('P1:3', 'Q1:3').cut('Q1:4', 'NB0').neutral('P1:3', 'NB0');

testRule(singlePoleMain, {
  valid: {
    'two poles': smallHome(),
    'a home without any main switch is that rule': smallHome().drop('Q1').line('P1:4', 'LB0').neutral('P1:3', 'NB0'),
  },
  invalid: {
    'one pole': {
      drawing: onePole(smallHome()),
      findings: [{ parts: ['Q1'], severity: 'defect', conditions: ['mains'] }],
    },
    'two poles with the neutral led past': {
      drawing: smallHome().cut('P1:3', 'Q1:3').cut('Q1:4', 'NB0').neutral('P1:3', 'NB0'),
      findings: [{ parts: ['Q1'], message: /passes Q1 by/ }],
      also: ['open-terminal'],
    },
  },
});

testRemedies(singlePoleMain, {
  'a two-pole switch with the neutral through it': {
    drawing: onePole(smallHome()),
    offers: ['Fit a two-pole switch and lead the neutral through it'],
  },
});
