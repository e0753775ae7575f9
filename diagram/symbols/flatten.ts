/** Path data of a symbol as straight stretches, to see what lies on its strokes. */

export interface Stretch {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
}

const STEP = Math.PI / 8;
const COUNT: Record<string, number> = { M: 2, L: 2, H: 1, V: 1, A: 7, C: 6, Z: 0 };

/** Points of an arc after its first one, by the conversion of SVG 1.1, appendix F.6 (from memory); no rotation. */
function arc(x1: number, y1: number, v: readonly number[]): [number, number][] {
  const [rx0 = 0, ry0 = 0, , large = 0, sweep = 0, x2 = 0, y2 = 0] = v;
  if (rx0 === 0 || ry0 === 0 || (x1 === x2 && y1 === y2)) return [[x2, y2]];
  const [dx, dy] = [(x1 - x2) / 2, (y1 - y2) / 2];
  const grow = Math.max(1, Math.sqrt((dx / rx0) ** 2 + (dy / ry0) ** 2));
  const [rx, ry] = [rx0 * grow, ry0 * grow];
  const far = (rx * dy) ** 2 + (ry * dx) ** 2;
  const k = (large === sweep ? -1 : 1) * Math.sqrt(Math.max(0, (rx * ry) ** 2 / far - 1));
  const [cx, cy] = [(k * rx * dy) / ry + (x1 + x2) / 2, (-k * ry * dx) / rx + (y1 + y2) / 2];
  const from = Math.atan2((y1 - cy) / ry, (x1 - cx) / rx);
  let turn = Math.atan2((y2 - cy) / ry, (x2 - cx) / rx) - from;
  if (sweep && turn < 0) turn += 2 * Math.PI;
  if (!sweep && turn > 0) turn -= 2 * Math.PI;
  const steps = Math.max(1, Math.ceil(Math.abs(turn) / STEP));
  return Array.from({ length: steps }, (_, i): [number, number] => {
    const at = from + (turn * (i + 1)) / steps;
    return i === steps - 1 ? [x2, y2] : [cx + rx * Math.cos(at), cy + ry * Math.sin(at)];
  });
}

/** The stretches of absolute path data of M, L, H, V, A, C and Z; a curve is taken by its control points. */
export function stretchesOfPath(d: string): Stretch[] {
  const found: Stretch[] = [];
  let [x, y, x0, y0] = [0, 0, 0, 0];
  const to = (nx: number, ny: number) => {
    found.push({ x1: x, y1: y, x2: nx, y2: ny });
    [x, y] = [nx, ny];
  };
  for (const [, letter = '', rest = ''] of d.matchAll(/([MLHVACZ])([^MLHVACZ]*)/g)) {
    const values = (rest.match(/-?\d+(?:\.\d+)?/g) ?? []).map(Number);
    const each = COUNT[letter]!;
    if (letter === 'Z') to(x0, y0);
    for (let i = 0; each > 0 && i + each <= values.length; i += each) {
      const v = values.slice(i, i + each);
      if (letter === 'M' && i === 0) [x, y, x0, y0] = [v[0]!, v[1]!, v[0]!, v[1]!];
      else if (letter === 'M' || letter === 'L') to(v[0]!, v[1]!);
      else if (letter === 'H') to(v[0]!, y);
      else if (letter === 'V') to(x, v[0]!);
      else if (letter === 'A') for (const [px, py] of arc(x, y, v)) to(px, py);
      else for (let p = 0; p < 6; p += 2) to(v[p]!, v[p + 1]!);
    }
  }
  return found;
}

/** Small boxes along a stretch, so that a slanting one takes no more ground than it covers. */
export function boxesAlong({ x1, y1, x2, y2 }: Stretch, most: number, half: number) {
  const slants = x1 !== x2 && y1 !== y2;
  const count = slants ? Math.max(1, Math.ceil(Math.hypot(x2 - x1, y2 - y1) / most)) : 1;
  return Array.from({ length: count }, (_, i) => {
    const [ax, ay] = [x1 + ((x2 - x1) * i) / count, y1 + ((y2 - y1) * i) / count];
    const [bx, by] = [x1 + ((x2 - x1) * (i + 1)) / count, y1 + ((y2 - y1) * (i + 1)) / count];
    return {
      x: Math.floor(Math.min(ax, bx) - half),
      y: Math.floor(Math.min(ay, by) - half),
      width: Math.ceil(Math.abs(ax - bx) + 2 * half),
      height: Math.ceil(Math.abs(ay - by) + 2 * half),
    };
  });
}
