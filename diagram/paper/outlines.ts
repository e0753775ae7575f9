import { ADVANCE } from '../layout/lettering';
import { fontSizeOf, letterSpacing, type Group, type Mark, type Page, type PathMark, type TextMark } from './primitives';

/** Text as outlines: a print shop or another program shows the very letters, whatever lettering it has. */

/** The shape of a sign by cubic curves, its origin at the baseline, y upwards, 1 em wide units of `em`. */
export interface Glyph {
  em: number;
  commands: readonly { command: 'moveTo' | 'lineTo' | 'curveTo' | 'closePath'; args: readonly number[] }[];
}
/** Shapes of the shipped lettering. */
export type Glyphs = (sign: string, bold: boolean) => Glyph;

/** Scripts whose signs join and stack are shaped by the writer of the file: they stay text. */
const JOINED = /[\u0590-\u06ff\u0750-\u077f\u08a0-\u097f\ua8e0-\ua8ff\ufb1d-\ufdff\ufe70-\ufefc]/;

const LETTER = { moveTo: 'M', lineTo: 'L', curveTo: 'C', closePath: 'Z' } as const;
const TURN = [
  [1, 0],
  [0, 1],
  [-1, 0],
  [0, -1],
] as const;
const rounded = (value: number): number => Math.round(value * 100) / 100 + 0;

function outlined(mark: TextMark, glyphs: Glyphs): PathMark | null {
  const size = fontSizeOf(mark);
  const advance = ADVANCE * size + letterSpacing(mark);
  const signs = [...mark.text];
  const width = signs.length * advance;
  const left = mark.anchor === 'middle' ? -width / 2 : mark.anchor === 'end' ? -width : 0;
  const [cos, sin] = TURN[mark.turn ?? 0];
  let d = '';
  signs.forEach((sign, i) => {
    if (sign === ' ') return;
    const { em, commands } = glyphs(sign, mark.bold ?? false);
    const scale = size / em;
    for (const { command, args } of commands) {
      d += LETTER[command];
      for (let k = 0; k < args.length; k += 2) {
        const [x, y] = [left + i * advance + args[k]! * scale, -args[k + 1]! * scale];
        d += `${k > 0 ? ' ' : ''}${rounded(mark.x + x * cos - y * sin)} ${rounded(mark.y + x * sin + y * cos)}`;
      }
    }
  });
  return d === '' ? null : { kind: 'path', d, fill: mark.colour };
}

function outlinedGroup(group: Group, glyphs: Glyphs): Group {
  const marks = group.marks.flatMap((mark): Mark[] => {
    if (mark.kind === 'path' || JOINED.test(mark.text)) return [mark];
    const path = outlined(mark, glyphs);
    return path ? [path] : [];
  });
  return { ...group, marks, ...(group.groups && { groups: group.groups.map((g) => outlinedGroup(g, glyphs)) }) };
}

/** A page whose texts are drawn as shapes, at the same places. */
export const outlinedPage = (page: Page, glyphs: Glyphs): Page => ({
  ...page,
  groups: page.groups.map((group) => outlinedGroup(group, glyphs)),
});
