import { isBar, terminalsOf } from '@/diagram/document/kinds';
import type { Patch } from '@/diagram/document/patch';
import type { End, Installation, Part, Wire } from '@/diagram/document/schema';
import { isLoad } from '@/diagram/terminals/roles-of-parts';

/** What a person does at the sheet, with numbers that say where: each gives a change of a drawing, or none where it has no place. */
export interface Numbers {
  a: number;
  b: number;
  c: number;
}
export type Edit = (doc: Installation, numbers: Numbers) => Patch | null;

const pick = <T>(list: readonly T[], number: number): T | undefined => list[number % Math.max(1, list.length)];
const wiresAt = (doc: Installation, id: string): Wire[] =>
  doc.wires.filter(({ from, to }) => from[0] === id || to[0] === id);
const setPart = (part: Part | undefined, fields: object): Patch | null =>
  part ? { set: { parts: [{ ...part, ...fields } as Part] } } : null;
const without = <T extends object>(item: T, field: string): T =>
  Object.fromEntries(Object.entries(item).filter(([key]) => key !== field)) as T;

/** A terminal of a part; on a bar or joint one that is free. */
function terminalOf(doc: Installation, part: Part, number: number): End {
  if (!isBar(part.kind)) return [part.id, pick(terminalsOf(part), number)!];
  const used = wiresAt(doc, part.id).flatMap(({ from, to }) => [from, to].filter(([id]) => id === part.id));
  return [part.id, String(1 + Math.max(0, ...used.map(([, mark]) => Number(mark))))];
}

const freshId = (doc: Installation, stem: string): string => {
  const taken = new Set([...doc.parts, ...doc.wires, ...doc.cables].map(({ id }) => id));
  for (let i = 1; ; i++) if (!taken.has(`${stem}${i}`)) return `${stem}${i}`;
};

const devices = (doc: Installation) => doc.parts.filter(({ kind }) => kind === 'mcb' || kind === 'rcbo');
const loads = (doc: Installation) => doc.parts.filter(isLoad);
const points = (doc: Installation) => doc.parts.filter((part) => isLoad(part) || part.kind === 'socket');

const rate: Edit = (doc, { a, b }) => setPart(pick(devices(doc), a), { rating: pick([6, 10, 16, 20, 32, 40], b)! });
const unrate: Edit = (doc, { a }) => {
  const part = pick(devices(doc), a);
  return part ? { set: { parts: [without(part, 'rating')] } } : null;
};
const retype: Edit = (doc, { a, b }) => setPart(pick(devices(doc), a), { curve: pick(['B', 'C', 'D'], b)! });
const label: Edit = (doc, { a, b }) =>
  setPart(pick(doc.parts, a), { label: pick(['Kitchen', 'Oven', 'Study lights', ''], b)! });
const designate: Edit = (doc, { a, b }) => setPart(pick(doc.parts, a), { ref: pick(['E1', 'Q2', 'Q31', 'S7'], b)! });
const consume: Edit = (doc, { a, b }) => setPart(pick(loads(doc), a), { watts: pick([0, 9, 40, 75, 2000, 3000], b)! });
const assume: Edit = (doc, { a, b }) => {
  const socket = pick(
    doc.parts.filter(({ kind }) => kind === 'socket'),
    a,
  );
  return setPart(socket, { load: pick([100, 500, 2500], b)! });
};
const forget: Edit = (doc, { a }) => {
  const part = pick(loads(doc), a);
  return part ? { set: { parts: [without(part, 'watts')] } } : null;
};
const relay: Edit = (doc, { a, b }) => {
  const cable = pick(doc.cables, a);
  return cable
    ? { set: { cables: [{ ...cable, ...pick([{ csa: 1 }, { csa: 10 }, { length: 3 }, { length: 90 }, { grouped: 3 }], b)! }] } }
    : null;
};

/** One end of a wire to another terminal of the same room. */
const moveEnd: Edit = (doc, { a, b, c }) => {
  const wire = pick(doc.wires, a);
  const near = doc.parts.find(({ id }) => id === wire?.to[0]);
  const other = pick(
    doc.parts.filter(({ place }) => place === near?.place),
    b,
  );
  return wire && other ? { set: { wires: [{ ...wire, to: terminalOf(doc, other, c) }] } } : null;
};

/** A load beside another, on the same conductors. */
const addLoad: Edit = (doc, { a, b }) => {
  const beside = pick(points(doc), a);
  if (!beside) return null;
  const id = freshId(doc, 'new');
  const part = {
    id,
    kind: pick(['lamp', 'fan', 'appliance'] as const, b)!,
    watts: 30,
    class: 1 as const,
    ...(beside.place !== undefined && { place: beside.place }),
  };
  const wires = (['L', 'N', 'E'] as const).map((mark): Wire => ({
    id: `${id}.${mark}`,
    from: [beside.id, mark],
    to: [id, mark],
    role: ({ L: 'line', N: 'neutral', E: 'earth' } as const)[mark],
  }));
  return { set: { parts: [part], wires } };
};

