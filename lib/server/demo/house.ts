import 'server-only';
import { applyPatch, type Patch } from '@/diagram/document/patch';
import type { Cable, Installation, Part, Wire } from '@/diagram/document/schema';
import { placeAll } from '@/diagram/layout/place';
import { draftDocument } from '@/diagram/survey/draft';
import { parseSurvey } from '@/diagram/survey/parse';

/** Three bedrooms, living room, kitchen and bath; lamps and fans stay on. */
const SURVEY = `name;kind;lamps;fans;outlets;heavy;lamps kept;fans kept;outlet kept;hours;run
Veranda;intake;1x12;;;;;;;;4
Hall;passage;2x9;;;;1;;;4;7
Living room;room;4x9;1x55;4;;1;1;60;4;10
Kitchen;room;2x12;;4;oven 3000;1;;;3;12
Bath;wet;2x7;;;geyser 2000;1;;;3;14
Front bedroom;sleeping;2x9;1x55;3;;1;1;;4;11
Middle bedroom;sleeping;2x9;1x55;2;;1;1;;4;14
Back bedroom;sleeping;2x9;1x55;2;;1;1;;4;18`;

/** The draft of the house, as the survey gives it. */
const drafted = (): Installation =>
  draftDocument(parseSurvey(SURVEY).rooms, {
    title: '3 Quarry Steps',
    practice: 'IEC',
    supply: { system: 'TT', voltage: 230, frequency: 50, zln: 0.32, ra: 28 },
    hoursWanted: 4,
  });

/** The lowest number behind a letter that no part and no switchboard bears. */
function freeRef(doc: Installation, letter: string, from: number): string {
  const taken = new Set(doc.parts.flatMap(({ ref, board }) => [ref, board]));
  let n = from;
  while (taken.has(`${letter}${n}`)) n++;
  return `${letter}${n}`;
}

/** The mains lamp of the hall, switched from both ends: the switch becomes a two-way pair with its strappers in a run between. */
function twoWayHall(doc: Installation): Patch {
  const old = doc.parts.find(({ id }) => id === 'hall.lamp2.switch')!;
  const pair = (['a', 'b'] as const).map((end): Part => ({
    id: `hall.two-way-${end}`,
    kind: 'switch-2way',
    ref: end === 'a' ? old.ref! : freeRef(doc, 'S', 1),
    label: end === 'a' ? 'at the door' : 'at the bedrooms',
    place: 'hall',
    board: end === 'a' ? old.board! : freeRef(doc, 'X', 11),
    rating: 10,
    state: '1',
  }));
  const moved = doc.wires
    .filter(({ from, to }) => from[0] === old.id || to[0] === old.id)
    .map((wire): Wire => {
      const end = ([part, mark]: Wire['from']): Wire['from'] =>
        part !== old.id ? [part, mark] : mark === '1' ? ['hall.two-way-a', 'C'] : ['hall.two-way-b', 'C'];
      return { ...wire, from: end(wire.from), to: end(wire.to) };
    });
  const run: Cable = {
    id: 'hall.two-way.run',
    csa: 1.5,
    cpc: 1.5,
    material: 'Cu',
    insulation: 'PVC',
    method: 'B1',
    length: 5,
    cores: 3,
  };
  const strapper = (mark: '1' | '2', colour: string): Wire => ({
    id: `hall.two-way-b:${mark}`,
    from: ['hall.two-way-a', mark],
    to: ['hall.two-way-b', mark],
    role: 'strapper',
    cable: run.id,
    colour,
  });
  return {
    set: { parts: pair, wires: [...moved, strapper('1', 'BK'), strapper('2', 'GY')], cables: [run] },
    remove: { parts: [old.id], overview: [old.id], connections: [old.id] },
  };
}

/** What the electrician measured and wrote after the draft. */
function byHand(doc: Installation): Patch {
  const part = (id: string) => doc.parts.find((one) => one.id === id)!;
  const cable = (id: string) => doc.cables.find((one) => one.id === id)!;
  return {
    set: {
      parts: [
        { ...part('living-room.lamp2'), label: 'over the table' } as Part,
        { ...part('living-room.kept-outlet'), label: 'router' } as Part,
        { ...part('kitchen.way-outlets1'), label: 'Kitchen worktop outlets' } as Part,
      ],
      cables: [
        { ...cable('kitchen.heavy1.run'), length: 15 },
        { ...cable('front-bedroom.outlet1.cable'), length: 13.5 },
      ],
    },
  };
}

/** The house as the electrician draws it: a draft from the survey, then a few changes by hand. */
export function quarryHouse(): Installation {
  const draft = drafted();
  const changed = applyPatch(applyPatch(draft, twoWayHall(draft)), byHand(draft));
  // The pair of switches takes more room in the hall than the one did: the sheet is laid out for it.
  const bare = { ...changed, sheet: {} };
  return applyPatch(bare, placeAll(bare));
}
