import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import { backupHome, smallHome } from '@/diagram/document/home';
import { evaluate } from '@/diagram/circuit/evaluate';
import type { Fault } from '@/diagram/circuit/fault-types';
import { walkFaults } from '@/diagram/circuit/fault-walk';
import { buildGraph } from '@/diagram/terminals/graph';

const toCase: Fault = { kind: 'line-to-case', at: 'X1' };
const walk = (drawing: Drawing, fault: Fault = toCase, condition?: string) => {
  const graph = buildGraph(drawing.document());
  return walkFaults(graph, evaluate(graph), [fault], condition);
};
const events = (found: ReturnType<typeof walk>) => found.steps.map(({ event }) => event);

describe('a home that is drawn with a dead short', () => {
  it('line on neutral: the breaker of the way opens before any fault is put in', () => {
    const found = walk(smallHome().line('JL11', 'JN11'));
    expect(events(found)).toEqual([
      'as drawn, line and neutral are joined at joint in Study',
      'Q11 opens',
      'line touches the case of X1',
      'no device opens',
    ]);
    const [short, opens, fault] = found.steps;
    // The loop by hand: zln 0.3 ohm and twice 9 m of 1.5 mm2, 12.1 ohm/km at 20 degC x 1.1965 at 70 degC.
    expect(short!.faultAmps).toBeCloseTo(230 / (0.3 + 2 * 9 * 0.0121 * 1.1965), 0);
    expect(opens).toMatchObject({ part: 'Q11', t: 0.1, dark: ['E1', 'X1'] });
    // B6: above 5 x 6 A at once, at the latest 0.1 s; at the earliest the contacts have parted after 10 ms
    expect(opens!.earliest).toBeLessThan(0.1);
    expect(fault!.faultAmps).toBeLessThan(1e-3);
    expect(found).toMatchObject({ cleared: true, by: 'Q11', clearedAfter: 0 });
  });

  it('line on earth: the case stands at half the voltage until the rcd opens', () => {
    const found = walk(smallHome().line('JL11', 'JE11'));
    expect(found.steps[0]!.event).toBe('as drawn, line and earth are joined at joint in Study');
    expect(found.steps[0]!.touchVolts).toBeCloseTo(115, 0);
    expect(found.steps[1]).toMatchObject({ part: 'Q2', t: 0.04, orElse: ['Q11'] });
    expect(found.touchVolts).toBeCloseTo(115, 0);
  });

  it('neutral on earth behind the rcd: load current goes astray and opens it', () => {
    const found = walk(smallHome().neutral('JN11', 'JE11'));
    expect(found.steps[1]).toMatchObject({ part: 'Q2' });
    expect(found.steps[1]!.astrayAmps!).toBeGreaterThan(0.03);
  });

  it('neutral on earth before the rcd: nothing opens, and the rcd still sees the next fault', () => {
    const found = walk(smallHome().neutral('NB0', 'EB'));
    expect(events(found).slice(0, 2)).toEqual([
      'as drawn, neutral and earth are joined at neutral bar in Hall',
      'no device opens',
    ]);
    expect(found).toMatchObject({ cleared: true, by: 'Q2', clearedAfter: 0.04 });
  });

  it('on the service before every device of the home: it stays, and every case with it', () => {
    const found = walk(smallHome().move('F1:1', 'SUP:L', 'EB'));
    expect(events(found).slice(0, 2)).toEqual(['as drawn, line and earth are joined at supply in Hall', 'no device opens']);
    expect(found.touchVolts).toBeCloseTo(115, 0);
  });

  it('on battery: the inverter gives what it can, 1400 VA / 230 V, and no breaker opens on that', () => {
    const found = walk(backupHome().line('JL21', 'JN21'), { kind: 'line-to-case', at: 'X2' }, 'outage');
    expect(found.steps[0]!.faultAmps).toBeCloseTo(1400 / 230, 2);
    expect(found.steps[1]!.event).toBe('no device opens');
  });
});
