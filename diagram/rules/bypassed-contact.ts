import { COMMON_PRACTICE } from './clauses';
import { bypassedContacts } from './readings/bypassed';
import { neutralContacts } from './readings/neutral-contacts';
import { takeOut } from './readings/rewire';
import type { Rule } from './types';
import { capital, say, sayWire } from './readings/words';

/** A control switch both of whose terminals are joined elsewhere. */
export const bypassedContact: Rule = {
  meta: {
    id: 'bypassed-contact',
    severity: 'defect',
    group: 'polarity',
    title: 'A switch that switches nothing',
    clauses: [COMMON_PRACTICE],
    lesson:
      'Both terminals of the switch are joined by another way, so whatever its lever says, the circuit stays closed. Somebody will trust the lever.',
    remedy: 'Take out the wire that joins its two sides.',
  },
  *check(context) {
    // A two-pole switch whose line pole is bridged opens the neutral alone: the danger is said, not this.
    const dangerous = new Set(neutralContacts(context).switched.flatMap(({ contacts }) => contacts));
    for (const { part, wires } of bypassedContacts(context)) {
      if (dangerous.has(part)) continue;
      yield {
        heading: `${capital(say(context, part))} switches nothing`,
        message: `The two sides of ${say(context, part)} are joined past it: open or closed, what it should switch stays on.`,
        parts: [part],
        wires,
        remedies: wires.map((id) => takeOut(`Take out the wire ${sayWire(context, id)}`, [id])),
      };
    }
  },
};
