import 'server-only';
import { join } from 'node:path';

/** The shipped lettering by script: a text is drawn in runs, each from the file that holds its signs. */

const SCRIPTS = [
  ...(['latin', 'latin-ext', 'greek', 'cyrillic', 'cyrillic-ext', 'vietnamese'] as const),
  ...(['arabic', 'hebrew', 'devanagari'] as const),
] as const;
type Script = (typeof SCRIPTS)[number];

/** Ranges of the font's files, as its package states them; the first that holds a sign wins. */
const RANGES: Record<Script, readonly (readonly [number, number])[]> = {
  latin: [
    [0x20, 0xff],
    [0x131, 0x131],
    [0x152, 0x153],
    [0x2bb, 0x2bc],
    [0x2c6, 0x2c6],
    [0x2da, 0x2da],
    [0x2dc, 0x2dc],
    [0x2000, 0x206f],
    [0x20ac, 0x20ac],
    [0x2122, 0x2122],
    [0x2191, 0x2191],
    [0x2193, 0x2193],
    [0x2212, 0x2212],
    [0x2215, 0x2215],
  ],
  vietnamese: [
    [0x102, 0x103],
    [0x110, 0x111],
    [0x128, 0x129],
    [0x168, 0x169],
    [0x1a0, 0x1a1],
    [0x1af, 0x1b0],
    [0x1ea0, 0x1ef9],
    [0x20ab, 0x20ab],
  ],
  'latin-ext': [
    [0x100, 0x2ba],
    [0x2bd, 0x2c5],
    [0x2c7, 0x2cc],
    [0x2ce, 0x2d7],
    [0x2dd, 0x2ff],
    [0x1d00, 0x1dbf],
    [0x1e00, 0x1e9f],
    [0x1ef2, 0x1eff],
    [0x20a0, 0x20c0],
    [0x2113, 0x2113],
    [0x2c60, 0x2c7f],
    [0xa720, 0xa7ff],
  ],
  greek: [[0x370, 0x3ff]],
  cyrillic: [
    [0x400, 0x45f],
    [0x490, 0x491],
    [0x4b0, 0x4b1],
    [0x2116, 0x2116],
  ],
  'cyrillic-ext': [
    [0x460, 0x52f],
    [0x1c80, 0x1c88],
    [0x20b4, 0x20b4],
    [0x2de0, 0x2dff],
    [0xa640, 0xa69f],
  ],
  arabic: [
    [0x600, 0x6ff],
    [0x750, 0x77f],
    [0x8a0, 0x8ff],
    [0xfb50, 0xfdff],
    [0xfe70, 0xfefc],
  ],
  hebrew: [
    [0x590, 0x5ff],
    [0xfb1d, 0xfb4f],
  ],
  devanagari: [
    [0x900, 0x97f],
    [0xa8e0, 0xa8ff],
  ],
};
const ORDER: readonly Script[] = ['latin', 'vietnamese', 'latin-ext', 'greek', 'cyrillic', 'cyrillic-ext', 'arabic', 'hebrew', 'devanagari'];
/** Scripts whose signs join and stack: a run of them is set whole, in widths of its own. */
const JOINED: ReadonlySet<Script> = new Set<Script>(['arabic', 'hebrew', 'devanagari']);
const FROM_RIGHT: ReadonlySet<Script> = new Set<Script>(['arabic', 'hebrew']);

export const isJoined = (script: Script): boolean => JOINED.has(script);
export const runsFromRight = (script: Script): boolean => FROM_RIGHT.has(script);

/** Drawn for a sign that no file of the lettering holds. */
const STAND_IN = '?';

const scriptOf = (sign: string): Script | null => {
  const code = sign.codePointAt(0)!;
  return ORDER.find((script) => RANGES[script].some(([from, to]) => code >= from && code <= to)) ?? null;
};

export interface Run {
  script: Script;
  text: string;
  /** signs before it */
  offset: number;
}

const countOf = (text: string): number => [...text].length;
const turned = (text: string): string => [...text].reverse().join('');
const isLetter = (sign: string): boolean => /\p{L}/u.test(sign);

/** A space between two words of a script that is set whole belongs to it. */
function scriptAt(signs: readonly string[], i: number): Script | null {
  if (signs[i] !== ' ') return scriptOf(signs[i]!);
  const [before, after] = [signs[i - 1], signs[i + 1]].map((sign) => (sign === undefined ? null : scriptOf(sign)));
  return before && before === after && isJoined(before) ? before : 'latin';
}

/** From the left as they are seen: a text that begins from the right has its first run at the right. */
function fromRight(runs: readonly Run[], signs: number): Run[] {
  return runs
    .map(({ script, text, offset }): Run => {
      // what belongs to no script, a space or a comma, keeps to the side on which it was written
      const [, lead = '', core = '', trail = ''] = /^([\s\p{P}]*)(.*?)([\s\p{P}]*)$/su.exec(text) ?? [];
      const seen = isJoined(script) ? text : `${turned(trail)}${core}${turned(lead)}`;
      return { script, text: seen, offset: signs - offset - countOf(text) };
    })
    .reverse();
}

/** A text in runs of one script, from the left as they are seen; every sign has the same room. */
export function runsOf(text: string): Run[] {
  const runs: Run[] = [];
  const signs = [...text];
  signs.forEach((sign, offset) => {
    // the electrical sign for ohm is drawn as the Greek letter it looks like
    const shown = sign === '\u2126' ? '\u03a9' : sign;
    const script = shown === sign ? scriptAt(signs, offset) : scriptOf(shown);
    const last = runs.at(-1);
    if (last && last.script === (script ?? 'latin')) last.text += script ? shown : STAND_IN;
    else runs.push({ script: script ?? 'latin', text: script ? shown : STAND_IN, offset });
  });
  const first = signs.find(isLetter);
  const script = first === undefined ? null : scriptOf(first);
  return script && runsFromRight(script) ? fromRight(runs, signs.length) : runs;
}

export const fontName = (script: Script, bold: boolean): string => `${script} ${bold ? 'bold' : 'regular'}`;

const familyOf = (script: Script): string => (isJoined(script) ? `noto-sans-${script}` : 'jetbrains-mono');

/** Where a file of the lettering lies. */
export const fontFile = (script: Script, weight: 400 | 700): string =>
  join(
    process.cwd(),
    `node_modules/@fontsource/${familyOf(script)}/files`,
    `${familyOf(script)}-${script}-${weight}-normal.woff`,
  );

/** Makes all files known to a PDF; only those that are used are carried in it. */
export function registerFonts(pdf: { registerFont(name: string, src: string): unknown }): void {
  for (const script of SCRIPTS) {
    pdf.registerFont(fontName(script, false), fontFile(script, 400));
    pdf.registerFont(fontName(script, true), fontFile(script, 700));
  }
}
