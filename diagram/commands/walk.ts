import { isBar } from '../document/kinds';
import type { End, Installation, Kind, Part, Role } from '../document/schema';
import { linksOf } from '../terminals/links';

/** Which conductor a terminal belongs to, as seen from the sources. */
export type Conductor = 'L' | 'N' | 'E' | '+' | '-';

/** How a terminal is reached from its source. */
export interface Step {
  conductor: Conductor;
  /** the terminal before it, towards the source; null at the source itself */
  from: End | null;
  /** the wire between the two; null where they are joined inside a part */
  wire: string | null;
  /** a control switch lies between the source and here */
  switched: boolean;
  /** steps from the source */
  depth: number;
}

export type Walk = ReadonlyMap<string, Step>;

export const endKey = ([part, mark]: End): string => `${part} ${mark}`;

const CONTROL: ReadonlySet<Kind> = new Set(['switch', 'switch-2way', 'switch-cross', 'switch-2pole', 'regulator']);

type Near = { to: End; wire: string | null };

/** Each terminal's neighbours: along its wires, and inside its part. */
function neighbours(doc: Installation): Map<string, Near[]> {
  const near = new Map<string, Near[]>();
  const join = (a: End, b: End, wire: string | null) => {
    for (const [at, to] of [
      [a, b],
      [b, a],
    ] as const) {
      const list = near.get(endKey(at));
      if (list) list.push({ to, wire });
      else near.set(endKey(at), [{ to, wire }]);
    }
  };
  const screws = new Map<string, Set<string>>();
  for (const wire of doc.wires) {
    join(wire.from, wire.to, wire.id);
    for (const [part, mark] of [wire.from, wire.to]) screws.set(part, (screws.get(part) ?? new Set()).add(mark));
  }
  for (const part of doc.parts) {
    for (const { kind, from, to } of linksOf(part)) if (kind !== 'bond') join([part.id, from], [part.id, to], null);
    if (part.kind === 'plug' && part.in)
      for (const mark of ['L', 'N', 'E']) join([part.id, mark], [part.in, mark], null);
    if (!isBar(part.kind)) continue;
    const [first, ...rest] = [...(screws.get(part.id) ?? [])].sort();
    if (first) for (const mark of rest) join([part.id, first], [part.id, mark], null);
  }
  return near;
}

const sourcesOf = (part: Part): [string, Conductor][] => {
  switch (part.kind) {
    case 'supply':
      return [
        ['L', 'L'],
        ['N', 'N'],
        ['E', 'E'],
      ];
    case 'electrode':
      return [['E', 'E']];
    case 'battery':
      return [
        ['+', '+'],
        ['-', '-'],
      ];
    default:
      return [];
  }
};

/**
 * Follows every conductor away from its source, nearest first: the supply and the electrode, the batteries, then an
 * inverter's output where no mains reaches it. What is not in the answer has no source behind it.
 */
export function walkFromSources(doc: Installation): Walk {
  const near = neighbours(doc);
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const steps = new Map<string, Step>();
  const spread = (start: [End, Conductor][]) => {
    const queue: End[] = [];
    for (const [end, conductor] of start) {
      if (steps.has(endKey(end))) continue;
      steps.set(endKey(end), { conductor, from: null, wire: null, switched: false, depth: 0 });
      queue.push(end);
    }
    for (let i = 0; i < queue.length; i++) {
      const from = queue[i]!;
      const { conductor, switched, depth } = steps.get(endKey(from))!;
      for (const { to, wire } of near.get(endKey(from)) ?? []) {
        if (steps.has(endKey(to)) || !parts.has(to[0])) continue;
        const passes = wire === null && CONTROL.has(parts.get(to[0])!.kind);
        steps.set(endKey(to), { conductor, from, wire, switched: switched || passes, depth: depth + 1 });
        queue.push(to);
      }
    }
  };
  spread(
    doc.parts.flatMap((part) =>
      sourcesOf(part).map(([mark, conductor]): [End, Conductor] => [[part.id, mark], conductor]),
    ),
  );
  spread(
    doc.parts.flatMap((part): [End, Conductor][] =>
      part.kind === 'inverter'
        ? [
            [[part.id, 'out.L'], 'L'],
            [[part.id, 'out.N'], 'N'],
          ]
        : [],
    ),
  );
  return steps;
}

/** The conductor that a terminal is made for, whether or not anything reaches it; null where it may be any. */
export function conductorOfMark(part: Part, mark: string): Conductor | null {
  if (part.kind === 'earth-bar' || part.kind === 'bond' || mark === 'E' || mark.endsWith('.E')) return 'E';
  if (part.kind === 'neutral-bar' || mark === 'N' || mark.endsWith('.N')) return 'N';
  if (mark === '+' || mark === 'bat.+') return '+';
  if (mark === '-' || mark === 'bat.-') return '-';
  if (part.kind === 'line-bar' || mark === 'L' || mark.endsWith('.L')) return 'L';
  if (part.kind === 'joint') return null;
  if (part.kind === 'meter') return mark === '1' || mark === '4' ? 'L' : 'N';
  if (part.kind === 'fuse') return null;
  if (part.kind === 'switch-cross') return 'L';
  return mark === '3' || mark === '4' || mark === 'A3' || mark === 'B3' ? 'N' : 'L';
}

/** The role that a conductor has by name; switched and strappers are told apart by whoever draws them. */
export const ROLE_OF: Record<Conductor, Role> = { L: 'line', N: 'neutral', E: 'earth', '+': 'dc+', '-': 'dc-' };
