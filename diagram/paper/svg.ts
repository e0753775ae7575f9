import type { Installation } from '../document/schema';
import { outlinedPage, type Glyphs } from './outlines';
import { sheetPages, type SheetOptions } from './sheet';
import type { Page } from './primitives';
import { escapeXml, svgGroup } from './svg-marks';

/** A sheet as SVG in millimetres: plain paths and text, no style sheet needed, so that a general vector editor opens it. */

export interface SvgOptions extends SheetOptions {
  /** number of the sheet, from 1; the first where left out */
  sheet?: number;
  /** woff2 files as base64, to be carried in the file: plain text stays text, with the shipped lettering anywhere */
  fonts?: { regular: string; bold: string };
  /** where given, letters are drawn as shapes and no font is needed */
  glyphs?: Glyphs;
}

const fontFace = (weight: number, data: string): string =>
  `@font-face{font-family:"JetBrains Mono";font-weight:${weight};src:url(data:font/woff2;base64,${data}) format("woff2")}`;

/** One page as an SVG document. The user unit is 1/100 mm; width and height are stated in mm. */
export function pageSvg(page: Page, title: string, fonts?: SvgOptions['fonts']): string {
  const style = fonts ? `<style>${fontFace(400, fonts.regular)}${fontFace(700, fonts.bold)}</style>` : '';
  const groups = page.groups.map((group, i) => svgGroup(group, 1, String(i))).join('\n');
  return `<?xml version="1.0" encoding="UTF-8"?>
<svg xmlns="http://www.w3.org/2000/svg" width="${page.width / 100}mm" height="${page.height / 100}mm" viewBox="0 0 ${page.width} ${page.height}" font-family="'JetBrains Mono', monospace" style="font-variant-ligatures:none">
<title>${escapeXml(title)}</title>${style}
${groups}
</svg>
`;
}

/** A sheet of the drawing as SVG, written from the document and always in the light palette. */
export function paperSvg(doc: Installation, options: SvgOptions): string {
  const pages = sheetPages(doc, options);
  const number = Math.min(Math.max(1, options.sheet ?? 1), pages.length);
  const { title, glyphs } = options;
  const page = pages[number - 1]!;
  return pageSvg(
    glyphs ? outlinedPage(page, glyphs) : page,
    `${title.number} ${title.title}, revision ${title.revision}, ${title.drawnBy}, ${title.drawnOn}`,
    glyphs ? undefined : options.fonts,
  );
}
