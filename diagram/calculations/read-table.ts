import type { Table } from '../practices/types';

/** The printed value for exactly this argument; null where the table has no such row. */
export function printedAt(table: Table, at: number): number | null {
  return table.rows.find((row) => row.at === at)?.value ?? null;
}

/**
 * Reads between the rows on a straight line; outside the table its end value stands. The factors are concave in
 * temperature, so a straight line between printed rows never gives more than the formula behind them.
 */
export function interpolated(table: Table, at: number): number {
  const { rows } = table;
  const above = rows.findIndex((row) => row.at >= at);
  if (above === 0) return rows[0]!.value;
  if (above === -1) return rows[rows.length - 1]!.value;
  const a = rows[above - 1]!;
  const b = rows[above]!;
  return a.value + ((at - a.at) / (b.at - a.at)) * (b.value - a.value);
}

/**
 * The row at this argument, else the next one above it: the safe reading of a table of counts. Past its end, the last.
 */
export function nextAbove(table: Table, at: number): number {
  return (table.rows.find((row) => row.at >= at) ?? table.rows[table.rows.length - 1]!).value;
}
