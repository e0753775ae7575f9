import { polesOf } from '../../document/kinds';
import type { Part } from '../../document/schema';
import { pathTo, reach, reaches } from '../../terminals/reach';
import { isPoint } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** Contacts that open a neutral alone, with the points whose neutral they open. */
export interface NeutralContact {
  contacts: string[];
  points: string[];
  wires: string[];
  conditions: string[];
}

/** Opens one pole and nothing else with it. */
const isSingle = (part: Part): boolean =>
  part.kind === 'switch' ||
  part.kind === 'switch-2way' ||
  part.kind === 'switch-cross' ||
  part.kind === 'regulator' ||
  (part.kind === 'isolator' && polesOf(part) === 1);

const isFuse = (part: Part): boolean =>
  (part.kind === 'fuse' && part.standard !== 'dc') || (part.kind === 'mcb' && polesOf(part) === 1);

function collect(
  into: Map<string, NeutralContact>,
  contacts: string[],
  point: string,
  wires: string[],
  condition: string,
) {
  const key = contacts.join(' ');
  const entry = into.get(key) ?? { contacts, points: [], wires: [], conditions: [] };
  if (!entry.points.includes(point)) entry.points.push(point);
  for (const wire of wires) if (!entry.wires.includes(wire)) entry.wires.push(wire);
  if (!entry.conditions.includes(condition)) entry.conditions.push(condition);
  into.set(key, entry);
}

/**
 * Single-pole contacts and fuses in the neutral of points that are fed the right way round. A point that is fed the wrong
 * way round is left to the rule of polarity: there the neutral is what the drawing calls line.
 */
export const neutralContacts = once((context: Context) => {
  const { graph } = context;
  const switched = new Map<string, NeutralContact>();
  const fused = new Map<string, NeutralContact>();
  const partAt = (edge: number) => graph.parts.get(graph.edges[edge]!.part ?? '');
  for (const { condition, stands, points } of context.evaluated) {
    for (const stand of stands.filter(({ shorted }) => !shorted)) {
      condition.sources.forEach((source, i) => {
        const neutral = stand.neutral[i]!;
        const opened = stand.closed.slice();
        let found = false;
        graph.edges.forEach((edge, number) => {
          const part = partAt(number);
          if (edge.kind === 'wire' || !part || !(isSingle(part) || isFuse(part) || part.kind === 'switch-2pole'))
            return;
          opened[number] = 0;
          found ||= reaches(neutral, edge.a) && reaches(neutral, edge.b);
        });
        if (!found) return;
        const without = reach(graph, [source.neutral], opened);
        for (const part of graph.parts.values()) {
          if (!isPoint(part) || points.get(part.id)!.reversed) continue;
          const n = graph.node(part.id, 'N')!;
          const l = graph.node(part.id, 'L')!;
          if (!reaches(neutral, n) || reaches(without, n) || !stand.line.some((walk) => reaches(walk, l))) continue;
          const path = pathTo(graph, neutral, n);
          const linePath = stand.line.flatMap((walk) => (reaches(walk, l) ? pathTo(graph, walk, l) : []));
          const inLine = new Set(linePath.map((number) => graph.edges[number]!.part));
          const at = (wanted: (p: Part) => boolean) => path.filter((number) => wanted(partAt(number) ?? part));
          const both = (p: Part) => p.kind === 'switch-2pole' && !inLine.has(p.id);
          const control = at((p) => isSingle(p) || both(p));
          const fuses = at(isFuse);
          const wiresBeside = (edges: number[]) =>
            edges.flatMap((number) => {
              const index = path.indexOf(number);
              return [path[index - 1], path[index + 1]].flatMap((beside) => graph.edges[beside ?? -1]?.wire?.id ?? []);
            });
          const ids = (edges: number[]) => [...new Set(edges.map((number) => graph.edges[number]!.part!))].sort();
          if (control.length > 0) collect(switched, ids(control), part.id, wiresBeside(control), condition.name);
          for (const id of ids(fuses)) {
            const own = fuses.filter((number) => graph.edges[number]!.part === id);
            collect(fused, [id], part.id, wiresBeside(own), condition.name);
          }
        }
      });
    }
  }
  return { switched: [...switched.values()], fused: [...fused.values()] };
});
