/** Calendar days without a clock: an ISO date in, words or a number of days out. */
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const LONG = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'];
const DAY_MS = 86_400_000;

const parts = (iso: string): [number, number, number] => {
  const [year, month, day] = iso.slice(0, 10).split('-').map(Number);
  return [year!, month!, day!];
};
const utc = (iso: string): number => {
  const [year, month, day] = parts(iso);
  return Date.UTC(year, month - 1, day);
};

/** Whole days from one ISO date to another; negative when `to` is earlier. */
export const daysBetween = (from: string, to: string): number => Math.round((utc(to) - utc(from)) / DAY_MS);

export const addDays = (iso: string, days: number): string => new Date(utc(iso) + days * DAY_MS).toISOString().slice(0, 10);

export const dayOfMonth = (iso: string): number => parts(iso)[2];
export const monthName = (iso: string): string => LONG[parts(iso)[1] - 1]!;

/** "2 Dec", with the year where it is not that of `today`. */
export function shortDate(iso: string, today: string): string {
  const [year, month, day] = parts(iso);
  return `${day} ${MONTHS[month - 1]}${year === parts(today)[0] ? '' : ` ${year}`}`;
}
