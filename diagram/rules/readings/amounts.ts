import type { Cable } from '../../document/schema';

/** Figures as findings say them: as many digits as a person would write. */

const digits = (value: number, most: number): string => String(Number(value.toFixed(most)));

export const amps = (value: number): string => `${digits(value, value < 100 ? 1 : 0)} A`;
export const watts = (value: number): string => `${digits(value, 0)} W`;
export const voltAmps = (value: number): string => `${digits(value, 0)} VA`;
export const percent = (value: number): string => `${digits(value, 2)} %`;
export const ohms = (value: number): string => `${digits(value, value < 10 ? 2 : 0)} ohm`;
export const hours = (value: number): string => `${digits(value, 1)} h`;
export const mm2 = (value: number): string => `${digits(value, 2)} mm2`;
/** A time of a device: ms below a second. */
export const seconds = (value: number): string =>
  value < 1 ? `${digits(value * 1000, 0)} ms` : `${digits(value, 1)} s`;

/** "k3 (1.5 mm2)", or "the 1.5 mm2 run" where it has no designation. */
export const sayCable = ({ ref, csa }: Cable): string => (ref ? `${ref} (${mm2(csa)})` : `the ${mm2(csa)} run`);

/** A hair above 1: what equals its limit is within it, whatever the last binary digit says. */
const HAIR = 1 + 1e-9;
export const exceeds = (value: number, limit: number): boolean => value > limit * HAIR;
