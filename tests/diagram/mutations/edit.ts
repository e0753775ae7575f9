import { isBar } from '@/diagram/document/kinds';
import {
  canonical,
  type End,
  type Installation,
  type Kind,
  type Part,
  type PartOf,
  type Role,
  type Wire,
} from '@/diagram/document/schema';
import { findWays, type Way } from '@/diagram/terminals/ways';

/** A clean home under the hand of somebody who makes one mistake: questions about it, and edits that each give a new home. */
export class Home {
  private found: Way[] | undefined;

  constructor(readonly doc: Installation) {}

  parts<K extends Kind>(kind: K): PartOf<K>[] {
    return this.doc.parts.filter((part): part is PartOf<K> => part.kind === kind);
  }

  part(id: string): Part {
    return this.doc.parts.find((part) => part.id === id)!;
  }

  get ways(): Way[] {
    return (this.found ??= findWays(this.doc));
  }

  /** Mains ways that feed something, each with what of a kind hangs on it. */
  waysWith<K extends Kind>(kind: K, backup = false): { way: Way; device: PartOf<'mcb'>; parts: PartOf<K>[] }[] {
    return this.ways.flatMap((way) => {
      const device = this.part(way.device);
      const parts = way.parts.map((id) => this.part(id)).filter((part): part is PartOf<K> => part.kind === kind);
      return way.backup === backup && device.kind === 'mcb' && parts.length > 0 ? [{ way, device, parts }] : [];
    });
  }

  wiresAt(part: string, mark?: string): Wire[] {
    const here = ([id, at]: End) => id === part && (mark === undefined || at === mark);
    return this.doc.wires.filter(({ from, to }) => here(from) || here(to));
  }

  /** The wire at a terminal, where there is exactly one. */
  only(part: string, mark: string): Wire | undefined {
    const wires = this.wiresAt(part, mark);
    return wires.length === 1 ? wires[0] : undefined;
  }

  /** The end of a wire that is not at a part. */
  far(wire: Wire, part: string): End {
    return wire.from[0] === part ? wire.to : wire.from;
  }

  /** A terminal of a bar or joint that nothing is landed on. */
  freeOn(bar: string): End {
    const used = this.wiresAt(bar).flatMap(({ from, to }) =>
      [from, to].filter(([id]) => id === bar).map(([, mark]) => Number(mark)),
    );
    return [bar, String(Math.max(0, ...used) + 1)];
  }

  /** Where one more conductor can be landed on the net of an end: the bar itself, else the terminal. */
  beside(end: End): End {
    return isBar(this.part(end[0]).kind) ? this.freeOn(end[0]) : end;
  }

  set<K extends Kind>(part: PartOf<K>, fields: Partial<PartOf<K>>): Home {
    const next = Object.fromEntries(
      Object.entries({ ...part, ...fields }).filter(([, value]) => value !== undefined),
    ) as Part;
    return this.with({ parts: this.doc.parts.map((one) => (one.id === part.id ? next : one)) });
  }

  setWire(wire: Wire, fields: Partial<Wire>): Home {
    return this.with({ wires: this.doc.wires.map((one) => (one.id === wire.id ? { ...wire, ...fields } : one)) });
  }

  setCable(id: string, fields: Partial<Installation['cables'][number]>): Home {
    return this.with({ cables: this.doc.cables.map((cable) => (cable.id === id ? { ...cable, ...fields } : cable)) });
  }

  add(part: Part): Home {
    return this.with({ parts: [...this.doc.parts, part] });
  }

  join(role: Role, from: End, to: End, more: Partial<Wire> = {}): Home {
    return this.with({
      wires: [...this.doc.wires, { id: `mistake-${this.doc.wires.length}`, from, to, role, ...more }],
    });
  }

  cut(...wires: Wire[]): Home {
    const gone = new Set(wires.map(({ id }) => id));
    return this.with({ wires: this.doc.wires.filter(({ id }) => !gone.has(id)) });
  }

  /** Takes a part out; the wires at each pair of its terminals become one. */
  takeOut(part: string, ...pairs: [string, string][]): Home {
    let wires = this.doc.wires;
    for (const [into, out] of pairs) {
      const before = this.wiresAt(part, into);
      const after = this.wiresAt(part, out);
      const [first] = before;
      if (!first) continue;
      const source = this.far(first, part);
      wires = wires
        .filter(({ id }) => id !== first.id)
        .map((wire) =>
          after.some(({ id }) => id === wire.id) ? { ...wire, from: source, to: this.far(wire, part) } : wire,
        );
    }
    const left = wires.filter(({ from, to }) => from[0] !== part && to[0] !== part);
    return this.with({ wires: left, parts: this.doc.parts.filter(({ id }) => id !== part) });
  }

  /** Puts a part with terminals 1 and 2 into a wire. */
  insert(wire: Wire, part: Part): Home {
    const onward = { ...wire, id: `${wire.id}.onward`, from: [part.id, '2'] as End };
    return this.add(part).with({
      parts: [...this.doc.parts, part],
      wires: [
        ...this.doc.wires.map((one) => (one.id === wire.id ? { ...wire, to: [part.id, '1'] as End } : one)),
        onward,
      ],
    });
  }

  with(fields: Partial<Installation>): Home {
    return new Home(canonical({ ...this.doc, ...fields }));
  }
}

/** One mistake: every home that comes of making it once somewhere in a clean home; none where the home has no place for it. */
export interface Mutation {
  rule: string;
  /** what somebody did wrong */
  mistake: string;
  make: (home: Home) => Home[];
  /** other dangers and defects that the same mistake really is as well */
  also?: readonly string[];
}
