import { natureOfRole } from '../circuit/natures';
import type { LinkKind } from '../terminals/links';
import { recalled } from './clauses';
import type { Context } from './context';
import { bridge } from './readings/rewire';
import type { Rule } from './types';
import { earthsByPlug } from './readings/earths-by-plug';
import { be, capital, say, sayParts } from './readings/words';

const OPENS: ReadonlySet<LinkKind | 'wire'> = new Set(['device', 'switch', 'select', 'changeover']);

/** The marks of each pole that carries an earth wire at both sides. */
function poles({ graph }: Context, id: string): [string, string][] {
  return graph.contactsOf.get(id)!.flatMap((number): [string, string][] => {
    const { a, b } = graph.edges[number]!;
    const earthed = (node: number) =>
      [...graph.wires.values()].some(
        (wire) => wire.role === 'earth' && [wire.from, wire.to].some(([part, mark]) => graph.node(part, mark) === node),
      );
    return earthed(a) && earthed(b) ? [[graph.markOf[a]!, graph.markOf[b]!]] : [];
  });
}

/** A contact or protective device in an earth path: wires of role earth at both sides of a pole, or earth that only it carries. */
export const switchedEarth: Rule = {
  meta: {
    id: 'switched-earth',
    severity: 'danger',
    group: 'polarity',
    title: 'A contact can open the earth',
    clauses: [recalled('IEC 60364-4-46', '461.2'), recalled('IEC 60364-5-54', '543.3.3')],
    lesson:
      'An earth that can be switched off is an earth that will be off when it is needed. Nobody notices: everything works ' +
      'until a fault puts line voltage on a case whose earth was opened long ago.',
    remedy: 'Take the earth past the contact in one piece, joint to joint.',
  },
  *check(context) {
    const { graph, earth } = context;
    const earthWires = (node: number) => {
      const ids: string[] = [];
      for (let k = graph.start[node]!; k < graph.start[node + 1]!; k++) {
        const { wire } = graph.edges[graph.around[k]!]!;
        if (wire && natureOfRole(wire.role) === 'E') ids.push(wire.id);
      }
      return ids;
    };
    const found = new Map<string, Set<string>>();
    graph.edges.forEach((edge, number) => {
      if (!OPENS.has(edge.kind)) return;
      const [a, b] = [earthWires(edge.a), earthWires(edge.b)];
      const drawn = a.length > 0 && b.length > 0;
      const carries = earth.reached.via[edge.a] === number || earth.reached.via[edge.b] === number;
      if (!drawn && !(carries && a.length + b.length > 0)) return;
      const wires = found.get(edge.part!) ?? new Set<string>();
      for (const id of [...a, ...b]) wires.add(id);
      found.set(edge.part!, wires);
    });
    for (const { plug, points, wires } of earthsByPlug(context)) {
      yield {
        heading: `The earth of ${sayParts(context, points)} hangs on ${say(context, plug)}`,
        message:
          `${capital(sayParts(context, points))} ${be(points.length)} fed past ${say(context, plug)} and earthed only through its pin. ` +
          'Pulled, it takes the earth away and leaves the line.',
        parts: [plug, ...points],
        wires,
      };
    }
    for (const [id, wires] of found) {
      yield {
        heading: `${say(context, id)} opens the earth`,
        message: `The earth runs through ${say(context, id)}. When it opens, everything behind it is without earth and nothing shows it.`,
        parts: [id],
        wires: [...wires],
        remedies: poles(context, id).flatMap((sides) =>
          bridge(context, `Take the earth past ${say(context, id)}`, id, sides),
        ),
      };
    }
  },
};
