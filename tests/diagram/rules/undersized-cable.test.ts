import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { readDocument, type Cable } from '@/diagram/document/schema';
import { Home, smallHome } from '@/diagram/document/home';
import { undersizedCable } from '@/diagram/rules/undersized-cable';
import { lacksOf, testRemedies } from '../remedy-tester';
import { findingsOf, testRule } from '../rule-tester';

/** An outlet behind a device of so many amperes and a run of this size and laying. */
const run = (
  rating: number,
  csa: number,
  laying: Partial<Cable> = {},
  options: ConstructorParameters<typeof Home>[0] = {},
) => smallHome(options).way('Q12', 'study', { rating }).cable('k12', csa, 9, laying).socket('X5', 'Q12', { rating: 6 });

/** Outlets on a ring of so thick a cable, with a spur to one more. */
const ring = (csa: number, practice: 'GB' | 'IEC', spur = false) => {
  const home = new Home({ practice })
    .place('study')
    .part('mcb', 'Q12', 'hall', { poles: 1, rating: 32, curve: 'B', icn: 6000, label: 'Ring' })
    .line('LB', 'Q12:1');
  const ends = ['X1', 'X2', 'X3'];
  for (const id of [...ends, ...(spur ? ['X4'] : [])]) home.part('socket', id, 'study', { rating: 13, load: 300 });
  const link = (id: string, from: { L: string; N: string; E: string }, to: string) =>
    home.cable(id, csa, 10).line(from.L, `${to}:L`, id).neutral(from.N, `${to}:N`, id).earth(from.E, `${to}:E`, id);
  const board = { L: 'Q12:2', N: 'NB', E: 'EB' };
  const at = (id: string) => ({ L: `${id}:L`, N: `${id}:N`, E: `${id}:E` });
  link('k1', board, 'X1');
  link('k2', at('X1'), 'X2');
  link('k3', at('X2'), 'X3');
  link('k4', board, 'X3');
  return spur ? link('k5', at('X2'), 'X4') : home;
};

testRule(undersizedCable, {
  valid: {
    'a small home': smallHome(),
    // IEC 60364-5-52 Table B.52.2, B1, 4 mm2: 32 A
    'the limit itself: 32 A on 4 mm2 by method B1': run(32, 4, { method: 'B1' }),
    // Table B.52.2, B1, 1.5 mm2: 17.5 A; Table B.52.17, three circuits bunched: 0.70; together 12.25 A
    '10 A on 1.5 mm2 bunched with two more circuits': run(10, 1.5, { method: 'B1', grouped: 3 }),
    // Table B.52.14, PVC at 45 degC: 0.79; 27 A x 0.79 = 21.3 A
    '20 A on 2.5 mm2 clipped, in a loft of 45 degC': run(20, 2.5, { ambient: 45 }),
    'a size that the table does not print, where the next larger one would do': run(32, 3),
    'a device without rating is not judged': run(32, 1.5).set('Q12', { rating: undefined }),
    // BS 7671 433.1.204: 32 A on a ring whose legs carry 20 A
    'a British ring of 2.5 mm2 on 32 A': ring(2.5, 'GB'),
    'and a spur of it to one outlet': ring(2.5, 'GB', true),
  },
  invalid: {
    'a size below the table, behind a device that its first size could not carry either': {
      drawing: run(20, 1),
      findings: [{ parts: ['Q12'], message: /carries less than 19\.5 A/ }],
    },
    'a step above: 40 A on 4 mm2 by method B1': {
      drawing: run(40, 4, { method: 'B1' }),
      findings: [{ parts: ['Q12'], severity: 'danger', conditions: ['mains'], message: /32 A.*40 A/ }],
    },
    '13 A on 1.5 mm2 bunched with two more circuits: 12.3 A': {
      drawing: run(13, 1.5, { method: 'B1', grouped: 3 }),
      findings: [{ parts: ['Q12'], message: /12\.3 A/ }],
    },
    '20 A on 2.5 mm2 in 50 degC: 27 x 0.71 = 19.2 A': {
      drawing: run(20, 2.5, { ambient: 50 }),
      findings: [{ message: /19\.2 A/ }],
    },
    'two thin runs of one way are one finding': {
      drawing: run(20, 1.5).lamp('E7', 'S7', 'Q12'),
      findings: [{ parts: ['Q12'], message: /1 more/ }],
    },
    'a way joined straight to the bar leans on the service fuse': {
      drawing: run(6, 1.5).cut('Q12:2', 'JL12').drop('Q12').line('LB', 'JL12', 'k12'),
      findings: [{ parts: ['F1'], message: /63 A/ }],
      also: ['slow-disconnection'],
    },
    'the same ring where the practice has none: 32 A on 27 A': {
      drawing: ring(2.5, 'IEC'),
      findings: [{ parts: ['Q12'] }],
    },
    'a ring of 1.5 mm2 is too thin everywhere': { drawing: ring(1.5, 'GB'), findings: [{ parts: ['Q12'] }] },
    'a British ring that was opened is a radial way': {
      drawing: ring(2.5, 'GB').cut('X2:L', 'X3:L'),
      findings: [{ parts: ['Q12'] }],
    },
  },
});

testRemedies(undersizedCable, {
  'a thicker cable, or a smaller device': {
    drawing: run(40, 4, { method: 'B1' }),
    offers: ['Pull 6 mm2', 'Fit a device of 32 A'],
  },
  'no smaller device where the load needs this one': {
    drawing: run(20, 1.5, { method: 'B2' }).set('X5', { load: 4000 }),
    offers: ['Pull 2.5 mm2'],
  },
});

it('finds the planted 1.5 mm2 behind 20 A, and does not call the way overloaded', () => {
  const read = readDocument(
    JSON.parse(readFileSync(new URL('../../fixtures/homes/undersized-cable.json', import.meta.url), 'utf8')),
  );
  if (!read.ok) throw new Error('the fixture is no document');
  const findings = findingsOf(read.document).filter(({ severity }) => severity !== 'advice');
  expect(findings.map(({ rule, parts }) => [rule, ...parts])).toEqual([['undersized-cable', 'Q13']]);
});

it('names what it waits for', () => {
  expect(lacksOf(undersizedCable, run(32, 4).set('Q12', { rating: undefined }))).toEqual(['the rated current of Q12']);
  expect(lacksOf(undersizedCable, run(32, 3))).toEqual([
    'a size and laying that the table of the practice holds for the 3 mm2 run',
  ]);
});
