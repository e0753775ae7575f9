import type { Part } from '../document/schema';
import { MOST_COMBINED } from '../circuit/conditions';
import { isOvercurrent } from '../terminals/roles-of-parts';
import { recalled, seen } from './clauses';
import type { Context } from './context';
import { lineLoops } from './readings/line-loops';
import { openRegions } from './readings/open-regions';
import { takeOut } from './readings/rewire';
import { be, capital, say, sayParts, sayWire } from './readings/words';
import type { Rule } from './types';

/** One conductor joined to the lines of two overcurrent devices, or of mains and backup, at once. */
export const mixedFeeds: Rule = {
  meta: {
    id: 'mixed-feeds',
    severity: 'danger',
    group: 'separation',
    title: 'Two feeds meet on one conductor',
    clauses: [seen('BS 7671', '314.4'), recalled('IEC 60364-5-55', '551.6.1')],
    lesson:
      'Somebody switches off the breaker of the room and proves dead at the wrong point, or trusts it: the other breaker still feeds it. ' +
      'And the cable may carry the sum of both before either opens.',
    remedy:
      'Take out the link, so that each conductor hangs on one device; to move loads between sources use a changeover.',
  },
  *check(context) {
    const { graph } = context;
    for (const { edge, loop, conditions, switches } of lineLoops(context)) {
      const { wire, part, a, b } = graph.edges[edge]!;
      const limiting = devicesOf(context, loop, isOvercurrent);
      // Round an rcd or an isolator alone: what it opens stays live, and it does not see the current.
      const devices = limiting.length > 0 ? limiting : devicesOf(context, loop, ({ kind }) => BRIDGED.has(kind));
      const inverters = [
        ...new Set(
          loop.flatMap((number) => (graph.edges[number]!.kind === 'bypass' ? [graph.edges[number]!.part!] : [])),
        ),
      ];
      // A backup lead plugged into a mains outlet is the cause that backfeed and live-pins name already.
      if (devices.length === 0 || (!wire && inverters.length > 0)) continue;
      const nearest = [...new Set([devices[0]!, devices.at(-1)!])];
      const by = wire
        ? `The wire ${sayWire(context, wire.id)}`
        : `The lead plugged in at ${say(context, graph.partOf[b]!.id)}`;
      const when = switches.length > 0 ? ', in some positions of the two-way switches' : '';
      // A changeover in the loop joins both sources itself where it is wired the wrong way round.
      const changeovers = [edge, ...loop].flatMap((number) =>
        graph.edges[number]!.kind === 'changeover' ? [graph.edges[number]!.part!] : [],
      );
      const { heading, consequence } = tell(context, nearest, inverters);
      const ends = [a, b].map((node) => graph.partOf[node]!.id).filter((id) => !part || id !== part);
      yield {
        heading,
        message:
          nearest.length === 1
            ? `${by} leads round ${say(context, nearest[0]!)}${when}: switched off, it makes nothing dead, and it does not see the current.`
            : `${by} joins what ${sayParts(context, nearest)} feed${when}. With either off, both stay live from the other.${consequence}`,
        parts: [...new Set([...changeovers, ...nearest, ...(part ? [part] : []), ...ends])],
        wires: wire ? [wire.id] : [],
        remedies: wire ? [takeOut('Take the link out', [wire.id])] : [],
        conditions: inverters.length > 1 ? context.evaluated.map(({ condition }) => condition.name) : conditions,
      };
    }
    for (const { between, points, conditions } of openRegions(context)) {
      if (!between) continue;
      const who = sayParts(context, points);
      yield {
        heading: `${capital(who)} ${be(points.length)} between two lines`,
        message: `${capital(who)} ${points.length === 1 ? 'hangs' : 'hang'} between the line of ${say(context, between[0]!)} and the line of ${say(context, between[1]!)}: nothing works, and with one of them off its conductor is live through the load.`,
        parts: [...points, ...between],
        ...(conditions && { conditions }),
      };
    }
  },
  *lacks(context) {
    const { changeovers } = context.evaluation;
    if (changeovers.length <= MOST_COMBINED) return;
    yield {
      parts: changeovers.map(({ id }) => id),
      what: `all combinations of ${changeovers.length} changeovers: every two were looked at, the others all at A or all at B`,
    };
  },
};

const BRIDGED: ReadonlySet<Part['kind']> = new Set(['rcd', 'isolator']);

/** Devices of a sort in a loop, and inverters that it passes through. */
const devicesOf = ({ graph }: Context, loop: readonly number[], wanted: (part: Part) => boolean): string[] =>
  loop.flatMap((number) => {
    const { kind, part } = graph.edges[number]!;
    const device = graph.parts.get(part ?? '');
    return device && (kind === 'bypass' || (kind === 'device' && wanted(device))) ? [device.id] : [];
  });

/** What meets, and what follows from it beyond that neither device makes it dead. */
function tell(
  context: Context,
  nearest: readonly string[],
  inverters: readonly string[],
): { heading: string; consequence: string } {
  if (inverters.length > 1)
    return {
      heading: `The outputs of ${sayParts(context, inverters)} meet`,
      consequence: ' On battery two sources run against each other.',
    };
  if (inverters.length === 1)
    return {
      heading: 'Mains and backup meet on one conductor',
      consequence: ' In an outage the battery feeds back into the mains.',
    };
  const names = capital(sayParts(context, nearest));
  return { heading: nearest.length === 1 ? `${names} is bridged` : `${names} feed one conductor`, consequence: '' };
}
