import { findById, type Cable, type Installation, type Part, type Wire } from '../../document/schema';
import type { Difference } from './difference';

/** Fields that move no current: what a thing is called, where it stands, and what a device is rated for. */
const QUIET: Record<'parts' | 'wires' | 'cables', ReadonlySet<string>> = {
  parts: new Set(['ref', 'label', 'board', 'rating', 'curve', 'icn', 'sensitivity', 'type', 'delay', 'spare']),
  wires: new Set(['colour']),
  cables: new Set(['ref', 'method', 'grouped', 'ambient', 'cores']),
};

const loud = (item: Part | Wire | Cable, quiet: ReadonlySet<string>): string =>
  JSON.stringify(Object.entries(item).filter(([field]) => !quiet.has(field)).sort());

/** True when nothing differs that the currents of the home go by. */
export function isQuiet(before: Installation, after: Installation, difference: Difference): boolean {
  return (['parts', 'wires', 'cables'] as const).every((list) =>
    difference[list].every((id) => {
      const [a, b] = [before, after].map((doc) => findById<Part | Wire | Cable>(doc[list], id));
      return a !== undefined && b !== undefined && loud(a, QUIET[list]) === loud(b, QUIET[list]);
    }),
  );
}
