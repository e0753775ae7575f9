import 'server-only';
import { create, type Font } from 'fontkit';
import { readFileSync } from 'node:fs';
import type { Glyph, Glyphs } from '@/diagram/paper/outlines';
import { fontFile, runsOf } from './fonts';

/** The shapes of the shipped lettering, read once a file; each sign as it is asked for. */

const fonts = new Map<string, Font>();
const known = new Map<string, Glyph>();

function fontOf(file: string): Font {
  const open = fonts.get(file);
  if (open) return open;
  const font = create(readFileSync(file));
  if (!('glyphForCodePoint' in font)) throw new Error(`${file} holds no single font`);
  fonts.set(file, font);
  return font;
}

/** Quadratic curves of the font's own format as the cubic ones that paper knows. */
function shape(font: Font, code: number): Glyph {
  const commands: { command: 'moveTo' | 'lineTo' | 'curveTo' | 'closePath'; args: number[] }[] = [];
  let at: [number, number] = [0, 0];
  for (const { command, args } of font.glyphForCodePoint(code).path.commands) {
    if (command === 'quadraticCurveTo') {
      const [cx = 0, cy = 0, x = 0, y = 0] = args;
      const third = (a: number, b: number): number => a + (2 / 3) * (b - a);
      commands.push({ command: 'curveTo', args: [third(at[0], cx), third(at[1], cy), third(x, cx), third(y, cy), x, y] });
    } else if (command === 'bezierCurveTo') commands.push({ command: 'curveTo', args: [...args] });
    else commands.push({ command, args: [...args] });
    if (args.length > 1) at = [args.at(-2)!, args.at(-1)!];
  }
  return { em: font.unitsPerEm, commands };
}

export const glyphs: Glyphs = (sign, bold) => {
  const name = `${bold ? 'bold' : 'regular'} ${sign}`;
  const kept = known.get(name);
  if (kept) return kept;
  const [run] = runsOf(sign);
  const glyph = shape(fontOf(fontFile(run!.script, bold ? 700 : 400)), run!.text.codePointAt(0)!);
  known.set(name, glyph);
  return glyph;
};
