import { applyPatch, type Patch } from '@/diagram/document/patch';
import type { Cable, Installation, Part, Wire } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { createExaminer } from '@/diagram/rules/incremental/examiner';
import { findWays } from '@/diagram/terminals/ways';
import { median, milliseconds } from './bench-time';

/** What a person does at the sheet, in one room after the other all over the home; each is a change every time. */
type Edit = (doc: Installation, room: string, times: number) => Patch;

const setPart = (part: Part, fields: object): Patch => ({ set: { parts: [{ ...part, ...fields } as Part] } });
const setCable = (cable: Cable, fields: Partial<Cable>): Patch => ({ set: { cables: [{ ...cable, ...fields }] } });
const inRoom = (doc: Installation, kind: Part['kind'], room: string): Part[] =>
  doc.parts.filter((part) => part.kind === kind && part.place === room);
const wiresAt = (doc: Installation, id: string): Wire[] =>
  doc.wires.filter(({ from, to }) => from[0] === id || to[0] === id);

/** The breaker of a room's first lamp. */
function breakerOf(doc: Installation, room: string): Part {
  const lamp = inRoom(doc, 'lamp', room)[0]!;
  const way = findWays(doc).find(({ parts }) => parts.includes(lamp.id))!;
  return doc.parts.find(({ id }) => id === way.device)!;
}

function cableTo(doc: Installation, room: string): Cable {
  const wire = wiresAt(doc, inRoom(doc, 'socket', room).at(-1)!.id).find(({ cable }) => cable !== undefined)!;
  return doc.cables.find(({ id }) => id === wire.cable)!;
}

/** An appliance beside an outlet, on the same conductors. */
const addLoad: Edit = (doc, room, times) => {
  const [beside] = inRoom(doc, 'socket', room);
  const id = `added${times}`;
  const roles = { L: 'line', N: 'neutral', E: 'earth' } as const;
  const wires = (['L', 'N', 'E'] as const).map((mark): Wire => ({
    id: `${id}.${mark}`,
    from: [beside!.id, mark],
    to: [id, mark],
    role: roles[mark],
  }));
  return { set: { parts: [{ id, kind: 'appliance', watts: 100, class: 1, place: room }], wires } };
};

/** The earth of the last outlet to another one of its way. */
const moveWire: Edit = (doc, room) => {
  const [first, second, ...others] = inRoom(doc, 'socket', room);
  const wire = doc.wires.find(({ to }) => to[0] === others.at(-1)!.id && to[1] === 'E')!;
  const from = wire.from[0] === first!.id ? second! : first!;
  return { set: { wires: [{ ...wire, from: [from.id, 'E'] }] } };
};

const deleteLast: Edit = (doc, room) => {
  const { id } = inRoom(doc, 'socket', room).at(-1)!;
  return { remove: { parts: [id], wires: wiresAt(doc, id).map((wire) => wire.id) } };
};

const EDITS: Readonly<Record<string, Edit>> = {
  position: (doc, room, times) => ({
    set: { overview: { [inRoom(doc, 'lamp', room)[0]!.id]: { x: 100 * times, y: 0 } } },
  }),
  label: (doc, room, times) => setPart(inRoom(doc, 'lamp', room)[0]!, { label: `Lamp, ${times}` }),
  rating: (doc, room, times) => setPart(breakerOf(doc, room), { rating: 16 + 4 * (times % 3) }),
  watts: (doc, room, times) => setPart(inRoom(doc, 'lamp', room)[0]!, { watts: 5 + (times % 50) }),
  csa: (doc, room) => setCable(cableTo(doc, room), { csa: cableTo(doc, room).csa === 4 ? 6 : 4 }),
  length: (doc, room, times) => setCable(cableTo(doc, room), { length: 3 + (times % 50) }),
  'load added': addLoad,
  'wire moved': moveWire,
  'part deleted': deleteLast,
};

/** Edits in a row of each kind; the home is examined from scratch beside every fourth. */
const TIMES = 48;

/**
 * By kind of edit, how many times longer the home takes from scratch than after the edit: medians, both taken in turns. The
 * two answers are held against each other.
 */
export function timeEdits(home: Installation): Record<string, number> {
  const rooms = home.places.map(({ id }) => id).filter((room) => inRoom(home, 'lamp', room).length > 2);
  const examiner = createExaminer();
  return Object.fromEntries(
    Object.entries(EDITS).map(([kind, edit]) => {
      let doc = home;
      examiner.examine(doc);
      const whole: number[] = [];
      const part: number[] = [];
      for (let times = 0; times < TIMES; times++) {
        // 7 has no factor in common with the number of rooms: each is visited before one is visited again.
        doc = applyPatch(doc, edit(doc, rooms[(7 * times) % rooms.length]!, times));
        part.push(milliseconds(() => examiner.examine(doc), 1));
        if (times % 4 !== 3) continue;
        whole.push(milliseconds(() => examine(doc), 1));
        if (JSON.stringify(examiner.examine(doc)) !== JSON.stringify(examine(doc)))
          throw new Error(`${kind}: the two examinations differ`);
      }
      return [kind, median(whole) / median(part)];
    }),
  );
}
