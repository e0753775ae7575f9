import { conductorAt, marksOf } from '../commands/ends';
import { endKey, walkFromSources, type Conductor, type Walk } from '../commands/walk';
import { compareDesignations, nameOf } from '../document/names';
import { isBar } from '../document/kinds';
import type { Cable, Installation, Part, Wire } from '../document/schema';
import { supplyText } from '../layout/wording';
import type { Finding } from '../rules/types';
import { findWays, type Way } from '../terminals/ways';
import { FindingsAt, findingKey } from './findings-at';
import type { OutlineItem, OutlineKind } from './types';
import { contentWords, counted, endWords, partWords, spokenRating, wireWords } from './words';

const CARRIES: Record<Conductor, string> = { L: 'lines', N: 'neutrals', E: 'earths', '+': 'battery plus', '-': 'battery minus' };
const AT: Record<Conductor, string> = { L: 'line', N: 'neutral', E: 'earth', '+': 'battery plus', '-': 'battery minus' };

/** beyond every number of steps */
const FAR = 1e6;

/** One build: the document by id, and what is asked of it at every part. */
class Builder {
  private readonly parts: Map<string, Part>;
  private readonly cables: Map<string, Cable>;
  private readonly wiresOf = new Map<string, Wire[]>();
  private readonly walk: Walk;
  private readonly places: Map<string, string>;
  readonly at: FindingsAt;

  constructor(
    readonly doc: Installation,
    findings: readonly Finding[],
  ) {
    this.parts = new Map(doc.parts.map((part) => [part.id, part]));
    this.cables = new Map(doc.cables.map((cable) => [cable.id, cable]));
    this.places = new Map(doc.places.map((place) => [place.id, place.name]));
    for (const wire of doc.wires)
      for (const end of [wire.from, wire.to]) {
        const list = this.wiresOf.get(endKey(end));
        if (list) list.push(wire);
        else this.wiresOf.set(endKey(end), [wire]);
      }
    this.walk = walkFromSources(doc);
    this.at = new FindingsAt(findings, this.parts);
  }

  placeName(id: string | undefined): string {
    return id === undefined ? 'No place' : (this.places.get(id) ?? id);
  }

  part(id: string): Part {
    return this.parts.get(id)!;
  }

  /** Steps from the supply along the line; along whatever reaches it where no line does, behind all that a line reaches. */
  depth(part: Part): number {
    const steps = marksOf(this.doc, part).flatMap((mark) => this.walk.get(endKey([part.id, mark])) ?? []);
    const line = steps.filter((step) => step.conductor === 'L');
    const least = (list: typeof steps) => Math.min(FAR, ...list.map((step) => step.depth));
    return line.length > 0 ? least(line) : FAR + least(steps);
  }

  /** From the source outwards, then by designation; joints, which nobody works, at the end. */
  inOrder(parts: readonly Part[]): Part[] {
    const depth = new Map(parts.map((part) => [part.id, this.depth(part)]));
    return [...parts].sort(
      (a, b) =>
        Number(a.kind === 'joint') - Number(b.kind === 'joint') ||
        depth.get(a.id)! - depth.get(b.id)! ||
        compareDesignations(a.ref ?? a.id, b.ref ?? b.id),
    );
  }

  item(
    key: string,
    kind: OutlineKind,
    words: string,
    more: Partial<Omit<OutlineItem, 'key' | 'kind' | 'words' | 'keys' | 'findings'>>,
    at: readonly Finding[] = [],
  ): OutlineItem {
    const children = more.children ?? [];
    const keys = new Set([...at.map(findingKey), ...children.flatMap((child) => child.keys)]);
    if (more.finding !== undefined) keys.add(more.finding);
    return {
      key,
      kind,
      words,
      findings: at.map((finding) => finding.heading),
      keys: [...keys],
      parts: [],
      wires: [],
      terminal: null,
      ...more,
      children,
    };
  }

