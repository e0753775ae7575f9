/** A cell that a spreadsheet would take for a formula is given an apostrophe, so that it shows as text. */
const FORMULA = /^[=+\-@\t\r]/;
const NUMBER = /^-?\d+(\.\d+)?$/;

function cell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const safe = FORMULA.test(value) && !NUMBER.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** Rows as RFC 4180 text, with a byte order mark so that spreadsheets read it as UTF-8. */
export const csvText = (rows: readonly (readonly (string | number | null)[])[]): string =>
  `\ufeff${rows.map((row) => row.map(cell).join(',')).join('\r\n')}\r\n`;
