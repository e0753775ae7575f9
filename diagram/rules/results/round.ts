/** Six places: far below what any figure means, and short enough to be read in a line of JSON. */
export const round = (value: number): number => Number(value.toFixed(6));
export const roundOrNull = (value: number | null): number | null =>
  value === null || !Number.isFinite(value) ? null : round(value);