  finding(finding: Finding): OutlineItem {
    const key = findingKey(finding);
    return this.item(`finding ${key}`, 'finding', `${finding.severity}: ${finding.heading}. ${finding.message}`, {
      finding: key,
      severity: finding.severity,
      parts: finding.parts.filter((id) => this.parts.has(id)),
      wires: finding.wires,
    });
  }

  private wire(wire: Wire, here: string): OutlineItem {
    const [id, mark] = endKey(wire.from) === here ? wire.to : wire.from;
    const cable = wire.cable === undefined ? undefined : this.cables.get(wire.cable);
    const to = endWords(this.doc, this.parts.get(id), id, mark);
    const shown = this.at.shownAtWire(wire.id, here === endKey(wire.to)).map((finding) => this.finding(finding));
    return this.item(
      `wire ${wire.id} at ${here}`,
      'wire',
      `Wire to ${to}: ${wireWords(wire, cable)}`,
      { wires: [wire.id], children: shown },
      this.at.ofWire(wire.id),
    );
  }

  terminal(part: Part, mark: string): OutlineItem {
    const end: [string, string] = [part.id, mark];
    const key = endKey(end);
    const wires = [...(this.wiresOf.get(key) ?? [])].sort((a, b) => compareDesignations(a.id, b.id));
    const carries = conductorAt(this.doc, this.walk, part, mark);
    const to = wires.map((wire) => {
      const [id, other] = endKey(wire.from) === key ? wire.to : wire.from;
      const far = this.parts.get(id);
      return far ? `${nameOf(this.doc, far)} ${other}` : `${id}, not drawn`;
    });
    const name = isBar(part.kind) ? `Screw ${mark}` : `Terminal ${mark}`;
    const carried = carries === null ? '' : `, ${AT[carries]}`;
    return this.item(`end ${key}`, 'terminal', `${name}${carried}: ${to.length > 0 ? `to ${to.join(' and ')}` : 'free'}`, {
      terminal: end,
      parts: [part.id],
      ...(part.place !== undefined && { place: part.place }),
      children: wires.map((wire) => this.wire(wire, key)),
    });
  }

  /** The findings shown at a part, then its terminals. */
  private inside(part: Part): OutlineItem[] {
    return [
      ...this.at.shownAtPart(part.id).map((finding) => this.finding(finding)),
      ...marksOf(this.doc, part).map((mark) => this.terminal(part, mark)),
    ];
  }

  partItem(part: Part): OutlineItem {
    const carried = part.kind === 'joint' ? conductorAt(this.doc, this.walk, part, '1') : null;
    return this.item(
      `part ${part.id}`,
      'part',
      partWords(part, carried ? CARRIES[carried] : undefined),
      { parts: [part.id], ...(part.place !== undefined && { place: part.place }), children: this.inside(part) },
      this.at.ofPart(part.id),
    );
  }

  room(place: string | undefined, parts: readonly Part[], prefix: string): OutlineItem {
    const ordered = this.inOrder(parts);
    const words = contentWords(ordered);
    return this.item(`room ${prefix} ${place ?? ''}`, 'room', `${this.placeName(place)}${words ? `: ${words}` : ''}`, {
      parts: parts.map((part) => part.id),
      ...(place !== undefined && { place }),
      children: ordered.map((part) => this.partItem(part)),
    });
  }

  /** Inverters that a way's wires lead to. */
  private inverters(way: Way): string[] {
    const own = new Set(way.wires);
    const ids = this.doc.wires.filter((wire) => own.has(wire.id)).flatMap((wire) => [wire.from[0], wire.to[0]]);
    const found = [...new Set(ids)].filter((id) => this.parts.get(id)?.kind === 'inverter');
    return found.map((id) => `feeds ${nameOf(this.doc, this.part(id))}`);
  }

