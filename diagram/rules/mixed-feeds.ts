import { isOvercurrent } from '../terminals/roles-of-parts';
import { recalled, seen } from './clauses';
import { lineLoops } from './readings/line-loops';
import type { Rule } from './types';
import { capital, say, sayParts, sayWire } from './readings/words';

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
      const devices = loop.flatMap((number) => {
        const each = graph.edges[number]!;
        const device = graph.parts.get(each.part ?? '');
        return each.kind === 'bypass' || (device && isOvercurrent(device)) ? [device!.id] : [];
      });
      const bothSources = loop.some((number) => graph.edges[number]!.kind === 'bypass');
      // A backup lead plugged into a mains outlet is the cause that backfeed and live-pins name already.
      if (!wire && bothSources) continue;
      if (devices.length === 0) continue;
      const nearest = [...new Set([devices[0]!, devices.at(-1)!])];
      const by = wire
        ? `The wire ${sayWire(context, wire.id)}`
        : `The lead plugged in at ${say(context, graph.partOf[b]!.id)}`;
      const when = switches.length > 0 ? ', in some positions of the two-way switches' : '';
      yield {
        heading: bothSources
          ? 'Mains and backup meet on one conductor'
          : `${capital(sayParts(context, nearest))} ${nearest.length === 1 ? 'is bridged' : 'feed one conductor'}`,
        message:
          (nearest.length === 1
            ? `${by} leads round ${say(context, nearest[0]!)}${when}: switched off, it makes nothing dead, and it does not see the current.`
            : `${by} joins what ${sayParts(context, nearest)} feed${when}. With either off, both stay live from the other.`) +
          (bothSources ? ' In an outage the battery feeds back into the mains.' : ''),
        parts: [
          ...new Set([
            ...nearest,
            ...(part ? [part] : []),
            ...[a, b].map((node) => graph.partOf[node]!.id).filter((id) => !part || id !== part),
          ]),
        ],
        wires: wire ? [wire.id] : [],
        conditions,
      };
    }
  },
};
