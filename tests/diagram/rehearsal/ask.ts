import type { Fault } from '@/diagram/circuit/fault-types';
import type { Installation } from '@/diagram/document/schema';
import { createRehearsal, type Rehearsed } from '@/diagram/rehearsal/rehearse';
import type { Walk } from '@/diagram/rehearsal/walk';

interface Put {
  condition?: string;
  supply?: 'live' | 'dead';
  moved?: Record<string, string>;
  faults?: Fault[];
  hand?: string;
}

/** A rehearsal of a home in few words. */
export function ask(
  doc: Installation,
  { condition, supply = 'live', moved = {}, faults = [], hand }: Put = {},
): Rehearsed {
  return createRehearsal(doc)({
    stance: { supply, moved },
    ...(condition && { condition }),
    faults,
    hand: hand ?? null,
  });
}

/** The walk of an answer; fails where there is none. */
export function walkOf(answer: Rehearsed): Walk {
  if (!answer.outcome || !('walk' in answer.outcome)) throw new Error(JSON.stringify(answer.outcome));
  return answer.outcome.walk;
}

/** Ids of the points that have more than half their voltage. */
export const fedIn = ({ figures }: Rehearsed): string[] =>
  Object.entries(figures.parts)
    .filter(([, { load }]) => load !== undefined && load.volts > 115)
    .map(([id]) => id)
    .sort();
