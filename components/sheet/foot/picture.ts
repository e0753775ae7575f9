/** Pictures of the sheet: always from its SVG, written from the document, never from the screen. */

/** px: what browsers draw at most along a side and in all; above it they give an empty picture without a word. */
const LONGEST = 16_384;
const LARGEST = 120_000_000;
const MM_PER_INCH = 25.4;

/** Size in mm that an SVG of the paper writer states. */
export function sizeOfSvg(svg: string): { width: number; height: number } | null {
  const found = /<svg[^>]*\bwidth="([\d.]+)mm"[^>]*\bheight="([\d.]+)mm"/.exec(svg);
  return found ? { width: Number(found[1]), height: Number(found[2]) } : null;
}

/** Whether a browser can draw a picture so large. @returns its size in px, or what to do instead */
export function pictureSize(
  mm: { width: number; height: number },
  dpi: number,
): { width: number; height: number } | { refused: string } {
  const width = Math.round((mm.width / MM_PER_INCH) * dpi);
  const height = Math.round((mm.height / MM_PER_INCH) * dpi);
  if (width <= LONGEST && height <= LONGEST && width * height <= LARGEST) return { width, height };
  return {
    refused: `${width} × ${height} points are more than a browser draws. Take fewer dots per inch, or the PDF.`,
  };
}

/** Draws an SVG as a PNG of so many dots per inch. */
export async function svgToPng(svg: string, dpi: number): Promise<Blob | { refused: string }> {
  const mm = sizeOfSvg(svg);
  if (!mm) return { refused: 'The drawing has no size in millimetres.' };
  const size = pictureSize(mm, dpi);
  if ('refused' in size) return size;
  const image = new Image();
  const url = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml' }));
  try {
    image.src = url;
    await image.decode();
    const canvas = document.createElement('canvas');
    canvas.width = size.width;
    canvas.height = size.height;
    const ink = canvas.getContext('2d');
    if (!ink) return { refused: 'This browser gives no room for a picture of that size.' };
    ink.fillStyle = '#ffffff';
    ink.fillRect(0, 0, size.width, size.height);
    ink.drawImage(image, 0, 0, size.width, size.height);
    const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
    return blob ?? { refused: 'This browser could not draw a picture of that size. Take fewer dots per inch.' };
  } finally {
    URL.revokeObjectURL(url);
  }
}

/** Hands a blob to the browser as a file to keep. */
export function saveBlob(name: string, blob: Blob): void {
  const url = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  URL.revokeObjectURL(url);
}
