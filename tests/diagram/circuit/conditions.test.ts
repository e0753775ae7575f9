import { describe, expect, it } from 'vitest';
import { Drawing } from '@/diagram/document/builder';
import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { listConditions } from '@/diagram/circuit/conditions';
import { hasBattery } from '@/diagram/circuit/inverters';
import { findMainSwitch } from '@/diagram/circuit/main-switch';
import { buildGraph } from '@/diagram/terminals/graph';

const namesOf = (drawing: Drawing) => listConditions(buildGraph(drawing.document())).list.map(({ name }) => name);

/** Puts a changeover between the mains bars and the backup bars. */
const withChangeover = (home: Home, id = 'Q8') =>
  home.part('changeover', id, 'hall', { poles: 2 }).line('LB', `${id}:A1`).line('LB2', `${id}:B1`);

describe('conditions', () => {
  it('are mains alone without a backup source', () => expect(namesOf(smallHome())).toEqual(['mains']));
  it('are three with one', () => expect(namesOf(backupHome())).toEqual(['mains', 'outage', 'main-off']));
  it('are mains alone while the inverter is off', () =>
    expect(namesOf(backupHome({ state: 'off' }))).toEqual(['mains']));
  it('are mains alone without a battery', () => expect(namesOf(backupHome().drop('G2'))).toEqual(['mains']));
  it('are each taken in every position of a changeover', () => {
    expect(namesOf(withChangeover(backupHome()))).toEqual([
      'mains/A',
      'mains/0',
      'mains/B',
      'outage/A',
      'outage/0',
      'outage/B',
      'main-off/A',
      'main-off/0',
      'main-off/B',
    ]);
  });
  it('are taken in every combination of two changeovers', () => {
    const names = namesOf(withChangeover(withChangeover(backupHome()), 'Q9'));
    expect(names).toHaveLength(27);
    expect(new Set(names).size).toBe(27);
    expect(names).toContain('outage/0B');
  });
  it('stay few with many changeovers', () => {
    let home = backupHome();
    for (let i = 0; i < 6; i++) home = withChangeover(home, `Q8${i}`);
    expect(namesOf(home).length).toBeLessThan(80);
  });

  it('join an inverter through on mains and part it on battery', () => {
    const graph = buildGraph(backupHome({ neutral: 'separate' }).document());
    const closed = (name: string, kind: string) => {
      const condition = listConditions(graph).list.find((each) => each.name === name)!;
      return condition.closed[graph.edges.findIndex((edge) => edge.kind === kind)] === 1;
    };
    expect([closed('mains', 'bypass'), closed('mains', 'through')]).toEqual([true, true]);
    expect([closed('outage', 'bypass'), closed('outage', 'through')]).toEqual([false, false]);
  });

  it('leave an inverter that is fed before the main switch on mains when that is open', () => {
    const home = backupHome().cut('LB0', 'Q3').cut('NB0', 'Q3').line('P1:4', 'Q3:1').neutral('P1:3', 'Q3:3');
    const { list, mainSwitch } = listConditions(buildGraph(home.document()));
    expect(mainSwitch!.id).toBe('Q1');
    expect([...list.find(({ name }) => name === 'main-off')!.onBattery]).toEqual([]);
    expect([...list.find(({ name }) => name === 'outage')!.onBattery]).toEqual(['G1']);
  });
});

describe('hasBattery', () => {
  const has = (home: Home) =>
    hasBattery(
      buildGraph(home.document()),
      home.document().parts.find(({ id }) => id === 'G1')!,
    );
  it('sees batteries in series', () =>
    expect(
      has(
        backupHome()
          .cut('G2:-', 'G1')
          .part('battery', 'G5', 'hall')
          .wire('dc-', 'G2:-', 'G5:+')
          .wire('dc-', 'G5:-', 'G1:bat.-'),
      ),
    ).toBe(true));
  it('sees none where a lead is missing', () => expect(has(backupHome().cut('G2:-', 'G1'))).toBe(false));
  it('sees none where the leads are joined past it', () =>
    expect(has(backupHome().drop('G2').wire('dc-', 'F2:1', 'G1:bat.-'))).toBe(false));
});

describe('findMainSwitch', () => {
  const main = (drawing: Drawing) => findMainSwitch(buildGraph(drawing.document()))?.id;
  it('is the first isolator after the meter', () => expect(main(smallHome())).toBe('Q1'));
  it('is a two-pole breaker where there is no isolator', () =>
    expect(
      main(
        smallHome()
          .cut('P1:4', 'Q1')
          .cut('P1:3', 'Q1')
          .cut('Q1', 'LB0')
          .cut('Q1', 'NB0')
          .drop('Q1')
          .part('mcb', 'Q7', 'hall', { poles: 2, rating: 40 })
          .line('P1:4', 'Q7:1')
          .neutral('P1:3', 'Q7:3')
          .line('Q7:2', 'LB0')
          .neutral('Q7:4', 'NB0'),
      ),
    ).toBe('Q7'));
  it('is the rcd where there is neither', () => {
    const home = smallHome().drop('Q1').drop('LB0').drop('NB0').drop('F9').line('P1:4', 'Q2:1').neutral('P1:3', 'Q2:3');
    expect(main(home)).toBe('Q2');
  });
  it('is not the switch of one appliance', () => {
    const home = smallHome()
      .drop('Q1')
      .drop('LB0')
      .drop('NB0')
      .drop('F9')
      .line('P1:4', 'Q2:1')
      .neutral('P1:3', 'Q2:3')
      .place('den')
      .way('Q12', 'den')
      .part('isolator', 'Q90', 'den', { poles: 2 })
      .part('appliance', 'E9', 'den')
      .line('JL12', 'Q90:1')
      .neutral('JN12', 'Q90:3')
      .line('Q90:2', 'E9:L')
      .neutral('Q90:4', 'E9:N');
    expect(main(home)).toBe('Q2');
  });
  it('is nothing in an empty drawing', () => expect(main(new Drawing())).toBeUndefined());
});
