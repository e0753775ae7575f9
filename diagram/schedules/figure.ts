import type { FigureCell } from './types';

/** A figure with as many digits as a person would write; unrounded for files. */
export function figure(value: number, digits: number, more: Omit<FigureCell, 'text' | 'value'> = {}): FigureCell {
  return { text: value.toFixed(digits), value, ...more };
}

/** Three telling digits: 0.13, 8.70, 13.0, 487. */
export const amps = (value: number): string => value.toFixed(value < 10 ? 2 : value < 100 ? 1 : 0);

export const ampsFigure = (value: number, more: Omit<FigureCell, 'text' | 'value'> = {}): FigureCell => ({
  text: amps(value),
  value,
  ...more,
});

/** A figure that is missing, and what it waits for: "Iz needs how it is laid". */
export const missing = (lacks: string): FigureCell => ({ text: '?', value: null, lacks });

/** Nothing to be said here, and rightly so. */
export const none: FigureCell = { text: '-', value: null };

export const text = (words: string): FigureCell => ({ text: words });

/** A time of a device: "40 ms", "3.2 s". */
export const seconds = (value: number): string =>
  value < 1 ? `${Math.round(value * 1000)} ms` : `${value.toFixed(1)} s`;

/** "3 h 24", "4 h", "45 min" */
export function hoursText(hours: number): string {
  if (!Number.isFinite(hours)) return 'no end';
  const minutes = Math.round(hours * 60);
  if (minutes < 60) return `${minutes} min`;
  const rest = minutes % 60;
  return `${Math.floor(minutes / 60)} h${rest === 0 ? '' : ` ${String(rest).padStart(2, '0')}`}`;
}
