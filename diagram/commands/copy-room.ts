import { diff } from '../document/patch';
import { canonical, type End, type Installation, type Part, type Place, type Wire } from '../document/schema';
import { practices } from '../practices';
import { LENGTH } from '../survey/drafting/assumptions';
import { dryPlaceId } from '../survey/drafting/ids';
import { Sketch } from '../survey/drafting/sketch';
import { nextOrder } from '../survey/parse';
import { isPoint } from '../terminals/roles-of-parts';
import { findWays } from '../terminals/ways';
import { companionsOf } from './companions';
import { cloneParts } from './copy';
import { tapAt } from './tap';
import { withPlaces } from './place-new';
import { endKey, walkFromSources, type Walk } from './walk';
import type { Command, NewId, Refusal } from './types';

/**
 * How the new room is fed: looped on from the old one, or by ways of its own with breakers like the old one's. A fixed
 * appliance gets a way of its own in either case.
 */
export type RoomFeed = 'same' | 'new';

export interface RoomCopy {
  /** id of the room to copy */
  place: string;
  /** name of the new room */
  name: string;
  feed: RoomFeed;
}

/** One run into the room, by the cable that brings it: its cores from outside to inside. */
interface Run {
  cable: string | undefined;
  cores: { wire: Wire; inside: End; outside: End }[];
  /** the breaker of the way that it belongs to; undefined where nothing feeds it */
  device: string | undefined;
  /** the way serves fixed appliances alone: it cannot bear another room's */
  dedicated: boolean;
}

const ENTERING: ReadonlySet<Wire['role']> = new Set(['line', 'neutral', 'earth']);

/** Runs that bring the room its ways. What leaves it for other rooms, and strappers between rooms, stay behind. */
function runsInto(doc: Installation, walk: Walk, inside: ReadonlySet<string>): Run[] {
  const depth = (end: End): number => walk.get(endKey(end))?.depth ?? Infinity;
  const ways = findWays(doc);
  const appliances = new Set(doc.parts.flatMap((part) => (part.kind === 'appliance' ? [part.id] : [])));
  const points = new Set(doc.parts.filter(isPoint).map((part) => part.id));
  const runs = new Map<string, Run>();
  for (const wire of doc.wires) {
    if (inside.has(wire.from[0]) === inside.has(wire.to[0]) || !ENTERING.has(wire.role)) continue;
    const [own, far] = inside.has(wire.from[0]) ? [wire.from, wire.to] : [wire.to, wire.from];
    if (depth(far) > depth(own)) continue;
    const key = wire.cable ?? wire.id;
    const run = runs.get(key) ?? { cable: wire.cable, cores: [], device: undefined, dedicated: false };
    run.cores.push({ wire, inside: own, outside: far });
    if (wire.role === 'line') {
      const way = ways.find((candidate) => candidate.wires.includes(wire.id));
      const served = way?.parts.filter((id) => points.has(id)) ?? [];
      run.device = way?.device;
      run.dedicated = served.length > 0 && served.every((id) => appliances.has(id));
    }
    runs.set(key, run);
  }
  return [...runs.values()];
}

/** m, of all runs between a terminal and the board at which its way begins */
function metresTo(doc: Installation, walk: Walk, end: End, device: string): number {
  const cables = new Map<string, number>();
  for (let at: End | null = end; at && at[0] !== device; ) {
    const step = walk.get(endKey(at));
    const id = step?.wire && doc.wires.find((wire) => wire.id === step.wire)?.cable;
    const cable = id && doc.cables.find((candidate) => candidate.id === id);
    if (cable) cables.set(cable.id, cable.length);
    at = step?.from ?? null;
  }
  return Math.round(10 * [...cables.values()].reduce((sum, length) => sum + length, 0)) / 10;
}

/** A breaker like another one, hung from the same bars; it takes the new room's name. */
function breakerLike(sketch: Sketch, device: Part, names: { old: string; fresh: string }, newId: NewId): string {
  const { id: _id, ref: _ref, ...rest } = device;
  const label = device.label?.replace(names.old, names.fresh);
  const fresh = sketch.part({ ...rest, id: newId(), ...(label !== undefined && { label: label.slice(0, 80) }) } as Part);
  for (const mark of ['1', '3']) {
    const arriving = sketch.arriving([device.id, mark]);
    if (arriving) sketch.wire(tapAt(sketch, arriving.from, newId), [fresh, mark], arriving.role);
  }
  return fresh;
}

/**
 * Copies a room whole, with new ids and designations, to a new place: its switchboard, accessories and loads, its row in
 * the survey and its notices, wired to the same ways or to new ways like them. One step.
 */
