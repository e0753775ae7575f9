import { byDesignation, listNames, nameOf } from '../document/names';
import type { Installation, Part } from '../document/schema';

/** Figures as a drawing writes them: as few digits as one needs. */

/** "0 V", "0.4 V", "229 V". */
export function voltText(volts: number): string {
  if (volts < 0.05) return '0 V';
  return volts < 9.95 ? `${Number(volts.toFixed(1))} V` : `${Math.round(volts)} V`;
}

/** "0 A", "43 mA", "0.35 A", "12.1 A", "281 A". */
export function ampText(amps: number): string {
  if (amps < 0.0005) return '0 A';
  if (amps < 0.0995) return `${Math.round(amps * 1000)} mA`;
  if (amps < 0.995) return `${amps.toFixed(2)} A`;
  return amps < 99.5 ? `${Number(amps.toFixed(1))} A` : `${Math.round(amps)} A`;
}

/** A duration as one says it: "18 ms", "0.4 s", "12 s", "25 min", "2 h". */
export function timeText(seconds: number): string {
  if (seconds === 0) return '0';
  if (seconds < 0.0995) return `${Number((seconds * 1000).toPrecision(2))} ms`;
  if (seconds < 99.5) return `${Number(seconds.toPrecision(2))} s`;
  if (seconds < 5400) return `${Math.round(seconds / 60)} min`;
  return `${Number((seconds / 3600).toPrecision(2))} h`;
}

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
export const count = (number: number, one: string, many = `${one}s`): string =>
  `${number} ${number === 1 ? one : many}`;

type Places = Pick<Installation, 'places'>;

/** What a person calls a part in a sentence; the supply has no designation, there is one. */
export const partName = (doc: Places, part: Part): string =>
  part.kind === 'supply' && !part.ref ? 'the supply' : nameOf(doc, part);

/** "E1, E2 and 3 more", by designation. */
export const partNames = (doc: Places, parts: readonly Part[]): string =>
  listNames([...parts].sort(byDesignation).map((part) => partName(doc, part)));
