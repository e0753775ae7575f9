import type { Context } from '../context';
import { reaches } from '../../terminals/reach';
import { isLoad } from '../../terminals/roles-of-parts';
import { once } from './once';

/** What a set of two-way and cross switches does to one lamp, fan or appliance. */
export interface TruthTable {
  point: string;
  switches: string[];
  /** by position number: the point is fed */
  fed: boolean[];
  /** switches that in some position of the others change nothing */
  idle: string[];
  condition: string;
}

/** Truth tables of all points that two-way and cross switches of more than one place work; in the first condition in which they work. */
export const truthTables = once((context: Context): TruthTable[] => {
  const { graph, evaluation } = context;
  const tables: TruthTable[] = [];
  const sets = evaluation.positions.sets.filter(({ switches }) => switches.length > 1);
  if (sets.length === 0) return tables;
  for (const part of graph.parts.values()) {
    if (!isLoad(part)) continue;
    const [l, n] = [graph.node(part.id, 'L')!, graph.node(part.id, 'N')!];
    for (const { condition, stands } of context.evaluated) {
      const fed = stands.map(
        ({ line, neutral, shorted }) =>
          !shorted &&
          line.some(
            (walk, i) => (reaches(walk, l) && reaches(neutral[i]!, n)) || (reaches(walk, n) && reaches(neutral[i]!, l)),
          ),
      );
      if (!fed.includes(true) || (!fed.includes(false) && !touchesSet(context, part.id))) continue;
      const set = sets.find(({ switches }) => touches(context, part.id, switches));
      if (!set) continue;
      const idle = set.switches.filter((_, bit) => fed.some((now, position) => now === fed[position ^ (1 << bit)]));
      tables.push({ point: part.id, switches: set.switches, fed, idle, condition: condition.name });
      break;
    }
  }
  return tables;
});

const touchesSet = (context: Context, point: string): boolean =>
  context.evaluation.positions.sets.some(({ switches }) => switches.length > 1 && touches(context, point, switches));

/** True when a point's end lies on the same stretch as a terminal of the switches, line and neutral rails apart. */
function touches(context: Context, point: string, switches: readonly string[]): boolean {
  const { graph, evaluation } = context;
  const group = evaluation.positions.group;
  const rails = evaluation.positions.isRail;
  const ends = ['L', 'N'].map((mark) => graph.node(point, mark)!).filter((node) => !rails(node));
  const at = new Set(
    switches
      .flatMap((id) => graph.contactsOf.get(id)!.flatMap((number) => [graph.edges[number]!.a, graph.edges[number]!.b]))
      .map((node) => group[node]!),
  );
  return ends.some((node) => at.has(group[node]!));
}
