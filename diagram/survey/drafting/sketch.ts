import { REF_LETTER, isBar } from '../../document/kinds';
import {
  canonical,
  type Cable,
  type End,
  type Installation,
  type Kind,
  type Notice,
  type Part,
  type Place,
  type Role,
  type Wire,
} from '../../document/schema';
import type { Practice } from '../../practices/types';

/** A part without its designation: the sketch gives the next free one. */
type NewPart = Part extends infer P ? (P extends Part ? Omit<P, 'ref'> : never) : never;

/** Letter at which a kind's designations begin, where that is not 1: the main switch is Q0, the service fuse F0. */
const FIRST: Partial<Record<string, number>> = { Q: 0, F: 0 };

/**
 * A document while a draft draws on it: parts, wires and cables by id, free terminals of bars, free designations.
 * Ids are chosen by the caller and say what a thing is; a wire is named after the terminal where it arrives.
 */
export class Sketch {
  private readonly parts: Map<string, Part>;
  private readonly wires: Map<string, Wire>;
  private readonly cables: Map<string, Cable>;
  private readonly places: Map<string, Place>;
  private readonly notices: Notice[];
  private readonly refs = new Set<string>();
  private readonly conductors = new Map<string, Set<string>>();
  private readonly lifted = new Map<string, Part>();
  private readonly lastTerminal = new Map<string, number>();

  constructor(
    private readonly base: Installation,
    readonly practice: Practice,
  ) {
    this.parts = new Map(base.parts.map((part) => [part.id, part]));
    this.wires = new Map(base.wires.map((wire) => [wire.id, wire]));
    this.cables = new Map(base.cables.map((cable) => [cable.id, cable]));
    this.places = new Map(base.places.map((place) => [place.id, place]));
    this.notices = [...(base.notices ?? [])];
    for (const { ref, board } of base.parts) {
      if (ref) this.refs.add(ref);
      if (board) this.refs.add(board);
    }
    for (const wire of base.wires) this.count(wire);
  }

  get supply(): Installation['supply'] {
    return this.base.supply;
  }

  get ambient(): number {
    return this.base.ambient;
  }

  /** The number from which outlets are designated: behind the bars and the switchboards. */
  outletsFrom = 21;

  /** All parts, those drawn last at the end. */
  allParts(): Iterable<Part> {
    return this.parts.values();
  }

  find(id: string): Part | undefined {
    return this.parts.get(id);
  }

  hasPlace(id: string): boolean {
    return this.places.has(id);
  }

  place(place: Place): string {
    if (!this.places.has(place.id)) this.places.set(place.id, place);
    return place.id;
  }

  notice(notice: Notice): void {
    if (!this.notices.some(({ place, board }) => place === notice.place && board === notice.board))
      this.notices.push(notice);
  }

  /**
   * Draws a part with the next free designation; `ref` names another one, null leaves it without, as joints are. A part that
   * was lifted comes back as it was.
   */
  part(part: NewPart, ref?: string | null): string {
    const { id, kind, ...rest } = part;
    if (this.parts.has(id)) throw new Error(`the sketch has a part ${id} already`);
    const lifted = this.lifted.get(id);
    const name = ref === undefined && !lifted ? this.nextRef(REF_LETTER[kind]) : ref;
    this.parts.set(id, lifted ?? ({ id, kind, ...(name && { ref: name }), ...rest } as Part));
    this.lifted.delete(id);
    return id;
  }

  /** Takes a part off the sheet, to be drawn again elsewhere: its designation and values are kept for it. */
  lift(id: string): void {
    this.lifted.set(id, this.parts.get(id)!);
    this.parts.delete(id);
  }

  /** Changes fields of a part that is drawn. */
  change<K extends Kind>(id: string, fields: Partial<Extract<Part, { kind: K }>>): void {
    const part = this.parts.get(id);
    if (!part) throw new Error(`the sketch has no part ${id}`);
    this.parts.set(id, { ...part, ...fields } as Part);
  }

  cable(cable: Cable): string {
    if (this.cables.has(cable.id)) throw new Error(`the sketch has a cable ${cable.id} already`);
    this.cables.set(cable.id, cable);
    return cable.id;
  }

  /** Draws another cable like one that is drawn. */
  copyCable(like: string, id: string): string {
    return this.cable({ ...this.cables.get(like)!, id: this.freeId(id) });
  }

  /** Draws a wire in the practice's colour of its role. `to` is the end away from the source. */
  wire(from: End, to: End, role: Role, cable?: string): void {
    const id = this.freeWireId(`${to[0]}:${to[1].replace('+', 'plus')}`);
    const colour = this.practice.colourSchemes[0].colours[role].value[0];
    const wire: Wire = { id, from, to, role, ...(cable !== undefined && { cable }), colour };
    this.wires.set(id, wire);
    this.count(wire);
  }

