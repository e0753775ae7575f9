import type { LinkKind } from '../../terminals/links';
import { closedEdges, groups, pathTo, reach } from '../../terminals/reach';
import type { Context } from '../context';
import { once } from './once';

const CONTROLS: ReadonlySet<LinkKind | 'wire'> = new Set(['switch', 'select']);

/** Control contacts whose two sides are joined by wires alone, with the wires that do it. Through a device it is a mixed feed. */
export const bypassedContacts = once((context: Context): { part: string; wires: string[] }[] => {
  const { graph } = context;
  const crossed = new Set(context.evaluated.flatMap((each) => each.crossed.map(({ edge }) => edge)));
  const closed = closedEdges(graph, (edge) => edge.kind !== 'wire' && edge.kind !== 'plug');
  for (const edge of crossed) closed[edge] = 0;
  const group = groups(graph, closed);
  const found = new Map<string, Set<string>>();
  graph.edges.forEach(({ kind, a, b, part }) => {
    if (!CONTROLS.has(kind) || group[a] !== group[b]) return;
    const wires = found.get(part!) ?? new Set<string>();
    const around = pathTo(graph, reach(graph, [a], closed), b).flatMap((number) => graph.edges[number]!.wire?.id ?? []);
    for (const id of around) wires.add(id);
    found.set(part!, wires);
  });
  return [...found].map(([part, wires]) => ({ part, wires: [...wires].sort() }));
});
