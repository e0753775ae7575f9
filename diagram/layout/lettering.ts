/** The metric of JetBrains Mono, so that text is as wide on screen, in SVG and in PDF, and lines break at the same place. */

/** Advance of every glyph, in em. */
export const ADVANCE = 0.6;
/** Height of the capitals, in em. */
const CAPITAL = 0.73;
/** Depth below the baseline that `g` and `p` reach, in em. */
const DESCENT = 0.21;

/** The body size: capitals of 2.5 mm, in 1/100 mm. */
export const BODY = 250;

/** The small size, of what a reader looks for second: still 1.8 mm when a sheet is printed at 1:1.25. */
export const SMALL = 225;

/** Font size for capitals of a height, same unit. */
export const fontSize = (size: number): number => size / CAPITAL;

/** Width of a text with capitals of a height, same unit, rounded up. Wide glyphs do not exist in the shipped font. */
export const textWidth = (text: string, size: number, spaced = false): number =>
  Math.ceil([...text].length * (ADVANCE * fontSize(size) + (spaced ? SPACING * size : 0)));

/** Extra letter spacing of a spaced text, as a share of its capitals' height. */
export const SPACING = 0.35;

export const textDescent = (size: number): number => Math.ceil(DESCENT * fontSize(size));

/** Breaks a text into lines no wider than `width`, at spaces; a longer word is cut. */
export function breakLines(text: string, size: number, width: number): string[] {
  const room = Math.max(1, Math.floor(width / (ADVANCE * fontSize(size))));
  const lines: string[] = [];
  for (const paragraph of text.split('\n')) {
    let line = '';
    for (let word of paragraph.split(' ')) {
      while (word.length > room) {
        if (line) lines.push(line);
        lines.push(word.slice(0, room));
        word = word.slice(room);
        line = '';
      }
      if (!line) line = word;
      else if (line.length + 1 + word.length <= room) line += ` ${word}`;
      else {
        lines.push(line);
        line = word;
      }
    }
    lines.push(line);
  }
  return lines;
}
