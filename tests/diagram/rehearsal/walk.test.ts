import { describe, expect, test } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import { faultOf, faultsAt, faultText } from '@/diagram/rehearsal/fault-places';
import { withMissing } from '@/diagram/rehearsal/missing';
import { ask, walkOf } from './ask';

const backedUp = (inverter: Parameters<Home['backup']>[0] = {}) =>
  new Home({ supply: { system: 'TT', ra: 20, zln: 0.4 } })
    .place('study', 'room', { name: 'Study' })
    .backup(inverter)
    .way('Q12', 'study', {}, { bars: '2', length: 24 })
    .lamp('E2', 'S2', 'Q12');

describe('a walk from where somebody has put the switches', () => {
  test('TT on mains: 230 V over RA, half of Zln and the cores, by Ohm; the case at the share of RA and its core', () => {
    const doc = new Home({ supply: { system: 'TT', ra: 20, zln: 0.4 } })
      .place('study', 'room')
      .way('Q11', 'study', {}, { csa: 1.5, length: 24 })
      .socket('X1', 'Q11', { load: 0 })
      .document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'line-to-case', at: 'X1' }] }));
    // 12.1 ohm/km of 1.5 mm2 (IEC 60228, table 1, class 1) at 70 degC; the source electrode counts as 0.
    const core = 0.0121 * 24 * (1 + 0.00393 * 50);
    const amps = 230 / (20 + 0.2 + 2 * core);
    const fault = walk.stations[1]!;
    expect(fault.faultAmps).toBeCloseTo(amps, 3);
    expect(fault.touchVolts).toBeCloseTo(amps * (20 + core), 2);
    expect(fault.text).toContain(
      "down the earth core, through RA 20 Ω and the ground, and home by the supply's neutral",
    );
    expect(walk.stations.map(({ kind }) => kind)).toEqual(['before', 'fault', 'opens', 'still']);
    expect(walk).toMatchObject({ cleared: true, by: 'Q2', limit: { seconds: 0.2, volts: 50 } });
    expect(walk.stations[2]!.text).toMatch(/^It sees 1\d\.?\d* A astray; 30 mA suffice\./);
    expect(walk.remark).toContain('Q11 alone would let');
  });

  test('the path runs out by line to the place and home by earth, with its direction', () => {
    const doc = backedUp().document();
    const walk = walkOf(ask(doc, { supply: 'dead', faults: [{ kind: 'line-to-case', at: 'E2' }] }));
    const { path } = walk.stations[1]!;
    const out = path.filter((step) => step.out);
    expect(out.map(({ to }) => to[0])).toEqual(expect.arrayContaining(['Q4', 'Q5', 'Q12', 'S2', 'E2']));
    expect(path.some(({ out: away, from }) => !away && from[0] === 'E2' && from[1] === 'E')).toBe(true);
    // The bond of G1 and the supply's neutral share the way home; most of it takes the bond.
    expect(walk.stations[1]!.text).toContain('home by the bond of G1');
    for (const { amps } of path) expect(amps).toBeGreaterThan(0.2 * walk.stations[1]!.faultAmps);
    expect(walk.stations.at(-1)!.path).toEqual([]);
  });

  test('a switch that somebody has opened keeps the fault dead', () => {
    const walk = walkOf(
      ask(smallHome().document(), { moved: { S1: 'open' }, faults: [{ kind: 'line-to-case', at: 'E1' }] }),
    );
    expect(walk.stations[0]!.text).toContain('No source feeds E1 as things stand');
    expect(walk.stations.at(-1)!).toMatchObject({ kind: 'holds', heading: 'still', text: 'No device opens. 0.0 A.' });
    expect(walk.stations[1]!.path).toEqual([]);
  });

  test('without an earth nothing happens, and the case waits at its full voltage', () => {
    const doc = smallHome({ rcd: false }).cut('JE11', 'E1:E').document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'line-to-case', at: 'E1' }] }));
    expect(walk.stations.at(-1)!.text).toMatch(
      /^No device opens\. 0\.0 A, case at 2[23]\d V until somebody touches it\.$/,
    );
    expect(walk.cleared).toBe(false);
  });

  test('a floating backup: the first fault lifts the neutral and trips nothing; a second finds it there', () => {
    const doc = backedUp({ bond: false }).document();
    const first = { kind: 'line-to-case' as const, at: 'E2' };
    const alone = walkOf(ask(doc, { condition: 'main-off', faults: [first] }));
    expect(alone.stations.map(({ kind }) => kind)).toEqual(['before', 'fault', 'holds']);
    expect(alone.stations[1]!.text).toMatch(/^0\.0 A: the neutral of G1 has no earth, .* stands at 2[23]\d V to earth/);
    const both = walkOf(ask(doc, { condition: 'main-off', faults: [first, { kind: 'neutral-to-earth', at: 'G1' }] }));
    expect(both.stations.filter(({ kind }) => kind === 'fault')).toHaveLength(2);
    expect(both.stations.at(-1)!.opened.length).toBeGreaterThan(0);
  });

  test('the neutral of a TN-C-S supply lost: every case rises to what the loads let through, by Ohm', () => {
    const doc = new Home({ supply: { system: 'TN-C-S', ze: 0.35, zln: 0.35 } })
      .place('study', 'room')
      .way('Q11', 'study')
      .socket('X1', 'Q11', { load: 1000 })
      .document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'neutral-open', at: 'SUP' }] }));
    const { text, figures } = walk.stations[1]!;
    // Nothing joins the home to the ground but its insulation: no current, so no volts are lost in the load.
    expect(figures.parts.X1!.caseVolts).toBeGreaterThan(225);
    expect(text).toContain('no way back');
    expect(text).toContain('earthed case');
  });

  test('line to neutral: the breaker of the way opens; its current is what the loop allows', () => {
    const doc = smallHome().set('Q11', { rating: 6, curve: 'B' }).document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'line-to-neutral', at: 'X1' }] }));
    expect(walk).toMatchObject({ cleared: true, by: 'Q11' });
    expect(walk.stations[1]!.text).toContain('runs out by the line and back by the neutral');
    expect(walk.stations.at(-1)!.text).toContain('E1 and X1 dark.');
  });

  test('an inverter takes over once the main rcd has opened, and feeds a fault again that lies before any rcd of its own', () => {
    const doc = backedUp({ neutral: 'separate', transfer: 10 }).document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'line-to-case', at: 'G1' }] }));
    expect(walk.stations.map(({ kind }) => kind)).toEqual(['before', 'fault', 'opens', 'takes-over', 'still']);
    const [, , opens, over] = walk.stations;
    expect(opens).toMatchObject({ heading: 'Q0 opens', faultAmps: 0 });
    // 700 VA drive at most twice that for a while: 1400 VA / 230 V, the surge that the inverter's data give.
    expect(over!.faultAmps).toBeCloseTo(1400 / 230, 1);
    expect(over!.t! - opens!.t!).toBeCloseTo(0.01, 9);
    expect(over!.text).toMatch(/The fault is fed again: 6\.1 A/);
    expect(over!.figures.sources.G1).toBeGreaterThan(0);
    expect(walk).toMatchObject({ cleared: false, by: null, clearedAfter: null });
  });

  test('what hangs on it is dark only until then', () => {
    const doc = backedUp().socket('X1', 'Q12').document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'neutral-open', at: 'SUP' }] }));
    const over = walk.stations.find(({ kind }) => kind === 'takes-over')!;
    expect(over.text).toContain('Its battery feeds E2 and X1 again');
    expect(over.figures.parts.E2).toMatchObject({ from: ['G1'], load: { works: true } });
  });

  test('one that is off, or has lost its battery, takes over nothing', () => {
    const kinds = (moved: Record<string, string>) =>
      walkOf(ask(backedUp().document(), { moved, faults: [{ kind: 'line-to-case', at: 'G1' }] })).stations.map(({ kind }) => kind);
    expect(kinds({})).toContain('takes-over');
    expect(kinds({ G1: 'off' })).not.toContain('takes-over');
    expect(kinds({ F2: 'open' })).not.toContain('takes-over');
  });

  test('walks are the same every time', () => {
    const doc = backedUp().document();
    const once = () =>
      JSON.stringify(ask(doc, { supply: 'dead', faults: [{ kind: 'line-to-case', at: 'E2' }], hand: 'E2' }));
    expect(once()).toBe(once());
  });
});

