import { practices } from '../../practices';
import type { End, Part } from '../../document/schema';
import { POWER_FACTOR } from '../../survey/drafting/assumptions';
import { cableOf } from '../../survey/drafting/room-box';
import { sizeRun, type RunSize } from '../../survey/drafting/size-run';
import { Sketch } from '../../survey/drafting/sketch';
import { withPlaces } from '../place-new';
import { tapAt } from '../tap';
import { diff } from '../../document/patch';
import type { Command } from '../types';
import type { At } from './types';

/** One suggestion while it draws: a sketch of the document, and the few strokes that all suggestions share. */
export class Strokes {
  readonly sketch: Sketch;

  constructor(readonly at: At) {
    this.sketch = new Sketch(at.doc, practices[at.doc.practice]);
  }

  /** A new part beside the one in hand, in its place and board unless said otherwise. */
  part(
    part: Parameters<Sketch['part']>[0] extends infer P ? (P extends { id: string } ? Omit<P, 'id'> : never) : never,
    ref?: string | null,
  ): string {
    const { place, board } = this.at.part;
    const whole = { id: this.at.newId(), ...(place && { place }), ...(board && { board }), ...part } as Parameters<
      Sketch['part']
    >[0];
    return ref === undefined ? this.sketch.part(whole) : this.sketch.part(whole, ref);
  }

  /** Where one more wire may end: a free screw, the terminal while it has room for two, else a joint that takes over. */
  tap(end: End): End {
    return tapAt(this.sketch, end, this.at.newId);
  }

  /** The earth to use: of the way, else a new earth bar beside the part in hand. */
  earth(): End {
    const { E } = this.at.feed;
    if (E) return this.tap(E);
    const { place, board } = this.at.part;
    const bar = this.sketch.part(
      { id: this.at.newId(), kind: 'earth-bar', ...(place && { place }), ...(board && { board }) },
      this.sketch.nextRef('X'),
    );
    return this.sketch.nextOn(bar);
  }

  neutral(): End | null {
    const { N } = this.at.feed;
    return N && this.tap(N);
  }

  cable(size: RunSize, metres: number, options: { cores?: number; fromBoard?: boolean } = {}): string {
    return cableOf(this.sketch, this.at.newId(), size, metres, options);
  }

  command(label: string, next?: End, parts?: readonly string[]): Command {
    const patch = withPlaces(this.at.doc, diff(this.at.doc, this.sketch.finish()));
    return { label, patch, ...(next && { next }), ...(parts && { parts }) };
  }
}

export type Use = 'lighting' | 'outlets' | 'heavy' | 'backup';

/** What the practice drafts for a use: breaker and least cable. A way behind the inverter is drafted as backup. */
export const draftFor = (at: At, use: Use) => at.practice.draft[use === 'lighting' && at.backup ? 'backup' : use];

/** A cable of one size as it is sold. */
export const plainSize = (at: At, csaMm2: number): RunSize => ({
  csaMm2,
  cpcMm2: at.practice.cpcMm2.value[csaMm2] ?? csaMm2,
  grouped: 1,
});

/**
 * The cable of a run by capacity and volt drop, behind the device that feeds the terminal in hand.
 * @returns the least size of the use where nothing on sale meets all of it: the examination then says so
 */
export function sizeFor(
  at: At,
  use: Use,
  device: { ratingA: number; curve: 'B' | 'C' | 'D' },
  watts: number,
  metres: number,
): RunSize {
  const least = draftFor(at, use).csaMm2;
  const amps = watts / (at.doc.supply.voltage * (use === 'lighting' ? POWER_FACTOR.lamp : 1));
  const size = sizeRun({
    practice: at.practice,
    voltage: at.doc.supply.voltage,
    ambientC: at.doc.ambient,
    ...device,
    amps,
    lengthM: metres,
    use: at.backup ? 'backup' : use === 'lighting' ? 'lighting' : 'other',
    leastMm2: least,
  });
  return size ?? plainSize(at, least);
}

/** The overcurrent device before a terminal; what the practice drafts for the use where none is drawn. */
export function deviceBefore(at: At, use: Use): { ratingA: number; curve: 'B' | 'C' | 'D' } {
  const parts = new Map(at.doc.parts.map((part) => [part.id, part]));
  for (let end: End | null = at.end; end; end = at.walk.get(`${end[0]} ${end[1]}`)?.from ?? null) {
    const part = parts.get(end[0]) as Part;
    if ((part.kind === 'mcb' || part.kind === 'rcbo') && part.rating)
      return { ratingA: part.rating, curve: part.curve ?? 'B' };
  }
  const draft = draftFor(at, use);
  return { ratingA: draft.ratingA, curve: draft.curve };
}

/** The size of the cable that feeds the terminal in hand, for what goes on from it; the practice's least where none does. */
export function sizeHere(at: At, use: Use): RunSize {
  for (let end: End | null = at.end; end; ) {
    const step = at.walk.get(`${end[0]} ${end[1]}`);
    const id = step?.wire && at.doc.wires.find((wire) => wire.id === step.wire)?.cable;
    const cable = id && at.doc.cables.find((other) => other.id === id);
    if (cable) return { csaMm2: cable.csa, cpcMm2: cable.cpc ?? cable.csa, grouped: 1 };
    end = step?.from ?? null;
  }
  return plainSize(at, draftFor(at, use).csaMm2);
}

export const sizeWords = ({ csaMm2 }: RunSize, cores = 3): string => `${cores}×${csaMm2}`;
