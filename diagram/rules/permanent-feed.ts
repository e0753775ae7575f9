import type { Part, Wire } from '../document/schema';
import type { Edge } from '../terminals/graph';
import { closedEdges, groups, reach, reaches } from '../terminals/reach';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import { bypassedContacts } from './readings/bypassed';
import { neutralContacts } from './readings/neutral-contacts';
import { freeRef, newPartId } from './readings/put-in';
import { reversedPoints } from './readings/reversals';
import { newWireId } from './readings/rewire';
import { truthTables } from './readings/switch-sets';
import { capital, say } from './readings/words';
import type { Remedy, Rule } from './types';

/** A regulator turns down to off and a plug is pulled: both leave a person a way to have it dark. */
const commands = (edge: Edge): boolean => edge.kind === 'switch' || edge.kind === 'select' || edge.kind === 'plug';

/** Points whose unswitched line another rule has told already. */
function told(context: Context): Set<string> {
  const { graph } = context;
  const points = new Set([
    ...reversedPoints(context),
    ...neutralContacts(context).switched.flatMap((each) => each.points),
  ]);
  for (const { point, idle } of truthTables(context)) if (idle.length > 0) points.add(point);
  // A bypassed switch makes everything on its stretch permanent.
  const stretch = groups(
    graph,
    closedEdges(graph, ({ kind }) => kind !== 'wire' && kind !== 'plug'),
  );
  const bypassed = new Set(
    bypassedContacts(context).flatMap(({ part }) =>
      graph.contactsOf.get(part)!.map((n) => stretch[graph.edges[n]!.a]!),
    ),
  );
  for (const { points: states } of context.evaluated)
    for (const { part, lineEnd } of states.values()) if (bypassed.has(stretch[lineEnd]!)) points.add(part.id);
  return points;
}

/** A switch where the line of the point begins, in its own place: the core that is there becomes the switched one. */
function switchBefore(context: Context, id: string): Remedy[] {
  const { graph, document } = context;
  const part = graph.parts.get(id)!;
  const wires = document.wires.filter(({ from, to }) => [from, to].some(([at, mark]) => at === id && mark === 'L'));
  const [wire] = wires;
  if (!wire || wires.length > 1) return [];
  const [near, far] = wire.from[0] === id ? [wire.from, wire.to] : [wire.to, wire.from];
  const place = graph.parts.get(far[0])!.place;
  if (place !== part.place) return [];
  const control: Part = {
    id: newPartId(context, `${id}.switch`),
    kind: 'switch',
    ref: freeRef(context, 'S'),
    ...(place !== undefined && { place }),
  };
  const switched: Wire = { ...wire, from: [control.id, '2'], to: near, role: 'switched' };
  const line: Wire = { id: newWireId(context, control.id), from: far, to: [control.id, '1'], role: 'line' };
  return [{ label: 'Put a switch into its line', patch: { set: { parts: [control], wires: [switched, line] } } }];
}

/** A lamp or fan with no control switch in its line. */
export const permanentFeed: Rule = {
  meta: {
    id: 'permanent-feed',
    severity: 'defect',
    group: 'polarity',
    title: 'A lamp or fan that nothing switches',
    clauses: [COMMON_PRACTICE],
    lesson:
      'Its line comes straight from the way. It burns day and night, and whoever changes the lamp must go to the board to have it dead.',
    remedy: 'Lead its line through a switch.',
  },
  *check(context) {
    const { graph } = context;
    const known = told(context);
    const found = new Set<string>();
    for (const { condition, stands, points } of context.evaluated) {
      const closed = stands[0]!.closed.slice();
      graph.edges.forEach((edge, number) => {
        if (commands(edge)) closed[number] = 0;
      });
      const lines = condition.sources.map(({ line }) => reach(graph, [line], closed));
      for (const state of points.values()) {
        const { kind, id } = state.part;
        if ((kind !== 'lamp' && kind !== 'fan') || !state.fed || known.has(id)) continue;
        if (lines.some((walk) => reaches(walk, state.lineEnd))) found.add(id);
      }
    }
    for (const id of found)
      yield {
        heading: `Nothing switches ${say(context, id)}`,
        message: `${capital(say(context, id))} is joined to its way with no switch in the line: it is always on.`,
        parts: [id],
        remedies: switchBefore(context, id),
      };
  },
};