/** A lead from one point into an outlet; or, where there is one already, its plug into another outlet or into none. */
const plugIn: Edit = (doc, { a, b, c }) => {
  const sockets = doc.parts.filter(({ kind }) => kind === 'socket');
  const socket = pick(sockets, a);
  const plug = doc.parts.find(({ kind }) => kind === 'plug');
  if (!socket) return null;
  if (plug) return { set: { parts: [c % 3 === 0 ? without(plug, 'in') : ({ ...plug, in: socket.id } as Part)] } };
  const load = pick(points(doc), b)!;
  const id = freshId(doc, 'plug');
  const wires = (['L', 'N', 'E'] as const).map((mark): Wire => ({
    id: `${id}.${mark}`,
    from: [load.id, mark],
    to: [id, mark],
    role: ({ L: 'line', N: 'neutral', E: 'earth' } as const)[mark],
  }));
  return { set: { parts: [{ id, kind: 'plug', in: socket.id }], wires } };
};

const takeAway = (doc: Installation, part: Part | undefined): Patch | null => {
  if (!part) return null;
  const wires = wiresAt(doc, part.id).map(({ id }) => id);
  return { remove: { parts: [part.id], ...(wires.length > 0 && { wires }) } };
};
const removeLoad: Edit = (doc, { a }) => takeAway(doc, pick(points(doc), a));
const removeDevice: Edit = (doc, { a }) => takeAway(doc, pick(devices(doc), a));
const removeAnything: Edit = (doc, { a, b }) => {
  const part = pick(doc.parts, a);
  return b % 2 === 0 ? takeAway(doc, part) : part ? { remove: { parts: [part.id] } } : null;
};
const removeWire: Edit = (doc, { a }) => {
  const wire = pick(doc.wires, a);
  return wire ? { remove: { wires: [wire.id] } } : null;
};

/** A neutral from its bar to another one. */
const moveNeutral: Edit = (doc, { a, b }) => {
  const bars = doc.parts.filter(({ kind }) => kind === 'neutral-bar');
  const ids = new Set(bars.map(({ id }) => id));
  const wire = pick(
    doc.wires.filter(({ from, to }) => ids.has(from[0]) || ids.has(to[0])),
    a,
  );
  const bar = pick(bars, b);
  if (!wire || !bar) return null;
  const end = terminalOf(doc, bar, 0);
  return { set: { wires: [ids.has(wire.from[0]) ? { ...wire, from: end } : { ...wire, to: end }] } };
};

/** A wire between any two terminals. */
const join: Edit = (doc, { a, b, c }) => {
  const [one, other] = [pick(doc.parts, a), pick(doc.parts, b)];
  if (!one || !other || one === other) return null;
  const role = pick(['line', 'neutral', 'earth', 'switched'] as const, c)!;
  const wire: Wire = { id: freshId(doc, 'link'), from: terminalOf(doc, one, c), to: terminalOf(doc, other, c >> 4), role };
  return { set: { wires: [wire] } };
};
const recolour: Edit = (doc, { a, b }) => {
  const wire = pick(doc.wires, a);
  return wire ? { set: { wires: [{ ...wire, colour: pick(['BN', 'BU', 'GNYE', 'RD'], b)! }] } } : null;
};
const redraw: Edit = (doc, { a, b }) => {
  const wire = pick(doc.wires, a);
  return wire ? { set: { wires: [{ ...wire, role: pick(['line', 'neutral', 'earth'] as const, b)! }] } } : null;
};
const changeTrunk: Edit = (doc, { a, b }) => {
  const trunk = doc.parts.filter(({ kind }) => ['rcd', 'isolator', 'fuse', 'inverter', 'battery'].includes(kind));
  return b % 4 === 0
    ? { set: { supply: { ...doc.supply, zln: pick([0.2, 0.35, 0.8], a)! } } }
    : setPart(pick(trunk, a), pick([{ rating: 25 }, { rating: 63 }, { ref: 'F9' }], b)!);
};
const notice: Edit = (doc, { a }) => {
  const place = pick(doc.places, a);
  return place ? { set: { notices: [...(doc.notices ?? []), { place: place.id, text: 'Two sources' }] } } : null;
};
const present: Edit = (doc, { a, b }) => {
  const part = pick(doc.parts, a);
  return part ? { set: { title: `Home ${b % 5}`, overview: { [part.id]: { x: b * 100, y: 0 } } } } : null;
};

/** Edits within a way: most of what a person does. */
export const WITHIN: readonly Edit[] = [
  rate,
  retype,
  label,
  designate,
  consume,
  assume,
  relay,
  moveEnd,
  addLoad,
  removeLoad,
  recolour,
  present,
];
/** Mistakes and edits of what the ways hang on. */
export const BEYOND: readonly Edit[] = [
  unrate,
  forget,
  removeDevice,
  removeAnything,
  removeWire,
  moveNeutral,
  join,
  plugIn,
  redraw,
  changeTrunk,
  notice,
];
