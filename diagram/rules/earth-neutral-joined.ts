import { isSupplyJoint } from '../circuit/earth';
import { recalled, seen } from './clauses';
import { crossings } from './readings/crossings';
import { mainEarthHome } from './readings/lead-earth';
import { takeOut } from './readings/rewire';
import type { Rule } from './types';
import { sayWire } from './readings/words';

/** Neutral and earth joined downstream of the origin. */
export const earthNeutralJoined: Rule = {
  meta: {
    id: 'earth-neutral-joined',
    severity: 'danger',
    group: 'polarity',
    title: 'Neutral and earth are joined in the home',
    clauses: [recalled('IEC 60364-5-54', '543.4.3'), seen('IEC 60364-5-55', '551.4.3.2.1')],
    lesson:
      'Neutral and earth meet once, at the source. Where they meet again, load current runs in the earth cores and in the cases joined ' +
      'to them; an rcd before the joint trips for no visible reason, and if the neutral breaks, the cases carry it all.',
    remedy:
      'Take the joint out. The only joints allowed are inside the supply and the one an inverter makes for itself on battery.',
  },
  *check(context) {
    const { graph } = context;
    for (const { edge, wire, between, conditions } of crossings(context)) {
      if (!between.includes('N') || !between.includes('E')) continue;
      const { a, b } = graph.edges[edge]!;
      if (isSupplyJoint(graph, edge)) continue;
      yield {
        heading: 'Neutral and earth are joined',
        message: `The wire ${sayWire(context, wire)} joins neutral and earth. Load current then runs in the earth, and a broken neutral makes earthed cases live.`,
        parts: [graph.partOf[a]!.id, graph.partOf[b]!.id],
        wires: [wire],
        conditions,
        remedies: [takeOut('Take the joint out', [wire]), ...mainEarthHome(context, wire)],
      };
    }
  },
};
