import { BODY, textWidth } from '../layout/lettering';
import type { Point, Scene, ScenePart, SceneRun, SceneText } from '../layout/scene';
import { cores, light } from '../symbols/palette';
import { symbolById } from '../symbols';
import { turnedPoint, type Turn } from '../symbols/turn';
import { STROKE, type Stroke } from '../symbols/types';
import type { Group, Mark, PathMark, TextMark } from './primitives';

/** A scene as marks on paper, always in the light palette. */

/** Widths of a backup line: its outline and its light core, 1/100 mm. */
export const CASED = { outer: 150, inner: 100 } as const;
const CASED_CORE = { outer: 190, inner: 140 } as const;
export const HOP_RADIUS = 190;
/** 1/100 mm on and off: neutral long, earth short. */
export const CORE_DASH = { N: [350, 130], E: [110, 90] } as const;
const SYMBOL_DASH = { short: [90, 70], long: [220, 120] } as const;
const PRACTICE_FALLBACK = { L: 'BN', N: 'BU', E: 'GNYE' } as const;

const coreOf = (run: SceneRun): 'L' | 'N' | 'E' => (run.role === 'neutral' ? 'N' : run.role === 'earth' ? 'E' : 'L');

/** The ink of a conductor on the connections face, by its colour code. */
export function coreInk(run: SceneRun): string {
  return cores.light[run.colour ?? PRACTICE_FALLBACK[coreOf(run)]] ?? light.ink;
}

/** Path data of a run: its corners, and an arc where it hops over another. */
export function runPath(run: SceneRun, radius = HOP_RADIUS): string {
  const [first, ...rest] = run.points;
  if (!first) return '';
  let d = `M${first.x} ${first.y}`;
  let at = first;
  for (const point of rest) {
    if (point.y === at.y) {
      const right = point.x > at.x;
      const hops = run.hops
        .filter((hop) => hop.y === at.y && (hop.x - at.x) * (hop.x - point.x) < 0)
        .sort((a, b) => (right ? a.x - b.x : b.x - a.x));
      for (const hop of hops)
        d += `H${hop.x - (right ? radius : -radius)}A${radius} ${radius} 0 0 ${right ? 1 : 0} ${hop.x + (right ? radius : -radius)} ${hop.y}`;
    }
    d += `L${point.x} ${point.y}`;
    at = point;
  }
  return d;
}

const text = (t: SceneText): TextMark => ({
  kind: 'text',
  x: t.x,
  y: t.y,
  text: t.text,
  size: t.size,
  colour: t.tone === 'grey' ? light.grey : light.ink,
  ...(t.bold && { bold: true }),
  ...(t.anchor && { anchor: t.anchor }),
  ...(t.turn && { turn: t.turn }),
  ...(t.spaced && { spaced: true }),
});

const circle = (at: Point, r: number): string =>
  `M${at.x - r} ${at.y}A${r} ${r} 0 1 0 ${at.x + r} ${at.y}A${r} ${r} 0 1 0 ${at.x - r} ${at.y}Z`;
const rect = (x: number, y: number, w: number, h: number): string => `M${x} ${y}H${x + w}V${y + h}H${x}Z`;

export function strokeMark(stroke: Stroke, ink: string): PathMark {
  const fill = stroke.fill === 'ink' ? ink : stroke.fill === 'paper' ? light.paper : undefined;
  return {
    kind: 'path',
    d: stroke.d,
    stroke: ink,
    width: STROKE[stroke.weight ?? 'normal'],
    ...(stroke.dash && { dash: SYMBOL_DASH[stroke.dash] }),
    ...(fill && { fill }),
  };
}

