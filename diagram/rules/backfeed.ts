import { reach, reaches, pathTo } from '../terminals/reach';
import { closedEdges } from '../terminals/reach';
import type { Context } from './context';
import { recalled, seen } from './clauses';
import { lineLoops } from './readings/line-loops';
import { once } from './readings/once';
import { takeLead, takeOut } from './readings/rewire';
import type { Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** Line terminals that only the mains may make live: from the supply up to the main switch. */
const upstreamLine = once(({ graph, mainSwitch }: Context): Set<number> => {
  const closed = closedEdges(
    graph,
    (edge) =>
      edge.kind === 'bypass' ||
      edge.kind === 'changeover' ||
      edge.kind === 'bond' ||
      (edge.kind !== 'wire' && edge.part === mainSwitch?.id),
  );
  const starts = [...graph.parts.values()]
    .filter(({ kind }) => kind === 'supply')
    .map(({ id }) => graph.node(id, 'L')!);
  const walk = reach(graph, starts, closed);
  // Without a main switch the walk runs on into the home: only the service itself counts then.
  return new Set(
    mainSwitch ? walk.order : walk.order.filter((node) => ['supply', 'meter'].includes(graph.partOf[node]!.kind)),
  );
});

/** On outage the mains line is live from a backup source; the same joint puts the source on live mains when they return. */
export const backfeed: Rule = {
  meta: {
    id: 'backfeed',
    severity: 'danger',
    group: 'separation',
    title: 'The battery feeds back into the mains',
    clauses: [recalled('IEC 60364-5-55', '551.6.1'), seen('IEC 60364-5-55', '551.7.4')],
    lesson:
      'In an outage a lineman works on a line that is switched off and proved dead. A home that feeds backwards puts 230 V ' +
      'on it, and the transformer makes thousands of that. When the mains return, the inverter meets them head on.',
    remedy: 'Take out the joint between the backup output and the mains side; two sources meet only in a changeover.',
  },
  *check(context) {
    const { graph } = context;
    const upstream = upstreamLine(context);
    const found = new Map<string, { conditions: string[]; path: number[] }>();
    for (const { condition, drawn } of context.evaluated) {
      if (condition.base === 'mains') continue;
      for (const source of condition.sources) {
        if (source.kind !== 'backup') continue;
        const hit = drawn.flatMap(({ closed }) => {
          const walk = reach(graph, [source.line], closed);
          const node = walk.order.find((each) => upstream.has(each));
          return node === undefined || !reaches(walk, node) ? [] : [pathTo(graph, walk, node)];
        })[0];
        if (!hit) continue;
        const entry = found.get(source.part.id) ?? { conditions: [], path: hit };
        entry.conditions.push(condition.name);
        found.set(source.part.id, entry);
      }
    }
    for (const [inverter, { conditions, path }] of found) {
      const joints = lineLoops(context).filter(({ loop }) =>
        loop.some((n) => graph.edges[n]!.kind === 'bypass' && graph.edges[n]!.part === inverter),
      );
      const plugs = path.flatMap((n) => (graph.edges[n]!.kind === 'plug' ? [graph.edges[n]!.part!] : []));
      const sockets = plugs.flatMap((id) => {
        const plug = graph.parts.get(id)!;
        return plug.kind === 'plug' && plug.in ? [plug.in] : [];
      });
      const wires = joints.flatMap(({ edge }) => graph.edges[edge]!.wire?.id ?? []);
      const by =
        plugs.length > 0
          ? `through ${sayParts(context, plugs)} in ${sayParts(context, sockets)}`
          : wires.length > 0
            ? `over the joint at ${sayParts(
                context,
                joints.flatMap(({ edge }) =>
                  [graph.edges[edge]!.a, graph.edges[edge]!.b].map((n) => graph.partOf[n]!.id),
                ),
              )}`
            : 'over its output';
      yield {
        heading: `${capital(say(context, inverter))} feeds the street`,
        message: `In an outage ${say(context, inverter)} makes the mains side live ${by}: the board, the meter and the service line. When the mains return, both meet.`,
        parts: [...new Set([inverter, ...plugs, ...sockets])],
        wires: plugs.length > 0 ? [] : wires,
        conditions,
        remedies:
          plugs.length > 0
            ? plugs.flatMap((id) => takeLead(context, id))
            : wires.length > 0
              ? [takeOut('Take the joint out', wires)]
              : [],
      };
    }
  },
};
