import type { PointState } from '../../circuit/evaluate';
import type { End, Part, Role, Wire } from '../../document/schema';
import type { Patch } from '../../document/patch';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { say } from './words';

/** Edits that remedies are made of: wires taken out, led elsewhere, or added beside what they belong to. */

/** The lowest number of a bar or joint that no wire is landed on. */
export function freeNumber({ document }: Context, bar: string): number {
  const used = new Set(
    document.wires.flatMap(({ from, to }) => [from, to]).flatMap(([id, mark]) => (id === bar ? [Number(mark)] : [])),
  );
  let next = 1;
  while (used.has(next)) next++;
  return next;
}

/** The next free terminal of a bar or joint; undefined where its count leaves none. */
export function freeOn(context: Context, bar: string): End | undefined {
  const mark = String(freeNumber(context, bar));
  return context.graph.node(bar, mark) === undefined ? undefined : [bar, mark];
}

/** An id that no wire has. */
export function newWireId({ document }: Context, stem: string): string {
  const ids = new Set(document.wires.map(({ id }) => id));
  let n = 1;
  while (ids.has(`${stem}.${n}`)) n++;
  return `${stem}.${n}`;
}

export const takeOut = (label: string, wires: readonly string[]): Remedy => ({
  label,
  patch: { remove: { wires: [...wires] } },
});

/** The same wire with the end at one part's terminal led to another. */
export function withEnd(wire: Wire, at: End, to: End): Wire {
  const here = ([part, mark]: End) => part === at[0] && mark === at[1];
  return here(wire.from) ? { ...wire, from: to } : { ...wire, to };
}

/** "Move the neutral to NB2": wires led to a bar or joint, each to a free terminal of it. */
export function moveTo(
  context: Context,
  what: string,
  ends: readonly { wire: Wire; at: End }[],
  bar: string,
): Remedy[] {
  const first = freeOn(context, bar);
  if (!first) return [];
  const wires = ends.map(({ wire, at }, i) => withEnd(wire, at, [bar, String(Number(first[1]) + i)]));
  return [{ label: `Move ${what} to ${say(context, bar)}`, patch: { set: { wires } } }];
}

/** A new wire of a role between an existing end and a bar or joint. */
export function joinTo(context: Context, role: Role, from: End, bar: string, cable?: string): Remedy[] {
  const to = freeOn(context, bar);
  if (!to) return [];
  const id = newWireId(context, from[0]);
  const wire: Wire = { id, from, to, role, ...(cable && { cable }) };
  return [{ label: `Join ${say(context, from[0])} to ${say(context, bar)}`, patch: { set: { wires: [wire] } } }];
}

/** Takes a part out of a conductor: its two wires become one, and the part goes where nothing else is joined to it. */
export function bridge(context: Context, label: string, part: string, sides: readonly [string, string]): Remedy[] {
  const wires = context.document.wires.filter(({ from, to }) => from[0] === part || to[0] === part);
  const at = (mark: string) =>
    wires.filter(({ from, to }) => [from, to].some((end) => end[0] === part && end[1] === mark));
  const [one, other] = [at(sides[0]), at(sides[1])];
  if (one.length !== 1 || other.length !== 1 || one[0] === other[0]) return [];
  const far = (wire: Wire): End => (wire.from[0] === part ? wire.to : wire.from);
  const joined: Wire = {
    ...one[0]!,
    from: far(one[0]!),
    to: far(other[0]!),
    ...(other[0]!.cable && { cable: other[0]!.cable }),
  };
  const patch: Patch = {
    set: { wires: [joined] },
    remove: { wires: [other[0]!.id], ...(wires.length === 2 && { parts: [part] }) },
  };
  return [{ label, patch }];
}

/** The wires at some terminals of a part led to others of it: "Change line and neutral over at Q14". */
export function turnMarks(
  { document }: Context,
  label: string,
  part: string,
  marks: Readonly<Record<string, string>>,
): Remedy[] {
  const turn = ([id, mark]: End): End => (id === part ? [id, marks[mark] ?? mark] : [id, mark]);
  const wires = document.wires
    .filter(({ from, to }) => [from, to].some(([id, mark]) => id === part && marks[mark] !== undefined))
    .map((wire) => ({ ...wire, from: turn(wire.from), to: turn(wire.to) }));
  return wires.length === 0 ? [] : [{ label, patch: { set: { wires } } }];
}

/** The cable in which a point's line comes from a place: a core added beside it runs in the same cable. */
export function cableFrom(
  { graph }: Context,
  state: PointState | undefined,
  place: string | undefined,
): string | undefined {
  for (const number of state?.lineEdges ?? []) {
    const { wire, a, b } = graph.edges[number]!;
    const places = [graph.partOf[a]!.place, graph.partOf[b]!.place];
    if (wire?.cable && places.includes(place) && places[0] !== places[1]) return wire.cable;
  }
  return undefined;
}

/**
 * Joints and bars of a place, or everywhere, that some node test allows; by designation of their place in the document.
 */
export const barsWhere = ({ graph }: Context, wanted: (part: Part, node: number) => boolean): Part[] => {
  const found: Part[] = [];
  graph.partOf.forEach((part, node) => {
    if (graph.markOf[node] === '' && wanted(part, node)) found.push(part);
  });
  return found;
};

/** A plug, taken away with its lead. */
export function takeLead(context: Context, plug: string): Remedy[] {
  const wires = context.document.wires.filter(({ from, to }) => from[0] === plug || to[0] === plug).map(({ id }) => id);
  const patch: Patch = { remove: { parts: [plug], ...(wires.length > 0 && { wires }) } };
  return [{ label: `Take ${say(context, plug)} and its lead away`, patch }];
}