/** Conductors of one scene: outlines of all cased runs first, then their light cores, so that branches run into each other. */
function runMarks(scene: Scene): Mark[] {
  const onCores = scene.face === 'connections';
  const cased = scene.runs.filter((run) => run.feed === 'backup' && run.role !== 'earth');
  const plain = scene.runs.filter((run) => !cased.includes(run));
  const widths = onCores ? CASED_CORE : CASED;
  const core = (run: SceneRun): PathMark => {
    const kind = coreOf(run);
    return {
      kind: 'path',
      d: runPath(run),
      stroke: onCores ? coreInk(run) : light.ink,
      width: onCores ? 50 : STROKE[run.weight],
      ...(kind !== 'L' && { dash: CORE_DASH[kind], cap: 'butt' as const }),
    };
  };
  const marks: Mark[] = [];
  for (const run of plain) marks.push(core(run));
  for (const run of cased)
    marks.push({ kind: 'path', d: runPath(run), stroke: light.ink, width: widths.outer, cap: 'butt' });
  for (const run of cased)
    marks.push({ kind: 'path', d: runPath(run), stroke: light.paper, width: widths.inner, cap: 'butt' });
  if (onCores) for (const run of cased) marks.push(core(run));
  for (const run of cased)
    for (const hop of run.hops) {
      const arc = `M${hop.x - HOP_RADIUS} ${hop.y}A${HOP_RADIUS} ${HOP_RADIUS} 0 0 1 ${hop.x + HOP_RADIUS} ${hop.y}`;
      marks.push({ kind: 'path', d: arc, stroke: light.paper, width: widths.outer + 80, cap: 'butt' });
      marks.push({ kind: 'path', d: arc, stroke: light.ink, width: widths.outer, cap: 'butt' });
      marks.push({ kind: 'path', d: arc, stroke: light.paper, width: widths.inner, cap: 'butt' });
      if (onCores) marks.push({ ...core(run), d: arc });
    }
  return marks;
}

/** Tick marks across a run, one a core: plain L, dotted N, barred E. */
function tickMarks(run: SceneRun): Mark[] {
  if (!run.ticks) return [];
  const { at, vertical, cores: list } = run.ticks;
  const turn: Turn = vertical ? 0 : 1;
  const half = run.feed === 'backup' ? 220 : 180;
  return list.flatMap((core, i): Mark[] => {
    const spin = (x: number, y: number): Point => {
      const p = turnedPoint(x, y, { width: 0, height: 0 }, turn);
      return { x: at.x + p.x, y: at.y + p.y };
    };
    const along = 200 * i;
    const line = (a: Point, b: Point): PathMark => ({
      kind: 'path',
      d: `M${a.x} ${a.y}L${b.x} ${b.y}`,
      stroke: light.ink,
      width: STROKE.normal,
    });
    const marks: Mark[] = [line(spin(-half, along + 120), spin(half, along - 120))];
    if (core === 'N') marks.push({ kind: 'path', d: circle(spin(half, along - 120), 62), fill: light.ink });
    if (core === 'E') marks.push(line(spin(half - 65, along - 205), spin(half + 65, along - 35)));
    return marks;
  });
}

/** A part's symbol, turned as it stands. */
export function symbolGroup(part: Pick<ScenePart, 'x' | 'y' | 'turn' | 'width' | 'symbol' | 'kind'>): Group {
  const symbol = symbolById(part.symbol, part.width);
  const origin = turnedPoint(0, 0, symbol, part.turn);
  const ink = part.kind === 'neutral-bar' ? cores.light.BU! : part.kind === 'earth-bar' ? cores.light.GNYE! : light.ink;
  return {
    x: part.x + origin.x,
    y: part.y + origin.y,
    scale: 1,
    ...(part.turn && { turn: part.turn }),
    marks: symbol.strokes.map((stroke) => strokeMark(stroke, ink)),
  };
}

