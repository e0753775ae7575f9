import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import { backupHome, smallHome } from '@/diagram/document/home';
import { evaluate, type PointState } from '@/diagram/circuit/evaluate';
import { buildGraph } from '@/diagram/terminals/graph';

function stateOf(drawing: Drawing, point: string, condition = 'mains'): PointState {
  const { evaluated } = evaluate(buildGraph(drawing.document()));
  return evaluated.find((each) => each.condition.name === condition)!.points.get(point)!;
}

describe('every load in every condition', () => {
  it('is fed from the supply through its devices and back by the same', () => {
    expect(stateOf(backupHome(), 'E1')).toMatchObject({
      fed: true,
      reversed: false,
      lineDevices: ['F1', 'P1', 'Q1', 'Q2', 'Q11'],
      neutralDevices: ['P1', 'Q1', 'Q2'],
      overcurrent: 'Q11',
      rcd: 'Q2',
    });
  });

  it('is fed through the inverter on mains and from it on battery', () => {
    expect(stateOf(backupHome(), 'E2')).toMatchObject({ fed: true, source: { kind: 'mains' }, rcd: 'Q5' });
    expect(stateOf(backupHome(), 'E2').lineDevices).toContain('G1');
    for (const condition of ['outage', 'main-off'])
      expect(stateOf(backupHome(), 'E2', condition)).toMatchObject({
        fed: true,
        source: { kind: 'backup' },
        lineDevices: ['Q4', 'Q5', 'Q21'],
        neutralDevices: ['Q4', 'Q5'],
      });
  });

  it('on mains only is rightly dead in an outage', () => {
    expect(stateOf(backupHome(), 'E1', 'outage')).toMatchObject({ fed: false, source: null });
  });

  it('is not fed while its neutral is open, and the line is still there', () => {
    expect(stateOf(smallHome().cut('JN11', 'E1'), 'E1')).toMatchObject({
      fed: false,
      neutralEdges: [],
      overcurrent: 'Q11',
    });
  });

  it('is told when it is the wrong way round', () => {
    expect(stateOf(smallHome().move('E1:L', 'S1:2', 'E1:N').move('E1:N', 'JN11', 'E1:L'), 'E1')).toMatchObject({
      fed: true,
      reversed: true,
    });
  });

  it('behind two-way switches is fed in a position that conducts', () => {
    expect(stateOf(smallHome().twoWay('E3', 'S3', 'S4', 'Q11'), 'E3').fed).toBe(true);
  });

  it('is read with a joint of two feeds taken out, and as drawn with it', () => {
    const home = backupHome().line('JL11', 'JL21');
    const { evaluated } = evaluate(buildGraph(home.document()));
    const outage = evaluated.find(({ condition }) => condition.name === 'outage')!;
    expect(outage.points.get('E1')!.fed).toBe(false);
    expect(outage.asDrawn.get('E1')!.source?.part.id).toBe('G1');
  });

  it('is read with a short circuit taken out', () => {
    const { evaluated } = evaluate(buildGraph(smallHome().line('JL11', 'JN11').document()));
    expect(evaluated[0]!.crossed).toHaveLength(1);
    expect(evaluated[0]!.points.get('E1')).toMatchObject({ fed: true, reversed: false });
  });
});
