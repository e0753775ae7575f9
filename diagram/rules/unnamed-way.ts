import { seen } from './clauses';
import type { Rule } from './types';
import { say } from './readings/words';

/** A way without a label for the circuit chart. */
export const unnamedWay: Rule = {
  meta: {
    id: 'unnamed-way',
    severity: 'advice',
    group: 'drawing',
    title: 'A way without a name',
    clauses: [seen('BS 7671', '514.1.2')],
    lesson:
      'In the dark, with something smoking, nobody traces wires. The chart on the door must say what each breaker feeds.',
    remedy: 'Write what the way feeds.',
  },
  *check(context) {
    for (const { device, label, number } of context.ways) {
      if (label.trim() !== '') continue;
      yield {
        heading: `Way ${number} has no name`,
        message: `${say(context, device)} feeds way ${number}, and the circuit chart has no word for it.`,
        parts: [device],
      };
    }
  },
};