/** Everything of a scene, in painting order. */
export function sceneGroups(scene: Scene): Group[] {
  const ground: Mark[] = [];
  for (const frame of scene.frames)
    if (frame.kind === 'lane')
      ground.push({ kind: 'path', d: rect(frame.x, frame.y, frame.width, frame.height), fill: light.lane });
  scene.bands.forEach((band, i) => {
    if (i > 0)
      ground.push({ kind: 'path', d: `M250 ${band.y}H${scene.width - 250}`, stroke: light.hair, width: STROKE.thin });
    const spaced = textWidth(band.name, BODY, true) + 300 <= band.height;
    const size = spaced || textWidth(band.name, BODY) + 200 <= band.height ? BODY : 180;
    if (textWidth(band.name, size, spaced) <= band.height)
      ground.push({
        kind: 'text',
        x: 900,
        y: band.y + band.height / 2,
        text: band.name,
        size,
        colour: light.grey,
        anchor: 'middle',
        turn: 3,
        ...(spaced && { spaced }),
      });
  });
  for (const frame of scene.frames) {
    const box = rect(frame.x, frame.y, frame.width, frame.height);
    if (frame.kind === 'room')
      ground.push({ kind: 'path', d: box, stroke: light.rule, width: STROKE.normal, dash: [190, 125] });
    if (frame.kind === 'switchboard')
      ground.push({
        kind: 'path',
        d: box,
        stroke: scene.face === 'overview' ? light.ink : light.rule,
        width: STROKE.normal,
        ...(scene.face === 'connections' && { dash: [220, 150] as const }),
      });
    if (frame.kind === 'brace')
      ground.push({
        kind: 'path',
        d: `M${frame.x} ${frame.y + frame.height}V${frame.y}H${frame.x + frame.width}V${frame.y + frame.height}`,
        stroke: light.ink,
        width: STROKE.normal,
      });
  }
  const wires = runMarks(scene);
  const symbols = scene.parts.map((part) => ({ part, group: symbolGroup(part) }));
  const isBar = (kind: string) => kind === 'line-bar' || kind === 'neutral-bar' || kind === 'earth-bar';
  // cores cross a bar in sight: it lies under them; all other symbols cover the ends of their runs
  const groups: Group[] = [
    { x: 0, y: 0, scale: 1, marks: ground },
    ...symbols.filter(({ part }) => isBar(part.kind)).map(({ group }) => group),
    { x: 0, y: 0, scale: 1, marks: wires },
    ...symbols.filter(({ part }) => !isBar(part.kind)).map(({ group }) => group),
  ];
  const over: Mark[] = [];
  for (const run of scene.runs) over.push(...tickMarks(run));
  for (const dot of scene.dots) over.push({ kind: 'path', d: circle(dot, 95), fill: light.ink });
  if (scene.face === 'connections')
    for (const part of scene.parts)
      for (const t of part.terminals)
        over.push({ kind: 'path', d: circle(t, 150), stroke: light.ink, width: STROKE.normal, fill: light.paper });
  for (const ring of scene.rings) {
    over.push({
      kind: 'path',
      d: circle(ring, ring.radius),
      stroke: light.ink,
      width: STROKE.normal,
      fill: light.paper,
    });
    over.push({
      kind: 'text',
      x: ring.x,
      y: ring.y + 125,
      text: ring.text,
      size: 250,
      bold: true,
      colour: light.ink,
      anchor: 'middle',
    });
  }
  for (const part of scene.parts) {
    const symbol = symbolById(part.symbol, part.width);
    for (const t of symbol.texts ?? []) {
      const at = turnedPoint(t.x, t.y, symbol, part.turn);
      over.push({
        kind: 'text',
        x: part.x + at.x,
        y: part.y + at.y,
        text: t.text,
        size: t.size,
        colour: light.ink,
        anchor: t.anchor ?? 'start',
      });
    }
    over.push(...part.texts.map(text));
  }
  for (const run of scene.runs) over.push(...run.texts.map(text));
  for (const frame of scene.frames) over.push(...frame.texts.map(text));
  over.push(...scene.texts.map(text));
  groups.push({ x: 0, y: 0, scale: 1, marks: over });
  return groups;
}
