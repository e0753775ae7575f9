import { describe, expect, it } from 'vitest';
import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { traceFeeds } from '@/diagram/terminals/feeds';
import { buildGraph } from '@/diagram/terminals/graph';
import { findSections, findWays } from '@/diagram/terminals/ways';

describe('findWays', () => {
  it('numbers mains ways in order of designation, then backup ways', () => {
    const home = backupHome().place('den').way('Q9', 'den').socket('X9', 'Q9').document();
    expect(findWays(home).map(({ number, device, backup }) => [number, device, backup])).toEqual([
      [1, 'Q3', false],
      [2, 'Q9', false],
      [3, 'Q11', false],
      [4, 'Q21', true],
    ]);
  });

  it('takes no feeder for a way: service fuse and backup output feed devices only', () => {
    expect(findWays(backupHome().document()).map(({ device }) => device)).not.toEqual(
      expect.arrayContaining(['F1', 'Q4']),
    );
  });

  it('takes no spare breaker, and no dc fuse', () => {
    const home = backupHome().part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, spare: true }).line('LB', 'Q12:1');
    expect(findWays(home.document()).map(({ device }) => device)).toEqual(['Q3', 'Q11', 'Q21']);
  });

  it('has the parts, wires and places of line, neutral and earth, and nothing of another way', () => {
    const home = new Home()
      .place('study')
      .place('den')
      .way('Q11', 'study')
      .lamp('E1', 'S1', 'Q11')
      .way('Q12', 'den')
      .lamp('E2', 'S2', 'Q12');
    const [way] = findWays(home.document());
    expect(way!.parts).toEqual(['E1', 'JE11', 'JL11', 'JN11', 'Q11', 'S1']);
    expect(way!.places).toEqual(['study']);
    expect(way!.wires).toContain(home.wireBetween('NB', 'JN11'));
    expect(way!.wires).toContain(home.wireBetween('EB', 'JE11'));
    expect(way!.wires).not.toContain(home.wireBetween('LB', 'Q11:1'));
    expect(way!.wires).not.toContain(home.wireBetween('NB', 'JN12'));
  });

  it('knows which side of a breaker is fed, whichever terminal it is', () => {
    const home = smallHome().cut('LB', 'Q11').cut('Q11', 'JL11').line('LB', 'Q11:2').line('Q11:1', 'JL11', 'k11');
    const graph = buildGraph(home.document());
    const section = findSections(graph).find(({ device }) => device.id === 'Q11')!;
    expect(section.upstream).toBe(graph.node('Q11', '2'));
    expect(section.downstream).toBe(graph.node('Q11', '1'));
    expect(section.points.map(({ id }) => id)).toEqual(['E1', 'X1']);
  });

  it('stops at the next overcurrent device', () => {
    const sections = findSections(buildGraph(backupHome().document()));
    const section = (id: string) => sections.find(({ device }) => device.id === id)!;
    expect(section('F1').next).toEqual(['Q11', 'Q3']);
    expect(section('F1').points).toEqual([]);
    expect(section('Q3').inverters.map(({ id }) => id)).toEqual(['G1']);
    expect(section('Q4')).toMatchObject({ next: ['Q21'], backup: true });
  });
});

describe('traceFeeds', () => {
  it('shows what lies behind an inverter as backed up, all else as mains, and earth as neither', () => {
    const home = backupHome();
    const { parts, wires } = traceFeeds(home.document());
    expect(['E1', 'Q2', 'F1', 'NB', 'Q3'].map((id) => parts.get(id))).toEqual(Array(5).fill('mains'));
    expect(['E2', 'Q5', 'LB2', 'G1', 'G2', 'X2'].map((id) => parts.get(id))).toEqual(Array(6).fill('backup'));
    expect(parts.get('EB')).toBe('none');
    expect(wires.get(home.wireBetween('Q21', 'JL21'))).toBe('backup');
    expect(wires.get(home.wireBetween('NB2', 'JN21'))).toBe('backup');
    expect(wires.get(home.wireBetween('NB', 'JN11'))).toBe('mains');
    expect(wires.get(home.wireBetween('EB', 'JE21'))).toBe('none');
  });

  it('shows what a changeover may feed from the battery as backed up', () => {
    const home = smallHome()
      .backup()
      .place('shed')
      .part('changeover', 'Q8', 'hall', { poles: 2 })
      .part('socket', 'X8', 'shed')
      .line('LB', 'Q8:A1')
      .neutral('NB', 'Q8:A3')
      .line('LB2', 'Q8:B1')
      .neutral('NB2', 'Q8:B3')
      .line('Q8:2', 'X8:L')
      .neutral('Q8:4', 'X8:N');
    expect(traceFeeds(home.document()).parts.get('X8')).toBe('backup');
  });

  it('shows what nothing feeds as none', () => {
    expect(traceFeeds(smallHome().part('lamp', 'E9', 'study').document()).parts.get('E9')).toBe('none');
  });
});
