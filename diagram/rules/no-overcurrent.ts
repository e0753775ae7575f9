import { byDesignation } from '../document/names';
import { isOvercurrent } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import { bareLines } from './readings/bare-lines';
import { deviceBehind } from './readings/device-behind';
import { hasWire } from './readings/earth-gaps';
import { capital, say, sayParts } from './readings/words';
import type { Rule } from './types';

/** A line conductor with no overcurrent device on its source side. */
export const noOvercurrent: Rule = {
  meta: {
    id: 'no-overcurrent',
    severity: 'danger',
    group: 'overload',
    title: 'Nothing limits the current of this conductor',
    clauses: [recalled('IEC 60364-4-43', '433.2.1'), recalled('IEC 60364-4-43', '434.2')],
    lesson:
      'A conductor without fuse or breaker before it carries whatever a fault asks for, until something burns through. The inverter is no ' +
      'fuse: it gives its full surge for seconds, and then again.',
    remedy: 'Put a breaker or fuse at the source end of the conductor.',
  },
  *check(context) {
    const { graph } = context;
    for (const { source, points, wires, conditions } of bareLines(context)) {
      const first = [...graph.parts.values()]
        .filter((part) => isOvercurrent(part) && hasWire(context, graph.node(part.id, '1')!))
        .sort(byDesignation);
      const what = points.size > 0 ? sayParts(context, points) : 'the line to the next device';
      yield {
        heading: `No overcurrent device after ${say(context, source.part.id)}`,
        message:
          source.kind === 'backup'
            ? `On battery no fuse or breaker lies between ${say(context, source.part.id)} and ${what}. A fault there is fed until something burns through.`
            : `${capital(what)} ${points.size === 1 || points.size === 0 ? 'hangs' : 'hang'} on the service with no fuse or breaker before ${points.size === 1 || points.size === 0 ? 'it' : 'them'}${first.length === 0 ? '; the drawing has none at all' : ''}.`,
        parts: [source.part.id, ...points],
        wires: [...wires],
        conditions: [...conditions],
        remedies: deviceBehind(context, source),
      };
    }
  },
};
