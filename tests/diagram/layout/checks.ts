import { byCode, type Installation } from '@/diagram/document/schema';
import { takenBy } from '@/diagram/layout/overview-labels';
import { overviewGraph } from '@/diagram/layout/overview-graph';
import { netsOf } from '@/diagram/layout/overview-routes';
import type { Point, Scene, ScenePart, SceneText } from '@/diagram/layout/scene';
import { textBox } from '@/diagram/layout/text-box';
import { symbolById } from '@/diagram/symbols';
import { boxesAlong, stretchesOfPath } from '@/diagram/symbols/flatten';
import { turnedPoint } from '@/diagram/symbols/turn';

/** What must hold of every scene; each check lists what breaks it, so that a failure names the place. */

interface Box extends Point {
  width: number;
  height: number;
}
interface Segment {
  run: string;
  net: string;
  a: Point;
  b: Point;
}

const overlap = (p: Box, q: Box): boolean =>
  p.x < q.x + q.width && q.x < p.x + p.width && p.y < q.y + q.height && q.y < p.y + p.height;
const isLongBar = (part: ScenePart): boolean =>
  part.kind === 'line-bar' || part.kind === 'neutral-bar' || part.kind === 'earth-bar';

function segments(doc: Installation, scene: Scene): Segment[] {
  const nets = scene.face === 'overview' ? netsOf(overviewGraph(doc)) : new Map<string, string>();
  return scene.runs.flatMap((run) =>
    run.points.slice(1).map((q, i): Segment => {
      const p = run.points[i]!;
      const [a, b] = p.x < q.x || p.y < q.y ? [p, q] : [q, p];
      return { run: run.id, net: nets.get(run.id) ?? run.id, a, b };
    }),
  );
}

export function slanted(scene: Scene): string[] {
  return scene.runs
    .filter((run) => run.points.slice(1).some((q, i) => q.x !== run.points[i]!.x && q.y !== run.points[i]!.y))
    .map((run) => run.id);
}

/** Runs that pass over a part that is not theirs. Cores may cross a bar squarely, between its terminals. */
export function throughParts(doc: Installation, scene: Scene): string[] {
  const found: string[] = [];
  const ends = new Map(scene.runs.map((run) => [run.id, new Set([run.from[0], run.to[0]])]));
  for (const { run, a, b } of segments(doc, scene))
    for (const part of scene.parts) {
      if (ends.get(run)!.has(part.id)) continue;
      const inside = a.x < part.x + part.width && b.x > part.x && a.y < part.y + part.height && b.y > part.y;
      if (!inside) continue;
      const squarely =
        scene.face === 'connections' &&
        isLongBar(part) &&
        a.x === b.x &&
        part.terminals.every((t) => t.x !== a.x || Math.min(a.y, b.y) > t.y || Math.max(a.y, b.y) < t.y);
      if (!squarely) found.push(`${run} over ${part.id}`);
    }
  return found;
}

/** Stretches where conductors of different nets lie on each other. */
export function overlaidRuns(doc: Installation, scene: Scene): string[] {
  const lines = new Map<string, Segment[]>();
  for (const segment of segments(doc, scene)) {
    const key = segment.a.x === segment.b.x ? `x${segment.a.x}` : `y${segment.a.y}`;
    lines.set(key, [...(lines.get(key) ?? []), segment]);
  }
  const found: string[] = [];
  for (const [key, list] of lines)
    for (let i = 0; i < list.length; i++)
      for (let j = i + 1; j < list.length; j++) {
        const [p, q] = [list[i]!, list[j]!];
        if (p.net === q.net) continue;
        const axis = key.startsWith('x') ? 'y' : 'x';
        if (Math.min(p.b[axis], q.b[axis]) - Math.max(p.a[axis], q.a[axis]) > 0) found.push(`${p.run} on ${q.run}`);
      }
  return found;
}

export function overlaidParts(scene: Scene): string[] {
  const found: string[] = [];
  scene.parts.forEach((p, i) => {
    for (const q of scene.parts.slice(i + 1)) if (overlap(p, q)) found.push(`${p.id} on ${q.id}`);
  });
  return found;
}

interface Owned {
  text: SceneText;
  box: Box;
  part?: string;
}

function texts(scene: Scene): Owned[] {
  const own = (list: readonly SceneText[], part?: string): Owned[] =>
    list.map((text) => ({ text, box: textBox(text), ...(part && { part }) }));
  return [
    ...scene.parts.flatMap((part) => own(part.texts, part.id)),
    ...scene.runs.flatMap((run) => own(run.texts)),
    ...scene.frames.flatMap((frame) => own(frame.texts)),
    ...own(scene.texts),
  ];
}

export function overlaidTexts(scene: Scene): string[] {
  const all = texts(scene);
  const found: string[] = [];
  all.forEach((p, i) => {
    for (const q of all.slice(i + 1)) if (overlap(p.box, q.box)) found.push(`"${p.text.text}" on "${q.text.text}"`);
  });
  return found;
}

/** Texts over a part's symbol. On the connections face a device's own marks stand in its box. */
export function textsOnParts(doc: Installation, scene: Scene): string[] {
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  return texts(scene).flatMap((owned) =>
    scene.parts
      .filter((part) => !(scene.face === 'connections' && owned.part === part.id))
      .filter((part) =>
        overlap(
          owned.box,
          scene.face === 'overview'
            ? takenBy(parts.get(part.id)!, part)
            : isLongBar(part)
              ? { x: part.x, y: part.y + part.height / 2 - 70, width: part.width, height: 140 }
              : part,
        ),
      )
      .map((part) => `"${owned.text.text}" on ${part.id}`),
  );
}

