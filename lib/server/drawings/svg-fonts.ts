import 'server-only';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';

export interface SvgFonts {
  regular: string;
  bold: string;
}

const read = (weight: number): Promise<string> =>
  readFile(
    join(process.cwd(), `node_modules/@fontsource/jetbrains-mono/files/jetbrains-mono-latin-${weight}-normal.woff2`),
    'base64',
  );

let fonts: Promise<SvgFonts> | undefined;

/** The shipped lettering as base64, so that an SVG shows the same letters on a machine that has not got it. */
export function svgFonts(): Promise<SvgFonts> {
  fonts ??= Promise.all([read(400), read(700)]).then(([regular, bold]) => ({ regular, bold }));
  return fonts;
}