  /** The next terminal of a bar or joint that has no conductor yet. */
  nextOn(bar: string): End {
    const part = this.parts.get(bar);
    if (!part || !isBar(part.kind)) throw new Error(`${bar} is no bar`);
    const next = (this.lastTerminal.get(bar) ?? 0) + 1;
    this.lastTerminal.set(bar, next);
    return [bar, String(next)];
  }

  /** Ids of the wires at a terminal. */
  wiresAt([part, mark]: End): readonly string[] {
    return [...(this.conductors.get(`${part} ${mark}`) ?? [])];
  }

  cableOf(id: string): Cable | undefined {
    return this.cables.get(id);
  }

  /** mm2 of a cable's cores; undefined for one that is not drawn. */
  sizeOf(cable: string): { csaMm2: number; cpcMm2: number; grouped: number } | undefined {
    const found = this.cables.get(cable);
    return found && { csaMm2: found.csa, cpcMm2: found.cpc ?? found.csa, grouped: found.grouped ?? 1 };
  }

  getWire(id: string): Wire {
    return this.wires.get(id)!;
  }

  /** Takes the source end of a wire to another terminal. */
  moveStart(id: string, from: End): void {
    const wire = this.wires.get(id)!;
    this.conductors.get(`${wire.from[0]} ${wire.from[1]}`)?.delete(id);
    const moved = { ...wire, from };
    this.wires.set(id, moved);
    this.count(moved);
  }

  /** The lowest free number behind a letter, from `first` on: `X21`. */
  nextRef(letter: string, first = FIRST[letter] ?? 1): string {
    let n = first;
    while (this.refs.has(`${letter}${n}`)) n++;
    const ref = `${letter}${n}`;
    this.refs.add(ref);
    return ref;
  }

  /** An id that nothing has: as wanted, or with a number behind it. */
  freeId(wanted: string): string {
    let id = wanted;
    for (let n = 2; this.parts.has(id) || this.cables.has(id); n++) id = `${wanted}.${n}`;
    return id;
  }

  removePart(id: string): void {
    const ref = this.parts.get(id)?.ref;
    if (ref) this.refs.delete(ref);
    this.parts.delete(id);
  }

  /** Takes a wire away, and its cable with its last core. */
  removeWire(id: string): void {
    const wire = this.wires.get(id);
    if (!wire) return;
    this.wires.delete(id);
    for (const [part, mark] of [wire.from, wire.to]) this.conductors.get(`${part} ${mark}`)?.delete(id);
    if (wire.cable !== undefined && ![...this.wires.values()].some(({ cable }) => cable === wire.cable))
      this.cables.delete(wire.cable);
  }

  /** Lands the far end of a wire elsewhere. */
  moveEnd(id: string, to: End): void {
    const wire = this.wires.get(id)!;
    this.conductors.get(`${wire.to[0]} ${wire.to[1]}`)?.delete(id);
    const moved = { ...wire, to };
    this.wires.set(id, moved);
    this.count(moved);
  }

  /** The cores of a cable. */
  wiresIn(cable: string): Wire[] {
    return [...this.wires.values()].filter((wire) => wire.cable === cable);
  }

  /** The wires at any terminal of a part. */
  wiresOn(part: string): Wire[] {
    return [...this.wires.values()].filter(({ from, to }) => from[0] === part || to[0] === part);
  }

  /** The wire that arrives at a terminal from the side of the source. */
  arriving([part, mark]: End): Wire | undefined {
    return this.wiresAt([part, mark])
      .map((id) => this.wires.get(id)!)
      .find(({ to }) => to[0] === part && to[1] === mark);
  }

  /** The wire that feeds a joint. */
  arrivingAt(joint: string): Wire | undefined {
    return this.wiresOn(joint).find(({ to }) => to[0] === joint);
  }

  /** The wires that go on from a terminal. */
  leaving([part, mark]: End): Wire[] {
    return this.wiresAt([part, mark])
      .map((id) => this.wires.get(id)!)
      .filter(({ from }) => from[0] === part && from[1] === mark);
  }

  finish(): Installation {
    return canonical({
      ...this.base,
      parts: [...this.parts.values()],
      wires: [...this.wires.values()],
      cables: [...this.cables.values()],
      places: [...this.places.values()],
      notices: this.notices,
    });
  }

  private freeWireId(wanted: string): string {
    let id = wanted;
    for (let n = 2; this.wires.has(id); n++) id = `${wanted}.${n}`;
    return id;
  }

  private count(wire: Wire): void {
    for (const [part, mark] of [wire.from, wire.to]) {
      const key = `${part} ${mark}`;
      const at = this.conductors.get(key) ?? new Set();
      at.add(wire.id);
      this.conductors.set(key, at);
      const kind = this.parts.get(part)?.kind;
      const n = Number(mark);
      if (kind && isBar(kind) && n > (this.lastTerminal.get(part) ?? 0)) this.lastTerminal.set(part, n);
    }
  }
}
