import { fontSizeOf, letterSpacing, type Group, type Mark } from './primitives';

/** Numbers with at most three decimals and no negative zero. */
export const num = (value: number): string => String(Number(value.toFixed(3)) + 0);

export const escapeXml = (text: string): string =>
  text
    .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '')
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;')
    .replace(/"/g, '&quot;');

function svgMark(mark: Mark, scale: number): string {
  if (mark.kind === 'path') {
    const stroke = mark.stroke
      ? ` stroke="${mark.stroke}" stroke-width="${num((mark.width ?? 25) / scale)}" stroke-linecap="${mark.cap ?? 'round'}" stroke-linejoin="round"${
          mark.dash ? ` stroke-dasharray="${mark.dash.map((n) => num(n / scale)).join(' ')}"` : ''
        }`
      : '';
    return `<path d="${mark.d}" fill="${mark.fill ?? 'none'}"${stroke}/>`;
  }
  const turn = mark.turn ? ` transform="rotate(${90 * mark.turn} ${num(mark.x)} ${num(mark.y)})"` : '';
  const anchor = mark.anchor && mark.anchor !== 'start' ? ` text-anchor="${mark.anchor}"` : '';
  const spacing = mark.spaced ? ` letter-spacing="${num(letterSpacing(mark))}"` : '';
  return `<text x="${num(mark.x)}" y="${num(mark.y)}" font-size="${num(fontSizeOf(mark))}"${mark.bold ? ' font-weight="700"' : ''} fill="${mark.colour}"${anchor}${spacing}${turn} xml:space="preserve">${escapeXml(mark.text)}</text>`;
}

/** A group as an svg element; `scale` is that of the groups round it. Clips are named by their place in the sheet. */
export function svgGroup(group: Group, scale = 1, name = 'g'): string {
  const spin = group.turn ? ` rotate(${90 * group.turn})` : '';
  const grow = group.scale === 1 ? '' : ` scale(${num(group.scale)})`;
  const inner = group.scale * scale;
  const { clip } = group;
  const id = `clip-${name}`;
  const cut = clip
    ? `<clipPath id="${id}"><rect x="${num(clip.x)}" y="${num(clip.y)}" width="${num(clip.width)}" height="${num(clip.height)}"/></clipPath>`
    : '';
  const content =
    group.marks.map((mark) => svgMark(mark, inner)).join('') +
    (group.groups ?? []).map((child, i) => svgGroup(child, inner, `${name}-${i}`)).join('');
  return `<g transform="translate(${num(group.x)} ${num(group.y)})${grow}${spin}">${cut}${clip ? `<g clip-path="url(#${id})">${content}</g>` : content}</g>`;
}
