import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import { findingsOf } from '../rule-tester';
import { changeoverHome, twoRooms } from '../tricky/tricky';

/** Lamp E3 worked from `count` places: two-way switches at the ends, cross switches between. */
function places(count: number): Drawing {
  const home = twoRooms();
  const id = (at: number) => `S${30 + at}`;
  for (let at = 0; at < count; at++)
    home.part(at === 0 || at === count - 1 ? 'switch-2way' : 'switch-cross', id(at), 'study', { rating: 6 });
  home
    .part('lamp', 'E3', 'study', { watts: 12, pf: 0.9, class: 1, fixed: true })
    .line('JL11', `${id(0)}:C`)
    .switched(`${id(count - 1)}:C`, 'E3:L')
    .neutral('JN11', 'E3:N')
    .earth('JE11', 'E3:E');
  for (let at = 0; at + 1 < count; at++)
    for (const strapper of [0, 1]) {
      const from = at === 0 ? ['1', '2'] : ['2', '4'];
      const to = at + 1 === count - 1 ? ['1', '2'] : ['1', '3'];
      home.wire('strapper', `${id(at)}:${from[strapper]}`, `${id(at + 1)}:${to[strapper]}`);
    }
  return home;
}

const serious = (drawing: Drawing) =>
  findingsOf(drawing.document()).filter(({ severity }) => severity !== 'advice');
const waits = (drawing: Drawing) =>
  findingsOf(drawing.document()).flatMap(({ rule, message }) => (rule === 'missing-data' ? [message] : []));

describe('more switches in one set than are looked at in all combinations', () => {
  it.each([2, 3, 6, 7, 9, 12])('%i places work one lamp: no false finding', (count) => {
    expect(serious(places(count))).toEqual([]);
  });

  it('says of seven that not all combinations were looked at, and nothing of six', () => {
    expect(waits(places(6))).toEqual([]);
    expect(waits(places(7))).toEqual([
      'two-way-miswired cannot be judged without all combinations of 7 switches: S30, S31, S32, S33, S34 and 2 more were each turned from two positions of the others.',
    ]);
  });

  it.each([3, 6, 7, 9])('of %i places finds the cross switch with both strappers of a side on one pole', (count) => {
    const wrong = places(count).move('S31:3', 'S30:2', 'S31:9');
    const moved = places(count).move('S31:3', 'S30:2', 'S31:2').move('S31:2', 'S32:1', 'S31:3');
    expect(serious(moved).map(({ rule }) => rule)).toEqual(['two-way-miswired']);
    expect(serious(wrong).length).toBeGreaterThan(0);
  });

  it.each([7, 9])('of %i places finds a lost strapper and a bypassed switch', (count) => {
    expect(serious(places(count).cut('S32:4', 'S33:3')).map(({ rule }) => rule)).toEqual(['two-way-miswired']);
    expect(serious(places(count).line('S30:C', 'S30:1')).map(({ rule }) => rule)).toContain('bypassed-contact');
  });

  it('of seven places finds a switched neutral', () => {
    const drawing = places(7).cut('JL11', 'S30:C').cut('JN11', 'E3:N').neutral('JN11', 'S30:C').line('JL11', 'E3:N');
    expect(serious(drawing).map(({ rule }) => rule)).toContain('reversed-polarity');
  });
});

/** The pantry's changeover with `more` like it, each with a closet of its own. */
function changeovers(more: number): Drawing {
  const home = changeoverHome(2);
  for (let n = 31; n <= 30 + more; n++)
    home
      .place(`closet${n}`, 'room', { name: `Closet ${n}` })
      .part('changeover', `Q${n}`, 'hall', { poles: 2, rating: 20, state: 'A', label: `Closet ${n}` })
      .part('switch', `S${n}`, `closet${n}`, { rating: 6 })
      .part('lamp', `E${n}`, `closet${n}`, { watts: 8, pf: 0.9, class: 2, fixed: true })
      .cable(`k${n}`, 1.5, 6)
      .line('Q13:2', `Q${n}:A1`)
      .neutral('NB', `Q${n}:A3`)
      .line('Q22:2', `Q${n}:B1`)
      .neutral('NB2', `Q${n}:B3`)
      .line(`Q${n}:2`, `S${n}:1`, `k${n}`)
      .switched(`S${n}:2`, `E${n}:L`)
      .neutral(`Q${n}:4`, `E${n}:N`, `k${n}`);
  return home;
}

describe('more changeovers than are looked at in all combinations', () => {
  it.each([0, 2, 3, 4])('one and %i more: no false finding', (more) => {
    expect(serious(changeovers(more))).toEqual([]);
  });

  it('says of four that every two were looked at', () => {
    expect(waits(changeovers(2))).toEqual([]);
    expect(waits(changeovers(3))[0]).toMatch(/^mixed-feeds cannot be judged without all combinations of 4 changeovers/);
  });

  it.each([1, 3])('with %i more finds the outputs of two that are joined', (more) => {
    const rules = serious(changeovers(more).line('S31:1', 'S30:1')).map(({ rule }) => rule);
    expect(rules).toEqual(['backfeed', 'mixed-feeds']);
  });
});
