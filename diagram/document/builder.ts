import { isBar } from './kinds';
import {
  canonical,
  type Cable,
  type Installation,
  type Part,
  type PartOf,
  type Place,
  type Role,
  type Supply,
  type Wire,
} from './schema';

type Ratings<K extends Part['kind']> = K extends Part['kind'] ? Partial<Omit<PartOf<K>, 'id' | 'kind'>> : never;

/** Options of a drawing; a supply of 230 V, 50 Hz, TN-S with known loops where nothing is said. */
export interface DrawingOptions {
  practice?: Installation['practice'];
  supply?: Partial<Supply>;
}

/**
 * Draws homes in few words, for lessons, tests and demonstrations. An end is written `Q11:2`, or `LB` for the next free
 * terminal of a bar or joint. The finer methods (`board`, `way`, `lamp` ...) draw what is right; a fault is then made with
 * `cut`, `wire` and `set`. Every method changes the drawing and returns it.
 */
export class Drawing {
  private readonly places: Place[] = [];
  private readonly parts = new Map<string, Part>();
  private readonly wires = new Map<string, Wire>();
  private readonly cables = new Map<string, Cable>();
  private readonly used = new Map<string, number>();
  private extras: Pick<Installation, 'notices' | 'silenced'> = {};
  private count = 0;

  constructor(private readonly options: DrawingOptions = {}) {}

  place(id: string, kind: Place['kind'] = 'room', more: Partial<Place> = {}): this {
    this.places.push({ id, name: more.name ?? id, kind, ...more });
    return this;
  }

  /** Adds a part, with its id as designation unless `ref` is given; accessories and joints have none. */
  part<K extends Part['kind']>(kind: K, id: string, place?: string, ratings?: Ratings<K>): this {
    const unnamed = isBar(kind) || kind === 'supply';
    this.parts.set(id, {
      id,
      kind,
      ...(place && { place }),
      ...(!unnamed && { ref: id }),
      ...ratings,
    } as unknown as Part);
    return this;
  }

  /** Changes ratings of a part; an option set to undefined is taken away. */
  set(id: string, ratings: Ratings<Part['kind']>): this {
    const next = { ...this.parts.get(id)!, ...ratings };
    this.parts.set(id, Object.fromEntries(Object.entries(next).filter(([, value]) => value !== undefined)) as Part);
    return this;
  }

  drop(id: string): this {
    this.parts.delete(id);
    for (const wire of [...this.wires.values()])
      if (wire.from[0] === id || wire.to[0] === id) this.wires.delete(wire.id);
    return this;
  }

  cable(id: string, csa: number, length: number, more: Partial<Cable> = {}): this {
    this.cables.set(id, { id, csa, cpc: csa, material: 'Cu', insulation: 'PVC', method: 'C', length, ...more });
    return this;
  }

  wire(role: Role, from: string, to: string, cable?: string, more: Partial<Wire> = {}): this {
    const id = more.id ?? `w${String(++this.count).padStart(3, '0')}`;
    this.wires.set(id, { id, from: this.end(from), to: this.end(to), role, ...(cable && { cable }), ...more });
    return this;
  }
  line = (from: string, to: string, cable?: string): this => this.wire('line', from, to, cable);
  switched = (from: string, to: string, cable?: string): this => this.wire('switched', from, to, cable);
  neutral = (from: string, to: string, cable?: string): this => this.wire('neutral', from, to, cable);
  earth = (from: string, to: string, cable?: string): this => this.wire('earth', from, to, cable);

  /** Takes away every wire between two ends; `NB` alone stands for any terminal of it. */
  cut(from: string, to: string): this {
    for (const wire of this.between(from, to)) this.wires.delete(wire.id);
    return this;
  }

  /** Puts the end at `end` of the wires between two ends somewhere else. */
  move(end: string, other: string, to: string): this {
    for (const wire of this.between(end, other)) {
      const side = this.isAt(wire.from, end) ? 'from' : 'to';
      this.wires.set(wire.id, { ...wire, [side]: this.end(to) });
    }
    return this;
  }

  notice(place: string, text: string): this {
    this.extras = { ...this.extras, notices: [...(this.extras.notices ?? []), { place, text }] };
    return this;
  }

  silence(rule: string, at: string, reason = 'agreed with the client', by = 'T. B.'): this {
    this.extras = { ...this.extras, silenced: [...(this.extras.silenced ?? []), { rule, at, reason, by }] };
    return this;
  }

  /** Id of the only wire between two ends. */
  wireBetween(from: string, to: string): string {
    const found = this.between(from, to);
    if (found.length !== 1) throw new Error(`There are ${found.length} wires between ${from} and ${to}.`);
    return found[0]!.id;
  }

  document(): Installation {
    const { supply, practice = 'IEC' } = this.options;
    return canonical({
      schema: 1,
      title: 'A drawing',
      practice,
      supply: { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.4, zln: 0.3, ...supply },
      ambient: 30,
      places: this.places,
      parts: [...this.parts.values()],
      wires: [...this.wires.values()],
      cables: [...this.cables.values()],
      ...this.extras,
    });
  }

  protected placeOf = (id: string): string | undefined => this.parts.get(id)?.place;

  private between(from: string, to: string): Wire[] {
    return [...this.wires.values()].filter(
      (wire) =>
        (this.isAt(wire.from, from) && this.isAt(wire.to, to)) ||
        (this.isAt(wire.from, to) && this.isAt(wire.to, from)),
    );
  }

  private isAt([part, mark]: [string, string], end: string): boolean {
    return end.includes(':') ? `${part}:${mark}` === end : part === end;
  }

  private end(text: string): [string, string] {
    const colon = text.lastIndexOf(':');
    if (colon >= 0) return [text.slice(0, colon), text.slice(colon + 1)];
    const next = (this.used.get(text) ?? 0) + 1;
    this.used.set(text, next);
    return [text, String(next)];
  }
}
