/** How every picture is drawn: the sheet's own inks and lettering, by the theme's variables, so that dark and print follow. */
export const INK = 'var(--ink)';
export const GREY = 'var(--grey)';
export const HAIR = 'var(--hair)';
export const RED = 'var(--red)';
export const ROW = 'var(--row)';
export const PAPER = 'var(--paper)';

export const LETTERING = { fontSize: 11, fill: INK } as const;
/** Words among lines stand on a margin of paper. */
export const LABEL = { ...LETTERING, stroke: PAPER, strokeWidth: 3, paintOrder: 'stroke' } as const;
export const GREY_LETTERING = { fontSize: 11, fill: GREY } as const;

/** Lines tell themselves apart by dash first. */
export const DASH = { wish: '6 4', limit: '6 4', fault: '2 3', other: '1.5 3', beyond: '4 3' } as const;

export const HEIGHT = 280;
export const MARGIN = { top: 28, right: 16, bottom: 8, left: 4 } as const;

const STEPS = [1, 3] as const;

/** Marks 1, 3, 10, 30 ... of a logarithmic axis that covers a range. */
export function logTicks(from: number, to: number): number[] {
  const ticks: number[] = [];
  for (let power = Math.floor(Math.log10(from)); power <= Math.ceil(Math.log10(to)); power++)
    for (const step of STEPS) ticks.push(Number((step * 10 ** power).toPrecision(6)));
  return ticks.filter((tick) => tick >= from * 0.999 && tick <= to * 1.001);
}

/** The decade marks 1 and 3 around a range. */
export function logRange(least: number, most: number): [number, number] {
  const marks = logTicks(10 ** Math.floor(Math.log10(least) - 1), 10 ** Math.ceil(Math.log10(most) + 1));
  return [marks.findLast((mark) => mark <= least) ?? least, marks.find((mark) => mark >= most) ?? most];
}

/** An axis from 0 in even steps of 1, 2 or 5 times a power of ten, four to seven marks. */
export function axis(most: number): { domain: [number, number]; ticks: number[] } {
  const power = 10 ** Math.floor(Math.log10(Math.max(most, 1e-9)) - 1);
  const step = [1, 2, 5, 10, 20, 50].map((each) => each * power).find((each) => most / each <= 6)!;
  const count = Math.ceil(most / step - 1e-9);
  const ticks = Array.from({ length: count + 1 }, (_, i) => Number((i * step).toPrecision(10)));
  return { domain: [0, ticks.at(-1)!], ticks };
}

/** The unit at the upper end of an upright axis, clear of its topmost mark. */
export const axisUnit = (value: string) => ({ value, position: 'insideTopLeft' as const, dy: -24, ...GREY_LETTERING });
