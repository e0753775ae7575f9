import { describe, expect, test } from 'vitest';
import { Home, smallHome } from '@/diagram/document/home';
import { ask } from './ask';

/** Ohm's law by hand. The lamp of 100 W at 230 V is 529 ohm; copper of IEC 60228 class 1, hot (70 degC). */
const OHM_70 = 1 + 0.00393 * 50;

describe('volts and amperes against Ohm worked by hand', () => {
  const doc = new Home({ supply: { zln: 0.5, ze: 0.8 } })
    .place('study', 'room')
    .way('Q11', 'study', {}, { csa: 1.5, length: 40 })
    .socket('X1', 'Q11', { load: 1000 })
    .document();
  // 1.5 mm2: 12.1 ohm/km (IEC 60228, table 1, class 1); both legs.
  const legs = 2 * 0.0121 * 40 * OHM_70;
  const load = 230 ** 2 / 1000;
  const amps = 230 / (0.5 + legs + load);

  test('a series circuit: I = U / (Zln + R1 + Rn + R)', () => {
    const { parts, wires, sources } = ask(doc).figures;
    expect(parts.X1!.load!.amps).toBeCloseTo(amps, 4);
    expect(parts.X1!.load!.volts).toBeCloseTo(amps * load, 2);
    expect(parts.X1!.load!.works).toBe(true);
    expect(sources.SUP).toBeCloseTo(amps, 4);
    const cores = doc.wires.filter(({ cable }) => cable === 'k11');
    for (const { id, role } of cores) expect(wires[id]!.amps).toBeCloseTo(role === 'earth' ? 0 : amps, 4);
  });

  test('live, way back, earth', () => {
    const { wires } = ask(doc).figures;
    const state = (role: string) =>
      wires[doc.wires.find((wire) => wire.cable === 'k11' && wire.role === role)!.id]!.state;
    expect([state('line'), state('neutral'), state('earth')]).toEqual(['live', 'return', 'plain']);
  });

  test('with the way open its cable is dead at 0 V, and its breaker is live at the upper terminal', () => {
    const { wires, parts } = ask(doc, { moved: { Q11: 'open' } }).figures;
    for (const { id, role } of doc.wires.filter(({ cable }) => cable === 'k11')) {
      expect(wires[id]!.state).toBe(role === 'earth' ? 'plain' : 'dead');
      expect(wires[id]!.volts).toBeLessThan(0.01);
    }
    expect(parts.Q11!.state).toBe('live');
    expect(parts.X1).toMatchObject({ state: 'dead', load: { works: false } });
  });
});

describe('neutrals that are live', () => {
  test('a switch in the neutral: open, the lampholder stays live and the neutral stands at 230 V through the lamp', () => {
    const doc = smallHome()
      .cut('S1:2', 'E1:L')
      .cut('JN11', 'E1:N')
      .cut('JL11', 'S1:1')
      .line('JL11', 'E1:L')
      .neutral('E1:N', 'S1:1')
      .neutral('S1:2', 'JN11')
      .document();
    const neutral = doc.wires.find(({ from }) => from[0] === 'E1')!.id;
    const { figures } = ask(doc, { moved: { S1: 'open' } });
    expect(figures.parts.E1).toMatchObject({ state: 'live', load: { works: false } });
    expect(figures.wires[neutral]!).toMatchObject({ state: 'live', from: [] });
    expect(figures.wires[neutral]!.volts).toBeGreaterThan(225);
  });
});

describe('devices that do not hold', () => {
  test('a neutral brought home past its rcd is seen by it as soon as the load is on', () => {
    const doc = smallHome().cut('NB', 'JN11').neutral('NB0', 'JN11', 'k11').document();
    expect(ask(doc).unheld).toMatchObject([{ part: 'Q2' }]);
    expect(ask(doc, { moved: { S1: 'open', X1: 'closed', Q11: 'open' } }).unheld).toEqual([]);
    expect(ask(smallHome().document()).unheld).toEqual([]);
  });

  test('20 A in a 6 A breaker: above 1.45 times its rating it opens within the hour', () => {
    const doc = smallHome().set('X1', { load: 4600 }).document();
    expect(ask(doc).unheld).toMatchObject([{ part: 'Q11' }]);
  });
});
