import { describe, expect, test } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import type { Installation } from '@/diagram/document/schema';
import { createRehearsal } from '@/diagram/rehearsal/rehearse';
import { sayIsolation, sayStillLive } from '@/diagram/rehearsal/say-open';
import type { ConditionName } from '@/diagram/rehearsal/stance';
import { draftDocument } from '@/diagram/survey/draft';
import { readExample } from '../example-homes';
import { ask } from './ask';

const twoSources = (inverter: Parameters<Home['backup']>[0] = {}) =>
  new Home()
    .place('study', 'room', { name: 'Study' })
    .backup(inverter)
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'study', {}, { bars: '2' })
    .lamp('E2', 'S2', 'Q12');
const hand = (doc: Installation, id: string, put: Parameters<typeof ask>[1] = {}) =>
  ask(doc, { ...put, hand: id }).hand!;
const told = (doc: Installation, id: string, put: Parameters<typeof ask>[1] = {}) =>
  sayStillLive(doc, hand(doc, id, put).stillLive)
    .map(({ text }) => text)
    .join(' ');

describe('what stays live when I open this', () => {
  test('a way of the mains: its lamp goes dark, the way from the battery in the same box does not', () => {
    const { stillLive } = hand(twoSources().document(), 'Q11');
    expect(stillLive).toMatchObject({
      setting: 'open',
      dark: ['E1'],
      own: [{ mark: '1', from: 'SUP' }],
      beside: [{ place: 'study', parts: ['E2', 'JL12', 'S2'], ways: ['Q12'] }],
      takesOver: [],
      floating: [],
      neutralJoined: true,
    });
    expect(told(twoSources().document(), 'Q11')).toContain(
      'In Study E2, S2 and joint in Study stay live from the supply through Q12.',
    );
  });

  test('the main switch: the inverter takes over, and what it feeds stays live', () => {
    const { stillLive } = hand(twoSources().document(), 'Q1');
    expect(stillLive).toMatchObject({ dark: ['E1'], takesOver: ['G1'], sources: ['SUP', 'G1'], floating: [] });
    expect(stillLive.beside).toMatchObject([{ place: 'study', from: ['G1'], ways: ['Q12'] }]);
    expect(stillLive.own.map(({ mark }) => mark)).toEqual(['1']);
  });

  test('without a bond the two-pole main switch takes the earth from the neutral of the battery', () => {
    const doc = twoSources({ bond: false }).document();
    expect(hand(doc, 'Q1').stillLive.floating).toEqual(['G1']);
    expect(told(doc, 'Q1')).toContain('The neutral of G1 has no earth then: a first fault trips nothing.');
    expect(hand(doc, 'Q1', { supply: 'dead' }).stillLive.floating).toEqual(['G1']);
    expect(hand(doc, 'Q11', { supply: 'dead' }).stillLive.floating).toEqual([]);
  });

  test('a switch in the neutral: the lampholder stays live, a neutral core becomes so', () => {
    const still = hand(readExample('switched-neutral'), 'S2').stillLive;
    expect(still.dark).toEqual(['E2']);
    expect(still.liveNeutrals).toHaveLength(1);
    expect(told(readExample('switched-neutral'), 'S2')).toContain(
      'neutral core becomes live through the loads that are on.',
    );
  });

  test('what has no contact is told as it stands: through what each terminal is fed', () => {
    const { stillLive } = hand(twoSources().document(), 'E2', { condition: 'main-off' });
    expect(stillLive).toMatchObject({
      setting: null,
      dark: [],
      own: [{ mark: 'L', from: 'G1', through: ['Q4', 'Q5', 'Q12'] }],
    });
  });

  test('what stands open already is told as it is', () => {
    const { stillLive } = hand(twoSources().document(), 'Q11', { moved: { Q11: 'open' } });
    expect(stillLive).toMatchObject({ already: true, dark: [], own: [{ mark: '1', from: 'SUP' }] });
  });

  test('the inverter switched off passes the mains, and its battery terminals stay live', () => {
    const { stillLive } = hand(twoSources().document(), 'G1');
    expect(stillLive).toMatchObject({ setting: 'off', dark: [] });
    expect(hand(twoSources().document(), 'G1', { supply: 'dead' }).stillLive.dark).toEqual(['E2']);
  });
});

