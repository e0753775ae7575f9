import { KIND_NAME } from '../document/kinds';
import { nameOf } from '../document/names';
import { diff } from '../document/patch';
import type { End, Installation, Part, Wire } from '../document/schema';
import { practices } from '../practices';
import { isControl, isPoint } from '../terminals/roles-of-parts';
import { findWays } from '../terminals/ways';
import { USUAL_RUN } from '../survey/columns';
import { sizeRun } from '../survey/drafting/size-run';
import { cableOf } from '../survey/drafting/room-box';
import { Sketch } from '../survey/drafting/sketch';
import { companionsOf, type Feed } from './companions';
import { withPlaces } from './place-new';
import { tapAt } from './tap';
import type { Command, NewId, Refusal } from './types';
import { endKey, walkFromSources, type Walk } from './walk';

/** Loads with the controls that work them: what moves together, and where it is fed. */
interface Group {
  loads: Part[];
  /** where the unswitched line enters: the first control's line side, or the load's own line */
  line: End;
  /** where the neutrals enter */
  neutrals: End[];
  earths: End[];
  place: string | undefined;
}

const upstream = (walk: Walk, end: End): End[] => {
  const path: End[] = [];
  for (let at: End | null = end; at; at = walk.get(endKey(at))?.from ?? null) path.push(at);
  return path;
};

/** The first terminal towards the source that no control stands before. */
const unswitched = (walk: Walk, end: End): End =>
  upstream(walk, end).find((at) => !walk.get(endKey(at))?.switched) ?? end;

/** The neutral of a load before a two-pole switch, if one cuts it. */
const neutralHead = (walk: Walk, parts: ReadonlyMap<string, Part>, load: string): End => {
  let head: End = [load, 'N'];
  for (const at of upstream(walk, head)) if (parts.get(at[0])?.kind === 'switch-2pole') head = at;
  return head;
};

function groupOf(doc: Installation, walk: Walk, load: Part): Group {
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const line = unswitched(walk, [load.id, 'L']);
  const loads = doc.parts.filter((part) => isPoint(part) && endKey(unswitched(walk, [part.id, 'L'])) === endKey(line));
  const members = isControl(parts.get(line[0])!) ? loads : [load];
  const neutrals = new Map(members.map((part) => neutralHead(walk, parts, part.id)).map((end) => [endKey(end), end]));
  return {
    loads: members,
    line,
    neutrals: [...neutrals.values()],
    earths: members.map((part): End => [part.id, 'E']),
    place: parts.get(line[0])?.place ?? load.place,
  };
}

/** Takes a terminal out of the row it stands in: what went on from it goes on from the one before. */
function bypass(sketch: Sketch, end: End): void {
  const arriving = sketch.arriving(end);
  const [first, ...others] = sketch.leaving(end);
  if (!first) {
    if (arriving) sketch.removeWire(arriving.id);
    return;
  }
  sketch.removeWire(first.id);
  if (arriving) sketch.moveEnd(arriving.id, first.to);
  for (const wire of others) sketch.moveStart(wire.id, first.to);
}

/** Feeds a terminal from elsewhere; what was looped on from it stays with its old neighbours. */
function refeed(sketch: Sketch, end: End, from: End, role: Wire['role'], newCable?: string): void {
  const arriving = sketch.arriving(end);
  const inCable = arriving?.cable;
  const goesOn = sketch.leaving(end).length > 0;
  if (arriving && !goesOn) {
    sketch.moveStart(arriving.id, from);
    return;
  }
  bypass(sketch, end);
  sketch.wire(from, end, role, newCable ?? (goesOn ? undefined : inCable));
}

/** Joints that join nothing any more go, with the core that led to them. */
function dropIdleJoints(sketch: Sketch): void {
  for (let again = true; again; ) {
    again = false;
    for (const part of [...sketch.allParts()]) {
      if (part.kind !== 'joint' || sketch.wiresOn(part.id).length > 1) continue;
      for (const wire of sketch.wiresOn(part.id)) sketch.removeWire(wire.id);
      sketch.removePart(part.id);
      again = true;
    }
  }
}

/** Where the other way can be tapped in the room; null where it does not reach it yet. */
function tapIn(
  doc: Installation,
  walk: Walk,
  device: string,
  place: string | undefined,
  moving: ReadonlySet<string>,
): Feed | null {
  for (const part of doc.parts) {
    if (
      part.place !== place ||
      moving.has(part.id) ||
      !(isControl(part) || part.kind === 'joint' || part.kind === 'socket')
    )
      continue;
    const ends = doc.wires.flatMap(({ from, to }) => [from, to]).filter((end) => end[0] === part.id);
    for (const end of ends) {
      const step = walk.get(endKey(end));
      if (step?.conductor !== 'L' || step.switched || !upstream(walk, end).some((at) => at[0] === device)) continue;
      const feed = companionsOf(doc, walk, end);
      if (feed.N && feed.E) return feed;
    }
  }
  return null;
}

