import { recalled } from './clauses';
import { neutralFaultsOf } from './readings/neutral-faults';
import { neutralRemedies } from './readings/move-neutral';
import type { Rule } from './types';
import { turnMarks } from './readings/rewire';
import { capital, say, sayParts } from './readings/words';

/** An rcd whose two poles do not carry the same current in normal use. */
export const residualImbalance: Rule = {
  meta: {
    id: 'residual-imbalance',
    severity: 'defect',
    group: 'separation',
    title: 'An rcd sees load current as a fault',
    clauses: [recalled('IEC 60364-5-53', '531.3.1')],
    lesson:
      'An rcd compares what goes out with what comes back. If a neutral goes round it, every lamp that is switched on looks like a fault, ' +
      'and the rcd trips until somebody bridges it out of annoyance.',
    remedy: 'Take line and neutral of the load through the same rcd.',
  },
  *check(context) {
    for (const fault of neutralFaultsOf(context, 'imbalance')) {
      const { points, wires, devices, conditions, link, turned } = fault;
      const rcds = sayParts(context, devices);
      const cause = turned
        ? `Line enters ${rcds} at one end and neutral at the other, so that the two currents add up instead of cancelling.`
        : link ? `A wire leads neutral round ${rcds}.` : `The line of ${sayParts(context, points)} passes ${rcds}, the neutral goes round it.`;
      yield {
        heading: `${capital(rcds)} trips in normal use`,
        message: `${cause} As soon as current flows, ${rcds} sees it as a fault and trips.`,
        parts: wires.length === 0 ? devices : [...devices, ...points],
        wires,
        conditions,
        remedies: turned
          ? devices.flatMap((id) => turnMarks(context, `Turn the neutral of ${say(context, id)} round`, id, { 3: '4', 4: '3' }))
          : neutralRemedies(context, fault),
      };
    }
  },
};