describe('values that are missing', () => {
  test('stop the walk with their name, and typed they let it go on', () => {
    const doc = new Home({ supply: { system: 'TT', zln: 0.4 } })
      .place('study', 'room')
      .way('Q11', 'study')
      .socket('X1', 'Q11')
      .document();
    const faults = [{ kind: 'line-to-case' as const, at: 'X1' }];
    const { outcome } = ask(doc, { faults });
    if (!outcome || !('cannot' in outcome)) throw new Error('it was walked');
    expect(outcome.cannot).toBe('Cannot be walked without the resistance of the earth electrode.');
    const [missing] = outcome.missing;
    for (const text of ['', '-3', 'twenty', '0']) expect(withMissing(doc, missing!, text)).toBeNull();
    expect(walkOf(ask(withMissing(doc, missing!, '20')!, { faults })).cleared).toBe(true);
  });

  test('that leave a device out are named and the walk goes on', () => {
    const doc = smallHome().set('Q2', { sensitivity: undefined }).document();
    const walk = walkOf(ask(doc, { faults: [{ kind: 'line-to-case', at: 'X1' }] }));
    expect(walk.missing).toMatchObject([{ part: 'Q2', field: 'sensitivity', words: 'the sensitivity of Q2' }]);
    expect(walkOf(ask(withMissing(doc, walk.missing[0]!, '0,03')!, { faults: walk.faults as never })).missing).toEqual(
      [],
    );
  });

  test('are not asked for where they do not count: the electrode of the supply in an outage', () => {
    const doc = backedUp().document();
    const without = { ...doc, supply: { ...doc.supply, ra: undefined } };
    expect(ask(without, { supply: 'dead', faults: [{ kind: 'line-to-case', at: 'E2' }] }).outcome).toHaveProperty(
      'walk',
    );
  });
});

describe('places of faults', () => {
  test('are offered by the terminals that a part has', () => {
    const part = (id: string) =>
      smallHome()
        .set('E1', { class: 2 })
        .document()
        .parts.find((each) => each.id === id)!;
    expect(faultsAt(part('X1'))).toEqual(['line-to-case', 'line-to-neutral', 'neutral-open', 'neutral-to-earth']);
    expect(faultsAt(part('E1'))).toEqual(['line-to-neutral', 'neutral-open']);
    expect(faultsAt(part('SUP'))).toEqual(['neutral-open']);
    expect(faultsAt(part('Q11'))).toEqual([]);
    expect(faultsAt(part('NB'))).toEqual([]);
  });

  test('every fault that is offered can be walked', () => {
    const doc = backedUp().document();
    for (const part of doc.parts)
      for (const kind of faultsAt(part))
        expect(ask(doc, { supply: 'dead', faults: [{ kind, at: part.id }] }).outcome).toHaveProperty('walk');
  });

  test('stand in an address as they were', () => {
    const fault = { kind: 'neutral-open', at: 'E1', wire: 'w1' } as const;
    expect(faultOf(faultText(fault))).toEqual(fault);
    expect(faultOf('nonsense~E1')).toBeNull();
  });
});