/** Brings the way into the room: a run from its device, neutral and earth in a joint each. */
function bring(
  sketch: Sketch,
  doc: Installation,
  walk: Walk,
  device: Part,
  place: string | undefined,
  newId: NewId,
): { feed: Feed; run: string } | null {
  const out = companionsOf(doc, walk, [device.id, '2']);
  if (!out.N || !out.E || (device.kind !== 'mcb' && device.kind !== 'rcbo')) return null;
  const practice = practices[doc.practice];
  const metres = doc.survey?.find((row) => row.id === place)?.run ?? USUAL_RUN;
  const leastMm2 = practice.draft.lighting.csaMm2;
  const size = sizeRun({
    practice,
    voltage: doc.supply.voltage,
    ambientC: doc.ambient,
    ratingA: device.rating ?? 6,
    curve: device.curve ?? 'B',
    amps: 1,
    lengthM: metres,
    use: 'backup',
    leastMm2,
  });
  if (!size) return null;
  const run = cableOf(sketch, newId(), size, metres, { fromBoard: true });
  const joint = () => sketch.part({ id: newId(), kind: 'joint', ...(place && { place }) }, null);
  const [n, e] = [joint(), joint()];
  sketch.wire(tapAt(sketch, out.N, newId), sketch.nextOn(n), 'neutral', run);
  sketch.wire(tapAt(sketch, out.E, newId), sketch.nextOn(e), 'earth', run);
  return { feed: { L: [device.id, '2'], N: [n, '1'], E: [e, '1'] }, run };
}

/** "Study fan"; with its designation where the room has more of its kind. */
function calledAt(doc: Installation, load: Part): string {
  const place = doc.places.find((candidate) => candidate.id === load.place)?.name;
  if (load.label !== undefined || place === undefined) return load.label ?? nameOf(doc, load);
  const alike = doc.parts.filter((part) => part.kind === load.kind && part.place === load.place);
  return [place, KIND_NAME[load.kind], alike.length > 1 && load.ref].filter(Boolean).join(' ');
}

/**
 * Moves loads, with the switches that work them, to another way: line, neutral and earth together, so that no neutral comes
 * home by the way it has left.
 * @param device id of the other way's breaker
 */
export function moveLoad(
  doc: Installation,
  loadIds: readonly string[],
  device: string,
  newId: NewId,
): Command | Refusal {
  const walk = walkFromSources(doc);
  const target = doc.parts.find((part) => part.id === device);
  const loads = doc.parts.filter((part) => loadIds.includes(part.id) && isPoint(part));
  if (!target || loads.length === 0)
    return { refused: 'Take a lamp, fan, outlet or appliance in hand, then say where it goes.' };
  const ways = findWays(doc);
  const to = ways.find((way) => way.device === device);
  const groups = new Map(loads.map((load) => groupOf(doc, walk, load)).map((group) => [endKey(group.line), group]));
  const sketch = new Sketch(doc, practices[doc.practice]);
  for (const group of groups.values()) {
    if (upstream(walk, group.line).some((at) => at[0] === device))
      return { refused: `${nameOf(doc, group.loads[0]!)} is on that way already.` };
    const moving = new Set([...group.loads.map((load) => load.id), group.line[0]]);
    const near = tapIn(doc, walk, device, group.place, moving);
    const brought = near ? null : bring(sketch, doc, walk, target, group.place, newId);
    const feed = near ?? brought?.feed;
    if (!feed?.N || !feed.E) return { refused: `${nameOf(doc, target)} has no neutral or earth to give.` };
    const line = tapAt(sketch, feed.L, newId);
    bypass(sketch, group.line);
    sketch.wire(line, group.line, 'line', brought?.run);
    for (const neutral of group.neutrals) refeed(sketch, neutral, tapAt(sketch, feed.N, newId), 'neutral');
    for (const earth of group.earths)
      if (sketch.arriving(earth)) refeed(sketch, earth, tapAt(sketch, feed.E, newId), 'earth');
  }
  dropIdleJoints(sketch);
  const names = loads.map((load) => calledAt(doc, load));
  const where = to?.backup ? 'backup' : nameOf(doc, target);
  return {
    label: `Move ${names.slice(0, 3).join(', ')}${names.length > 3 ? ` and ${names.length - 3} more` : ''} to ${where}`,
    patch: withPlaces(doc, diff(doc, sketch.finish())),
    parts: loads.map((load) => load.id),
  };
}

/** Ways that a load could move to, as a person would choose them. */
export function waysFor(doc: Installation, loadId: string): { device: string; words: string; backup: boolean }[] {
  const walk = walkFromSources(doc);
  const mine = new Set(upstream(walk, [loadId, 'L']).map(([part]) => part));
  const inverters = new Set(doc.parts.flatMap((part) => (part.kind === 'inverter' ? [part.id] : [])));
  const feedsInverter = new Set(
    doc.wires.flatMap(({ id, from, to }) => (inverters.has(to[0]) || inverters.has(from[0]) ? [id] : [])),
  );
  return findWays(doc)
    .filter((way) => !mine.has(way.device) && !way.wires.some((wire) => feedsInverter.has(wire)))
    .map((way) => {
      const part = doc.parts.find((candidate) => candidate.id === way.device)!;
      return {
        device: way.device,
        backup: way.backup,
        words: `way ${way.number}, ${nameOf(doc, part)}${way.label ? ` ${way.label}` : ''}${way.backup ? ', backup' : ''}`,
      };
    });
}
