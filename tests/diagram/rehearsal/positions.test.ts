import { describe, expect, test } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import { settingsOf, settingWord, nextSetting } from '@/diagram/rehearsal/settings';
import { strokesIn } from '@/diagram/rehearsal/position-strokes';
import { symbolById } from '@/diagram/symbols';
import { readExample } from '../example-homes';
import { ask, fedIn } from './ask';

const backedUp = () =>
  new Home()
    .place('study', 'room', { name: 'Study' })
    .place('porch', 'room', { name: 'Porch' })
    .backup()
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'study', {}, { bars: '2' })
    .lamp('E2', 'S2', 'Q12')
    .document();

describe('conditions', () => {
  test('without a backup source only mains is there; the main switch is turned like any other', () => {
    const doc = smallHome().document();
    expect(ask(doc).conditions).toEqual(['mains']);
    const off = ask(doc, { moved: { Q1: 'open' } });
    expect(off.condition).toBe('mains');
    expect(fedIn(off)).toEqual([]);
  });

  test('with one there are outage, main off, and isolated where the battery has a handle of its own', () => {
    expect(ask(backedUp()).conditions).toEqual(['mains', 'outage', 'main-off', 'isolated']);
    const unfused = { ...backedUp(), parts: backedUp().parts.filter(({ id }) => id !== 'F2') };
    const wires = unfused.wires
      .filter(({ from, to }) => from[0] !== 'F2' && to[0] !== 'F2')
      .concat({ id: 'plus', from: ['G2', '+'], to: ['G1', 'bat.+'], role: 'dc+' });
    expect(ask({ ...unfused, wires }).conditions).toEqual(['mains', 'outage', 'main-off']);
  });

  test('opening the main switch by hand is main off; drawing the battery fuse besides is isolated', () => {
    const doc = backedUp();
    const off = ask(doc, { moved: { Q1: 'open' } });
    expect(off).toMatchObject({ condition: 'main-off', onBattery: ['G1'] });
    expect(off.stance).toEqual(ask(doc, { condition: 'main-off' }).stance);
    const both = ask(doc, { moved: { Q1: 'open', F2: 'open' } });
    expect(both).toMatchObject({ condition: 'isolated', onBattery: [] });
    expect(fedIn(both)).toEqual([]);
    expect(both.figures.parts.G2!.state).toBe('live');
  });

  test('a condition sets what makes it and leaves the rest as somebody has put it', () => {
    const doc = backedUp();
    const answer = ask(doc, { moved: { Q1: 'open', S1: 'open' }, condition: 'outage' });
    expect(answer.stance).toEqual({ supply: 'dead', moved: { S1: 'open' } });
    expect(fedIn(answer)).toEqual(['E2']);
  });
});

describe('an inverter takes over whenever the mains no longer reach it', () => {
  test.each([
    ['the supply goes', { supply: 'dead' as const }, ['E2']],
    ['its own mcb is opened', { moved: { Q3: 'open' } }, ['E1', 'E2']],
    ['the main switch is opened', { moved: { Q1: 'open' } }, ['E2']],
    ["the supplier's fuse is drawn", { moved: { F1: 'open' } }, ['E2']],
  ])('%s', (_, put, fed) => {
    const answer = ask(backedUp(), put);
    expect(answer.onBattery).toEqual(['G1']);
    expect(fedIn(answer)).toEqual(fed);
    expect(answer.figures.parts.E2!.from).toEqual(['G1']);
  });

  test('on mains it passes them through: the source of a backed-up way is the supply', () => {
    expect(ask(backedUp()).figures.parts.E2!.from).toEqual(['SUP']);
  });

  test('switched off, or with its battery fuse drawn, it takes over nothing', () => {
    for (const moved of [{ G1: 'off' }, { F2: 'open' }] as Record<string, string>[]) {
      const answer = ask(backedUp(), { supply: 'dead', moved });
      expect(answer.onBattery).toEqual([]);
      expect(fedIn(answer)).toEqual([]);
    }
  });

  test('and its charger draws nothing then: 20 A into 12 V at 0.85 are 282 W, 1.23 A', () => {
    const charging = ask(backedUp()).figures.sources.SUP!;
    const idle = ask(backedUp(), { moved: { F2: 'open' } }).figures.sources.SUP!;
    // The lamps' currents lag, so that sizes do not add up exactly.
    expect(charging - idle).toBeCloseTo((20 * 12) / 0.85 / 230, 1);
  });
});