/** Texts that meet a stroke of a symbol, or its own lettering, on the connections face: also inside their own device's box. */
export function textsOnStrokes(doc: Installation, scene: Scene): string[] {
  if (scene.face !== 'connections') return [];
  const boxes = scene.parts.flatMap((part) => {
    if (isLongBar(part)) return [];
    const symbol = symbolById(part.symbol, part.width);
    return symbol.strokes
      .flatMap(({ d }) => stretchesOfPath(d))
      .flatMap((stretch) => boxesAlong(stretch, 60, 9))
      .map((box) => {
        const [p, q] = [
          turnedPoint(box.x, box.y, symbol, part.turn),
          turnedPoint(box.x + box.width, box.y + box.height, symbol, part.turn),
        ];
        return {
          id: part.id,
          x: part.x + Math.min(p.x, q.x),
          y: part.y + Math.min(p.y, q.y),
          width: Math.abs(p.x - q.x),
          height: Math.abs(p.y - q.y),
        };
      });
  });
  return texts(scene).flatMap(({ text, box }) =>
    boxes.filter((stroke) => overlap(box, stroke)).map(({ id }) => `"${text.text}" on a stroke of ${id}`),
  );
}

/** Terminals of devices that a wire ends at and whose mark is written nowhere beside them. */
export function unmarkedTerminals(doc: Installation, scene: Scene): string[] {
  if (scene.face !== 'connections') return [];
  const wired = new Set(scene.runs.flatMap((run) => [run.from.join(' '), run.to.join(' ')]));
  return scene.parts
    .filter((part) => part.kind !== 'joint')
    .flatMap((part) =>
      part.terminals
        .filter(({ mark }) => wired.has(`${part.id} ${mark}`) && !part.texts.some(({ text }) => text === mark))
        .map(({ mark }) => `${part.id} ${mark}`),
    );
}

/** Bands follow each other without a gap, and what stands in a room stands in the band of rooms. */
export function brokenBands(_: Installation, scene: Scene): string[] {
  const gaps = scene.bands
    .slice(1)
    .filter((band, i) => band.y !== scene.bands[i]!.y + scene.bands[i]!.height || band.height <= 0)
    .map(({ name }) => `gap before ${name}`);
  const rooms = scene.bands.find(({ name }) => name === 'ROOMS');
  const out = scene.parts
    .filter((part) => part.frame?.startsWith('room:') && rooms)
    .filter((part) => part.y < rooms!.y || part.y + part.height > rooms!.y + rooms!.height)
    .map(({ id }) => `${id} outside the rooms`);
  const lanes = scene.frames.filter(({ kind }) => kind === 'lane');
  const inLane = scene.parts
    .filter((part) => part.frame?.startsWith('room:'))
    .filter((part) => lanes.some((lane) => overlap(lane, part)))
    .map(({ id }) => `${id} in a lane`);
  return [...gaps, ...out, ...inLane];
}

export function textsOnRuns(doc: Installation, scene: Scene): string[] {
  const all = segments(doc, scene);
  return texts(scene).flatMap(({ text, box }) =>
    all
      .filter(
        ({ a, b }) =>
          a.x < box.x + box.width &&
          b.x > box.x - 1 &&
          a.y < box.y + box.height &&
          b.y > box.y - 1 &&
          a.x <= box.x + box.width &&
          b.x >= box.x,
      )
      .map(({ run }) => `"${text.text}" on ${run}`),
  );
}

/** Every number of a scene that places something. */
export function fractions(scene: Scene): string[] {
  const found: string[] = [];
  const whole = (where: string, ...values: number[]) => {
    if (!values.every(Number.isInteger)) found.push(`${where}: ${values.join(' ')}`);
  };
  for (const part of scene.parts) {
    whole(part.id, part.x, part.y, part.width, part.height);
    for (const t of part.terminals) whole(`${part.id}.${t.mark}`, t.x, t.y);
  }
  for (const run of scene.runs)
    for (const p of [...run.points, ...run.hops, ...(run.ticks ? [run.ticks.at] : [])]) whole(run.id, p.x, p.y);
  for (const { text } of texts(scene)) whole(text.text, text.x, text.y);
  for (const frame of scene.frames) whole(frame.id, frame.x, frame.y, frame.width, frame.height);
  return found;
}

/** Crossings of different nets at which no run hops. */
export function unmarkedCrossings(doc: Installation, scene: Scene): string[] {
  const all = segments(doc, scene);
  const hops = new Set(scene.runs.flatMap((run) => run.hops.map((hop) => `${hop.x} ${hop.y}`)));
  const level = all.filter(({ a, b }) => a.y === b.y);
  const upright = all.filter(({ a, b }) => a.x === b.x);
  return level.flatMap((h) =>
    upright
      .filter(
        (v) =>
          v.net !== h.net &&
          h.a.x < v.a.x &&
          v.a.x < h.b.x &&
          v.a.y < h.a.y &&
          h.a.y < v.b.y &&
          !hops.has(`${v.a.x} ${h.a.y}`),
      )
      .map((v) => `${h.run} over ${v.run}`),
  );
}

/** The same document with every list in another order: reversed, or by a fixed shuffle. */
export function permuted(doc: Installation, seed: number): Installation {
  const shuffle = <T extends { id: string }>(list: readonly T[]): T[] => {
    const key = (id: string): string =>
      [...`${seed}${id}`].reduce((h, c) => (Math.imul(h, 31) + c.charCodeAt(0)) | 0, 7).toString(36);
    return [...list].sort((a, b) => byCode(key(a.id), key(b.id)) || byCode(b.id, a.id));
  };
  return {
    ...doc,
    places: shuffle(doc.places),
    parts: shuffle(doc.parts),
    wires: shuffle(doc.wires),
    cables: shuffle(doc.cables),
  };
}
