import type { End, Part, Role, Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { newWireId } from './rewire';

/** Remedies that put a new part into conductors that are there. */

/** An id that no part has. */
export function newPartId({ graph }: Context, stem: string): string {
  let n = 1;
  while (graph.parts.has(`${stem}.${n}`)) n++;
  return `${stem}.${n}`;
}

/** The lowest free designation of a letter: "Q5". */
export function freeRef({ document }: Context, letter: string): string {
  const taken = new Set(document.parts.map(({ ref }) => ref));
  let n = 1;
  while (taken.has(`${letter}${n}`)) n++;
  return `${letter}${n}`;
}

/** One conductor that the new part goes into: all that is landed on `at` is led to its `out`, and `into` is joined to `at`. */
export interface Pole {
  at: End;
  into: string;
  out: string;
  role: Role;
}

const isAt = ([part, mark]: End, at: End): boolean => part === at[0] && mark === at[1];

/** Puts a part right behind some terminals, whole poles at a time. */
export function putBehind(context: Context, label: string, part: Part, poles: readonly Pole[]): Remedy[] {
  const wires: Wire[] = [];
  for (const { at, into, out, role } of poles) {
    const landed = context.document.wires.filter(({ from, to }) => isAt(from, at) || isAt(to, at));
    if (landed.length === 0) return [];
    for (const wire of landed) {
      const before = wires.findIndex(({ id }) => id === wire.id);
      const now = before < 0 ? wire : wires[before]!;
      const led: Wire = isAt(now.from, at) ? { ...now, from: [part.id, out] } : { ...now, to: [part.id, out] };
      if (before < 0) wires.push(led);
      else wires[before] = led;
    }
    wires.push({ id: newWireId(context, `${part.id}.${into}`), from: at, to: [part.id, into], role });
  }
  return [{ label, patch: { set: { parts: [part], wires } } }];
}