  /** A way stands for its breaker: its terminals, then the rooms it goes to. */
  way(way: Way, members: readonly Part[]): OutlineItem {
    const device = this.part(way.device);
    const places = [...new Set(this.inOrder(members).map((part) => part.place))];
    const rooms = places.map((place) => this.room(place, members.filter((part) => part.place === place), `way ${way.device}`));
    const rated = [device.ref, spokenRating(device), way.backup && 'stays on in an outage'].filter(Boolean).join(', ');
    const goesTo = [...rooms.map((room) => room.words), ...this.inverters(way)].join('; ');
    return this.item(
      `part ${way.device}`,
      'way',
      `Way ${way.number}, ${rated}${way.label && `, ${way.label}`}: ${goesTo || 'nothing yet'}`,
      {
        parts: [way.device],
        ...(device.place !== undefined && { place: device.place }),
        children: [...this.inside(device), ...rooms],
      },
      this.at.ofPart(way.device),
    );
  }

  board(place: string | undefined, name: string | undefined, parts: readonly Part[], ways: readonly OutlineItem[]): OutlineItem {
    const where = this.placeName(place);
    const supply = parts.some((part) => part.kind === 'supply') ? `Supply, ${supplyText(this.doc)}` : null;
    const title = name ? `${name} in ${where}` : (supply ?? where);
    const holds = [...(ways.length > 0 ? [counted(ways.length, 'way')] : []), counted(parts.length, 'part')];
    return this.item(`board ${place ?? ''} ${name ?? ''}`, 'board', `${title}: ${holds.join(', ')}`, {
      parts: parts.map((part) => part.id),
      ...(place !== undefined && { place }),
      children: [...this.inOrder(parts).map((part) => this.partItem(part)), ...ways],
    });
  }
}

const enclosure = (part: Part): string => JSON.stringify([part.place ?? null, part.board ?? null]);

/**
 * The document as a tree to be walked: the sheet; supply, boards and backup source in the order in which current arrives;
 * in a board its devices, then its ways; in a way its rooms; in a room its parts; in a part its findings and terminals; at
 * a terminal its wires. Every part stands in it once, every wire at both its ends.
 */
export function buildOutline(doc: Installation, findings: readonly Finding[] = []): OutlineItem {
  const builder = new Builder(doc, findings);
  const ways = findWays(doc);
  const owner = new Map<string, string>();
  const devices = new Set(ways.map((way) => way.device));
  // What two ways have in common, as a joint may be, is told at the first of them.
  for (const way of ways)
    for (const id of way.parts) if (!devices.has(id) && !owner.has(id)) owner.set(id, way.device);
  const members = new Map<string, Part[]>();
  const groups = new Map<string, Part[]>();
  for (const part of doc.parts) {
    const way = owner.get(part.id);
    if (way !== undefined) members.set(way, [...(members.get(way) ?? []), part]);
    else {
      const key = enclosure(part);
      groups.set(key, [...(groups.get(key) ?? []), part]);
    }
  }
  const boards = [...groups.values()].map((parts) => ({
    parts: parts.filter((part) => !devices.has(part.id)),
    ways: ways.filter((way) => parts.some((part) => part.id === way.device)),
    depth: Math.min(...parts.map((part) => (part.kind === 'supply' ? -1 : builder.depth(part)))),
    first: parts[0]!,
  }));
  boards.sort((a, b) => a.depth - b.depth || compareDesignations(enclosure(a.first), enclosure(b.first)));
  const children = boards.map(({ parts, ways: own, first }) =>
    builder.board(
      first.place,
      first.board,
      parts,
      own.map((way) => builder.way(way, members.get(way.device) ?? [])),
    ),
  );
  const loose = builder.at.unplaced().map((finding) => builder.finding(finding));
  const rooms = doc.places.filter((place) => place.kind !== 'intake').length;
  const all = [counted(doc.parts.length, 'part'), counted(ways.length, 'way'), counted(rooms, 'place')].join(', ');
  return builder.item('sheet', 'sheet', `${doc.title || 'Untitled sheet'}: ${doc.parts.length === 0 ? 'nothing drawn yet' : all}`, {
    children: [...loose, ...children],
  });
}

/** The key under which a part, a terminal or a wire stands in the outline. */
export const partKey = (id: string): string => `part ${id}`;
export const terminalKey = (part: string, mark: string): string => `end ${part} ${mark}`;