export function copyRoom(doc: Installation, { place, name, feed }: RoomCopy, newId: NewId): Command | Refusal {
  const old = doc.places.find((candidate) => candidate.id === place);
  const called = name.trim().slice(0, 80);
  if (!old) return { refused: 'That room is no longer drawn.' };
  if (called === '') return { refused: 'The new room needs a name.' };
  if (doc.places.some((candidate) => candidate.name.trim().toLowerCase() === called.toLowerCase()))
    return { refused: `There is a ${called} already.` };
  const dry = dryPlaceId({ id: place });
  const own = doc.parts.filter((part) => part.place === place || part.place === dry);
  if (own.length === 0) return { refused: `Nothing is drawn in ${old.name}.` };
  if (own.some((part) => part.kind === 'supply' || part.kind === 'inverter'))
    return { refused: `${old.name} holds a source: copy its parts one by one.` };

  const walk = walkFromSources(doc);
  const runs = runsInto(doc, walk, new Set(own.map((part) => part.id)));
  const clone = cloneParts(doc, own.map((part) => part.id), newId);
  const to = newId();
  const rooms = new Map([
    [place, to],
    [dry, dryPlaceId({ id: to })],
  ]);
  const places: Place[] = doc.places.flatMap((candidate) => {
    const id = rooms.get(candidate.id);
    return id ? [{ ...candidate, id, name: candidate.name.replace(old.name, called) }] : [];
  });
  const boards = new Map<string, string>();
  const sketch = new Sketch(
    canonical({ ...doc, places: [...doc.places, ...places], wires: [...doc.wires, ...clone.wires], cables: [...doc.cables, ...clone.cables], parts: [...doc.parts, ...clone.parts] }),
    practices[doc.practice],
  );
  const boardFor = (board: string): string => {
    if (!/^X\d+$/.test(board)) return board;
    if (!boards.has(board)) boards.set(board, sketch.nextRef('X', 11));
    return boards.get(board)!;
  };
  for (const part of clone.parts)
    sketch.change(part.id, { place: rooms.get(part.place!)!, ...(part.board && { board: boardFor(part.board) }) });

  const colours = new Map<string, string | undefined>();
  const inside = ([id, mark]: End): End => [clone.ids.get(id)!, mark];
  const fresh = new Map<string, string>();
  for (const run of runs) {
    const device = feed === 'new' || run.dedicated ? doc.parts.find((part) => part.id === run.device) : undefined;
    if (device && !fresh.has(device.id))
      fresh.set(device.id, breakerLike(sketch, device, { old: old.name, fresh: called }, newId));
    const breaker = device && fresh.get(device.id);
    const home = device && companionsOf(doc, walk, [device.id, '2']);
    const line = run.cores.find(({ wire }) => wire.role === 'line');
    const like = run.cable === undefined ? undefined : doc.cables.find((cable) => cable.id === run.cable);
    const length = device && line ? metresTo(doc, walk, line.inside, device.id) : LENGTH.roomToRoom;
    const cable = like && sketch.cable({ ...like, id: newId(), length });
    for (const { wire, inside: end } of run.cores) {
      const start = ((): End => {
        if (!breaker || !home) return tapAt(sketch, end, newId);
        if (wire.role === 'line') return tapAt(sketch, [breaker, '2'], newId);
        const at = wire.role === 'neutral' ? home.N : home.E;
        if (!at) return tapAt(sketch, end, newId);
        return tapAt(sketch, at[0] === device.id ? [breaker, at[1]] : at, newId);
      })();
      sketch.wire(start, inside(end), wire.role, cable);
      colours.set(endKey(inside(end)), wire.colour);
    }
  }

  const known = new Set([...doc.wires, ...clone.wires].map((wire) => wire.id));
  const drawn = sketch.finish();
  const wires = drawn.wires.map((wire) => {
    const colour = known.has(wire.id) ? undefined : colours.get(endKey(wire.to));
    return colour === undefined ? wire : { ...wire, colour };
  });
  const row = doc.survey?.find((candidate) => candidate.id === place);
  const notices = (doc.notices ?? []).flatMap((notice) => {
    const id = rooms.get(notice.place);
    return id ? [{ ...notice, place: id, ...(notice.board && { board: boardFor(notice.board) }) }] : [];
  });
  const next = canonical({
    ...drawn,
    wires,
    ...(row && { survey: [...doc.survey!, { ...row, id: to, name: called, order: nextOrder(doc.survey!) }] }),
    notices: [...(drawn.notices ?? []), ...notices],
  });
  return {
    label: `Copy ${old.name} to ${called}`,
    patch: withPlaces(doc, diff(doc, next)),
    parts: clone.parts.map((part) => part.id),
  };
}
