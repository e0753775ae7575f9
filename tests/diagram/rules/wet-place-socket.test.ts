import { Home } from '@/diagram/document/home';
import { wetPlaceSocket } from '@/diagram/rules/wet-place-socket';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

const bath = (kind: 'wet' | 'room', zone?: 0 | 1 | 2, pattern?: string) =>
  new Home()
    .place('bath', kind, { name: 'Bath', zone })
    .way('Q12', 'bath')
    .socket('X5', 'Q12', { pattern, ...(pattern === 'shaver' && { rating: 0.2, class: 2 }) });

testRule(wetPlaceSocket, {
  valid: {
    'an outlet in a dry room': bath('room'),
    'a shaver outlet with separated winding': bath('wet', 2, 'shaver'),
    'a lamp in a wet place': new Home().place('bath', 'wet').way('Q12', 'bath').lamp('E1', 'S1', 'Q12'),
  },
  invalid: {
    'an outlet in zone 1': {
      drawing: bath('wet', 1),
      findings: [{ parts: ['X5'], severity: 'danger', message: /zone 1 of Bath/ }],
    },
    'an outlet in a wet place whose zone is not said': { drawing: bath('wet'), findings: [{ parts: ['X5'] }] },
    'an outlet in a zone of a place that is not called wet': {
      drawing: bath('room', 2),
      findings: [{ parts: ['X5'] }],
    },
  },
});

/** The outlet at the end of a cable of its own, as an outlet outside the room is. */
const cabled = () =>
  bath('wet')
    .cut('JL12', 'X5:L')
    .cut('JN12', 'X5:N')
    .cut('JE12', 'X5:E')
    .cable('k5', 1.5, 4)
    .line('JL12', 'X5:L', 'k5')
    .neutral('JN12', 'X5:N', 'k5')
    .earth('JE12', 'X5:E', 'k5');

testRemedies(wetPlaceSocket, {
  'out of the zones': { drawing: cabled(), offers: ['Move it out of the zones'] },
  'not where its wires have no cable to the place beside': { drawing: bath('wet'), offers: [] },
});