describe('every switch works what it works', () => {
  test('two-way lamp: each switch changes it from any position, and at rest it burns', () => {
    const doc = new Home().place('stair', 'passage').way('Q11', 'stair').twoWay('E1', 'S1', 'S2', 'Q11').document();
    const rest = ask(doc);
    expect(fedIn(rest)).toEqual(['E1']);
    for (const [a, b] of [
      ['1', '1'],
      ['1', '2'],
      ['2', '1'],
      ['2', '2'],
    ] as const)
      expect(fedIn(ask(doc, { moved: { S1: a, S2: b } }))).toEqual(a === b ? ['E1'] : []);
  });

  test('a drawn position is where it stands at rest', () => {
    const doc = smallHome().set('S1', { state: 'open' }).document();
    expect(fedIn(ask(doc))).toEqual(['X1']);
    expect(fedIn(ask(doc, { moved: { S1: 'closed' } }))).toEqual(['E1', 'X1']);
  });

  test('an outlet switched off draws nothing; its plug is dead, its own terminal is not', () => {
    const doc = smallHome()
      .set('X1', { switched: true, load: 100 })
      .part('plug', 'PL', 'study', { in: 'X1' })
      .part('appliance', 'E9', 'study', { watts: 200, class: 2 })
      .line('PL:L', 'E9:L')
      .neutral('PL:N', 'E9:N')
      .document();
    expect(fedIn(ask(doc))).toContain('E9');
    const off = ask(doc, { moved: { X1: 'open' } });
    expect(fedIn(off)).not.toContain('E9');
    expect(off.figures.parts.X1).toMatchObject({ state: 'live', load: { works: false } });
    expect(fedIn(ask(doc, { moved: { PL: 'out' } }))).not.toContain('E9');
  });

  test('a changeover feeds from A, from nothing, from B', () => {
    const doc = new Home()
      .place('study', 'room')
      .backup()
      .part('changeover', 'Q9', 'hall', { poles: 2, rating: 25 })
      .line('LB', 'Q9:A1')
      .neutral('NB', 'Q9:A3')
      .line('LB2', 'Q9:B1')
      .neutral('NB2', 'Q9:B3')
      .part('lamp', 'E1', 'study', { watts: 12, class: 2 })
      .line('Q9:2', 'E1:L')
      .neutral('Q9:4', 'E1:N')
      .document();
    const outage = (state: string) => fedIn(ask(doc, { supply: 'dead', moved: { Q9: state } }));
    expect([outage('A'), outage('0'), outage('B')]).toEqual([[], [], ['E1']]);
    expect(fedIn(ask(doc))).toEqual(['E1']);
    // As the engine names the condition of a finding.
    expect(ask(doc, { condition: 'outage/B' }).stance).toEqual({ supply: 'dead', moved: { Q9: 'B' } });
  });

  test('what is no longer drawn is let go', () => {
    expect(ask(smallHome().document(), { moved: { Q99: 'open' } }).stance.moved).toEqual({});
  });
});

describe('words and pictures of a position', () => {
  const kinds = readExample('clean-backup-home').parts;
  test('every position of every part that can be turned has its word, and turning comes round', () => {
    for (const part of kinds) {
      const all = settingsOf(part);
      if (all.length === 0) continue;
      expect(new Set(all.map((setting) => settingWord(part, setting))).size).toBe(all.length);
      expect(all.reduce((now) => nextSetting(part, now), all[0]!)).toBe(all[0]);
    }
  });

  test.each(['mcb', 'isolator', 'rcd', 'rcbo', 'fuse', 'switch', 'switch-2pole', 'switch.box', 'mcb.box2'])(
    '%s looks otherwise open than closed',
    (id) => {
      const symbol = symbolById(id);
      const [closed, open] = ['closed', 'open'].map((setting) => strokesIn(symbol, setting).map(({ d }) => d));
      expect(closed).not.toEqual(open);
      expect(strokesIn(symbol, undefined)).toBe(symbol.strokes);
    },
  );

  test.each([
    ['changeover', ['A', '0', 'B']],
    ['changeover.box2', ['A', '0', 'B']],
    ['switch-2way', ['1', '2']],
    ['switch-2way.box', ['1', '2']],
    ['switch-cross.box', ['straight', 'crossed']],
  ] as const)('%s has a picture for each position', (id, settings) => {
    const pictures = settings.map((setting) => JSON.stringify(strokesIn(symbolById(id), setting)));
    expect(new Set(pictures).size).toBe(settings.length);
  });
});
