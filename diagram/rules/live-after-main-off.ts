import { byDesignation, listNames } from '../document/names';
import type { Part } from '../document/schema';
import { reach } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';
import { recalled, seen } from './clauses';
import type { Context } from './context';
import { once } from './readings/once';
import type { Rule } from './types';
import { inOrder, say, sayParts } from './readings/words';

/** By backup source, the parts that it keeps live on `main-off`, and in which of those conditions. */
export const liveOnMainOff = once((context: Context): Map<string, { live: Set<string>; conditions: string[] }> => {
  const { graph } = context;
  const found = new Map<string, { live: Set<string>; conditions: string[] }>();
  for (const inverter of context.backups) {
    const live = new Set<string>();
    const conditions: string[] = [];
    for (const { condition, drawn } of context.evaluated) {
      if (condition.base !== 'main-off') continue;
      const source = condition.sources.find(({ part }) => part.id === inverter.id);
      const line = source ? source.line : graph.node(inverter.id, 'out.L')!;
      const starts = source ? [line] : condition.sources.map((each) => each.line);
      const reached = drawn
        .flatMap(({ closed }) => reach(graph, starts, closed).order)
        .map((node) => graph.partOf[node]!.id);
      if (!reached.some((id) => id !== inverter.id && graph.parts.get(id)!.kind !== 'supply')) continue;
      for (const id of reached) live.add(id);
      conditions.push(condition.name);
    }
    found.set(inverter.id, { live, conditions });
  }
  return found;
});

/** Names of the places that parts stand in, in order of the first part in each. */
function placesOf({ graph }: Context, ids: ReadonlySet<string>): string[] {
  const firsts = new Map<string, Part>();
  for (const id of ids) {
    const part = graph.parts.get(id)!;
    if (part.place === undefined) continue;
    const known = firsts.get(part.place);
    if (!known || byDesignation(part, known) < 0) firsts.set(part.place, part);
  }
  return [...firsts.values()].sort(byDesignation).flatMap(({ place }) => graph.places.get(place!)?.name ?? []);
}

/** What stays live when the main switch is off: the notice and the isolation order are written from it. */
export const liveAfterMainOff: Rule = {
  meta: {
    id: 'live-after-main-off',
    severity: 'advice',
    group: 'separation',
    title: 'Parts stay live when the main switch is off',
    clauses: [seen('BS 7671', '514.15.1'), recalled('EN 50110-1', '6.2')],
    lesson:
      'Everybody has learned: main switch off, home dead. With a battery that is no longer so. Whoever does not know it opens a ' +
      'switchboard with one hand on a live bar.',
    remedy:
      'Fix the notice at the board, write the order of isolation into the file, and switch the backup output off as well.',
  },
  *check(context) {
    const { graph, mainSwitch } = context;
    for (const inverter of context.backups) {
      const { live, conditions } = liveOnMainOff(context).get(inverter.id)!;
      const ways = context.ways.filter(({ device }) => live.has(device) && device !== inverter.id);
      const points = [...live].filter((id) => isPoint(graph.parts.get(id)!));
      if (points.length === 0) continue;
      const places = listNames(placesOf(context, live));
      const sockets = points.filter((id) => graph.parts.get(id)!.kind === 'socket');
      yield {
        heading: `With ${say(context, mainSwitch!.id)} off, ${say(context, inverter.id)} is still there`,
        message:
          `With the main switch off these stay live from ${say(context, inverter.id)}: ${
            ways.length > 0
              ? `ways ${ways.map(({ number }) => number).join(', ')} (${sayParts(
                  context,
                  ways.map(({ device }) => device),
                )})`
              : 'its output'
          }` +
          `${sockets.length > 0 ? `, ${sayParts(context, sockets)}` : ''}${places ? `; in ${places}` : ''}. Isolate both before work.`,
        parts: [inverter.id, ...ways.map(({ device }) => device), ...inOrder(context, sockets).map(({ id }) => id)],
        conditions,
      };
    }
  },
};
