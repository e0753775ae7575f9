import { nameOf } from '../document/names';
import type { Graph } from '../terminals/graph';
import { isBar } from '../document/kinds';
import type { Standing } from './assemble';
import type { Evaluated } from './evaluate';
import type { Nature } from './natures';

/** A wire of the drawing that joins what must stay apart: a fault that is there before any is put in. */
export interface DrawnJoint {
  edge: number;
  /** the part at which it is told */
  part: string;
  event: string;
}

const WORD: Record<Nature, string> = { L: 'line', N: 'neutral', E: 'earth', D: 'a battery lead' };

/**
 * Puts back what was taken out of a standing because it joins line, neutral and earth: a home that is drawn so is
 * walked so.
 * @returns the standing with them, and each with its words; the short circuits first
 */
export function withJoints(
  graph: Graph,
  { crossed }: Evaluated,
  standing: Standing,
): { standing: Standing; joints: DrawnJoint[] } {
  if (crossed.length === 0) return { standing, joints: [] };
  const closed = standing.closed.slice();
  for (const { edge } of crossed) closed[edge] = 1;
  const joints = [...crossed]
    .sort((a, b) => Number(b.between.includes('L')) - Number(a.between.includes('L')) || a.edge - b.edge)
    .map(({ edge, between }): DrawnJoint => {
      const ends = [graph.edges[edge]!.a, graph.edges[edge]!.b].map((node) => graph.partOf[node]!);
      const part = ends.find(({ kind }) => !isBar(kind)) ?? ends[0]!;
      const [one, other] = [...between].sort((a, b) => 'LNED'.indexOf(a) - 'LNED'.indexOf(b)) as [Nature, Nature];
      return {
        edge,
        part: part.id,
        event: `as drawn, ${WORD[one]} and ${WORD[other]} are joined at ${nameOf(graph.document, part)}`,
      };
    });
  return { standing: { ...standing, closed }, joints };
}