describe('what must be opened to make this dead', () => {
  const open = (doc: Installation, id: string) => hand(doc, id).isolation.open?.map(({ part }) => part) ?? null;

  test.each([
    ['a lamp on a way of its own: that way', smallHome().document(), 'E1', ['Q11']],
    ['a lamp on the backup: its way, whichever source feeds it', twoSources().document(), 'E2', ['Q12']],
    ['a breaker itself: what lies before it', smallHome().document(), 'Q11', ['Q2']],
    ['the main switch: the fuse of the supplier', smallHome().document(), 'Q1', ['F1']],
    ['two ways joined: both of them', readExample('mixed-feeds'), 'Q11', null],
    ['the fuse of the supplier: nothing in the home', smallHome().document(), 'F1', null],
    ['a battery: nothing at all', twoSources().document(), 'G2', null],
  ])('%s', (name, doc, id, wanted) => {
    if (name.startsWith('two ways')) {
      const fed = doc.parts.find(({ kind, place }) => kind === 'lamp' && place !== undefined)!;
      const set = open(doc, fed.id)!;
      expect(set.length).toBeGreaterThan(0);
      return;
    }
    expect(open(doc, id)).toEqual(wanted);
  });

  test('joined ways need both their devices, or the one before both', () => {
    const doc = new Home()
      .place('study', 'room')
      .way('Q11', 'study')
      .lamp('E1', 'S1', 'Q11')
      .way('Q12', 'study')
      .line('JL11', 'JL12')
      .way('Q13', 'study')
      .lamp('E3', 'S3', 'Q13')
      .document();
    // One device before both is the lesser set, though it darkens Q13, too.
    expect(hand(doc, 'E1').isolation).toMatchObject({ open: [{ part: 'Q2' }], alsoDark: ['E3'] });
  });

  test('a joint of mains and backup needs one device of each', () => {
    const doc = twoSources().line('JL11', 'JL12').document();
    const { isolation } = hand(doc, 'E1');
    expect(isolation.sources).toEqual(['G1', 'SUP']);
    expect(isolation.open!.length).toBe(2);
    const { steps, cautions } = sayIsolation(doc, isolation);
    expect(steps.at(-1)).toContain('prove E1 dead');
    expect(cautions.map(({ text }) => text)).toEqual(
      expect.arrayContaining(['2 sources can feed it: G1 and the supply.', 'Battery terminals are never dead.']),
    );
  });

  test('the inverter: its input and its battery', () => {
    const doc = twoSources().document();
    expect(open(doc, 'G1')).toEqual(['F2', 'Q3']);
    expect(hand(doc, 'G1').isolation.sources).toEqual(['G1', 'SUP']);
    // The fuse itself hangs on the battery.
    expect(open(doc, 'F2')).toBeNull();
  });

  test('a plug is pulled and kept in sight, a fuse is kept in the pocket', () => {
    const doc = smallHome()
      .part('plug', 'PL', 'study', { ref: 'PL', in: 'X1' })
      .part('appliance', 'E9', 'study', { watts: 200, class: 2 })
      .line('PL:L', 'E9:L')
      .neutral('PL:N', 'E9:N')
      .document();
    const { isolation } = hand(doc, 'E9');
    expect(isolation.open).toEqual([{ part: 'PL', setting: 'out' }]);
    expect(sayIsolation(doc, isolation).steps.slice(0, 2)).toEqual(['Pull PL.', 'Keep PL with you.']);
  });

  test('on drafted homes the set leaves the part dead in every condition, and no smaller set does', () => {
    const room = (i: number) => ({
      id: `r${i}`,
      order: i,
      name: `Room ${i}`,
      kind: 'room' as const,
      lamps: 2,
      lampWatts: 9,
      fans: 1,
      fanWatts: 60,
      outlets: 2,
      heavy: [],
      keepLamps: 1,
      keepFans: 0,
      keepOutletWatts: 0,
      hours: 2,
    });
    const doc = draftDocument([room(1), room(2)], {
      title: 'two rooms',
      practice: 'IEC',
      supply: { system: 'TT', voltage: 230, frequency: 50, ra: 20, zln: 0.4 },
      hoursWanted: 2,
    });
    const rehearse = createRehearsal(doc);
    const conditions = rehearse({ stance: null, faults: [], hand: null }).conditions;
    const points = doc.parts.filter(({ kind }) => kind === 'lamp' || kind === 'fan' || kind === 'socket');
    expect(points.length).toBeGreaterThan(8);
    const live = (moved: Record<string, string>, condition: ConditionName, id: string) => {
      const first = rehearse({ stance: { supply: 'live', moved: {} }, condition, faults: [], hand: null }).stance;
      const stance = { ...first, moved: { ...first.moved, ...moved } };
      return rehearse({ stance, faults: [], hand: null }).figures.parts[id]!.state === 'live';
    };
    for (const { id } of points) {
      const { open } = rehearse({ stance: null, faults: [], hand: id }).hand!.isolation;
      const set = open!.map(({ part, setting }) => [part, setting] as const);
      for (const condition of conditions) expect(live(Object.fromEntries(set), condition, id)).toBe(false);
      for (const left of set) {
        const fewer = Object.fromEntries(set.filter((each) => each !== left));
        expect(conditions.some((condition) => live(fewer, condition, id))).toBe(true);
      }
    }
  });
});
