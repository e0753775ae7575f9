import { describe, expect, it } from 'vitest';
import { Drawing } from '@/diagram/document/builder';
import { backupHome, smallHome } from '@/diagram/document/home';
import { buildGraph } from '@/diagram/terminals/graph';
import { closedEdges, groups, pathTo, reach, reaches } from '@/diagram/terminals/reach';

describe('the net graph', () => {
  it('has one node a terminal, and one for all terminals of a bar or joint', () => {
    const graph = buildGraph(smallHome().document());
    expect(graph.node('NB', '1')).toBe(graph.node('NB', '17'));
    expect(graph.node('Q11', '1')).not.toBe(graph.node('Q11', '2'));
    expect(graph.node('E1', 'L')).not.toBe(graph.node('E1', 'N'));
  });

  it('knows no terminal that the part does not have', () => {
    const graph = buildGraph(smallHome().set('NB', { count: 4 }).document());
    expect(graph.node('Q11', '3')).toBeUndefined();
    expect(graph.node('NB', '5')).toBeUndefined();
    expect(graph.node('NB', '0')).toBeUndefined();
    expect(graph.node('nobody', '1')).toBeUndefined();
  });

  it('keeps wires that end nowhere apart', () => {
    const graph = buildGraph(smallHome().line('JL11', 'GONE:1').line('JL11', 'S1:3').document());
    expect(graph.loose).toHaveLength(2);
    expect(graph.wires.size).toBe(graph.document.wires.length - 2);
  });

  it.each([
    ['fuse', 1],
    ['meter', 2],
    ['mcb', 1],
    ['rcd', 2],
    ['rcbo', 2],
    ['isolator', 2],
    ['switch', 1],
    ['switch-2pole', 2],
    ['regulator', 1],
    ['switch-2way', 2],
    ['switch-cross', 4],
    ['changeover', 4],
    ['lamp', 0],
    ['spd', 0],
    ['battery', 0],
  ] as const)('has the contacts of a %s: %i', (kind, count) => {
    const graph = buildGraph(new Drawing().part(kind, 'A').document());
    expect(graph.contactsOf.get('A') ?? []).toHaveLength(count);
  });

  it('has the contacts of an inverter, the bond only where it makes one', () => {
    const kinds = (bond: boolean) =>
      buildGraph(new Drawing().part('inverter', 'G1', undefined, { bond }).document()).edges.map(({ kind }) => kind);
    expect(kinds(false)).toEqual(['bypass', 'through', 'ground']);
    expect(kinds(true)).toEqual(['bypass', 'through', 'ground', 'bond']);
  });

  it('joins the pins of a plug with its socket, and not with anything else', () => {
    const plugged = (into: string) =>
      buildGraph(
        new Drawing().part('socket', 'X1').part('lamp', 'E1').part('plug', 'PL1', undefined, { in: into }).document(),
      ).edges.length;
    expect(plugged('X1')).toBe(3);
    expect(plugged('E1')).toBe(0);
    expect(plugged('nobody')).toBe(0);
  });

  it('is walked over closed edges, and tells the way', () => {
    const graph = buildGraph(smallHome().document());
    const all = closedEdges(graph, ({ kind }) => kind === 'bond');
    const walk = reach(graph, [graph.node('SUP', 'L')!], all);
    expect(reaches(walk, graph.node('E1', 'L'))).toBe(true);
    expect(reaches(walk, graph.node('E1', 'N'))).toBe(false);
    const parts = pathTo(graph, walk, graph.node('E1', 'L')!).flatMap((edge) => graph.edges[edge]!.part ?? []);
    expect(parts).toEqual(['F1', 'P1', 'Q1', 'Q2', 'Q11', 'S1']);
    const open = closedEdges(graph, ({ part }) => part === 'S1');
    expect(reaches(reach(graph, [graph.node('SUP', 'L')!], open), graph.node('E1', 'L'))).toBe(false);
  });

  it('groups what is joined', () => {
    const graph = buildGraph(backupHome().document());
    const group = groups(
      graph,
      closedEdges(graph, ({ kind }) => kind !== 'wire'),
    );
    const at = (part: string, mark: string) => group[graph.node(part, mark)!];
    expect(at('LB', '1')).toBe(at('Q11', '1'));
    expect(at('Q11', '1')).not.toBe(at('Q11', '2'));
  });
});
