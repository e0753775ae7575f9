import type { Context } from '../context';
import { reaches } from '../../terminals/reach';
import { isLoad } from '../../terminals/roles-of-parts';
import type { SwitchSet } from '../../circuit/positions';
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

/** The set of more than one switch on whose stretch a node lies, line and neutral rails apart. */
function setAt(context: Context): (node: number) => SwitchSet | undefined {
  const { graph, evaluation } = context;
  const { sets, group, isRail } = evaluation.positions;
  const atGroup = new Map<number, SwitchSet>();
  for (const set of sets) {
    if (set.switches.length < 2) continue;
    for (const id of set.switches)
      for (const number of graph.contactsOf.get(id)!)
        for (const node of [graph.edges[number]!.a, graph.edges[number]!.b])
          if (!isRail(node)) atGroup.set(group[node]!, set);
  }
  return (node) => (isRail(node) ? undefined : atGroup.get(group[node]!));
}

/**
 * Truth tables of all points that two-way and cross switches of more than one place work; in the first condition in
 * which they work.
 */
export const truthTables = once((context: Context): TruthTable[] => {
  const { graph, evaluation } = context;
  if (evaluation.positions.sets.length === 0) return [];
  const setOf = setAt(context);
  const tables: TruthTable[] = [];
  for (const part of graph.parts.values()) {
    if (!isLoad(part)) continue;
    const [l, n] = [graph.node(part.id, 'L')!, graph.node(part.id, 'N')!];
    const set = setOf(l) ?? setOf(n);
    if (!set) continue;
    for (const { condition, stands } of context.evaluated) {
      const fed = stands.map(
        ({ line, neutral, shorted }) =>
          !shorted &&
          line.some(
            (walk, i) => (reaches(walk, l) && reaches(neutral[i]!, n)) || (reaches(walk, n) && reaches(neutral[i]!, l)),
          ),
      );
      if (!fed.includes(true)) continue;
      const { flips } = evaluation.positions;
      const idle = set.switches.filter((_, at) => flips(set, at).some(([one, other]) => fed[one] === fed[other]));
      tables.push({ point: part.id, switches: set.switches, fed, idle, condition: condition.name });
      break;
    }
  }
  return tables;
});
