import { describe, expect, it } from 'vitest';
import { bendRun, routeAgain, stretchAcross } from '@/diagram/commands/bend-run';
import { moveParts } from '@/diagram/commands/move-parts';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { PatchSchema, applyPatch, diff, invert, touched } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { placeAll } from '@/diagram/layout/place';
import { routeAll } from '@/diagram/layout/route';
import type { Line, RouteEnd } from '@/diagram/layout/route-grid';
import type { Point, SceneRun } from '@/diagram/layout/scene';
import type { Side } from '@/diagram/symbols/types';
import * as check from './checks';
import { toldHome } from './homes';

/** Stretches led by hand: the way is its ends and these lines, all else is worked out. */

const end = (x: number, y: number, side: Side, part = 'none'): RouteEnd => ({ part, x, y, sides: [side] });
const way = (from: RouteEnd, to: RouteEnd, lines: Line[], walls: { id: string; x: number; y: number; width: number; height: number }[] = []) =>
  routeAll([{ id: 'a', strand: 'a', family: 'a', net: 'a', from, to, lines }], walls).points.get('a')!;
const goesAlong = (points: readonly Point[], line: Line): boolean =>
  points.slice(1).some((b, i) => (line.x !== undefined ? b.x === line.x && points[i]!.x === line.x : b.y === line.y && points[i]!.y === line.y));

describe('lines of a run', () => {
  it('leads a straight run aside, and keeps it there for its whole length', () => {
    const points = way(end(0, 0, 'down'), end(0, 5000, 'up'), [{ x: 2000 }]);
    expect(points).toEqual([
      { x: 0, y: 0 },
      { x: 0, y: 250 },
      { x: 2000, y: 250 },
      { x: 2000, y: 4750 },
      { x: 0, y: 4750 },
      { x: 0, y: 5000 },
    ]);
  });

  it('keeps the line when an end moves', () => {
    for (const y of [1000, 3000, -3000]) {
      const points = way(end(0, 0, 'right'), end(4000, y, 'left'), [{ x: 1500 }]);
      expect(goesAlong(points, { x: 1500 })).toBe(true);
      expect(points).toHaveLength(4);
    }
  });

  it('takes several lines in their order', () => {
    const lines: Line[] = [{ x: 3000 }, { y: 4000 }, { x: 1000 }];
    const points = way(end(0, 0, 'down'), end(0, 8000, 'up'), lines);
    for (const line of lines) expect(goesAlong(points, line)).toBe(true);
  });

  it('keeps every line that is still possible where one is not', () => {
    const wall = { id: 'wall', x: 1500, y: -20_000, width: 1000, height: 40_000 };
    const points = way(end(0, 0, 'down'), end(0, 8000, 'up'), [{ x: 2000 }, { y: 4000 }], [wall]);
    expect(goesAlong(points, { x: 2000 })).toBe(false);
    expect(goesAlong(points, { y: 4000 })).toBe(true);
  });

  it('moves away what lies on the line: a hand goes first', () => {
    const [a, b] = ['a', 'b'].map((id) => ({ id, strand: id, family: id, net: id }));
    const { points, forced } = routeAll(
      [
        { ...a!, from: end(0, 0, 'down'), to: end(0, 5000, 'up'), lines: [{ x: 1000 }] },
        { ...b!, from: end(1000, -500, 'down'), to: end(1000, 5500, 'up') },
      ],
      [],
    );
    expect(forced).toEqual([]);
    expect(goesAlong(points.get('a')!, { x: 1000 })).toBe(true);
    expect(points.get('b')!.length).toBeGreaterThan(2);
  });
});

const placed = (): Installation => applyPatch(toldHome(), placeAll(toldHome()));
const done = (outcome: Command | Refusal): Command => {
  if (isRefusal(outcome)) throw new Error(outcome.refused);
  return outcome;
};

describe('leading a run on the sheet', () => {
  const doc = placed();
  const face = 'connections';
  const page = { place: 'study' } as const;
  const scene = buildScene(doc, face, page);
  const shown = (of: Installation, id: string): SceneRun => buildScene(of, face, page).runs.find((run) => run.id === id)!;
  // a core from a joint to a lamp: long, with a stretch to move
  const run = scene.runs.find((r) => r.role === 'neutral' && r.points.length === 3 && r.from[0] !== r.to[0])!;
  const stretch = stretchAcross(run, 'x')!;
  const to = run.points[stretch]!.x + 750;
  const command = done(bendRun(doc, face, run, stretch, to + 40));
  const led = applyPatch(doc, command.patch);

  it('pins the stretch to the module, by one named change that names the run', () => {
    expect(PatchSchema.parse(command.patch)).toEqual(command.patch);
    expect(command.patch.set!.bends).toEqual({ [`connections:${run.wires[0]}`]: [{ x: to }] });
    expect(command.label).toMatch(/by hand/);
    expect(goesAlong(shown(led, run.id).points, { x: to })).toBe(true);
    expect(shown(led, run.id).lines).toEqual([{ x: to }]);
    for (const broken of [check.throughParts, check.overlaidRuns, check.textsOnRuns])
      expect(broken(led, buildScene(led, face, page))).toEqual([]);
  });

  it('survives a reload, a move of what it ends at, and a new end', () => {
    const read = readDocument(JSON.parse(JSON.stringify(led)));
    expect(read.ok && read.document).toEqual(led);
    const load = doc.parts.find(({ id, kind }) => (kind === 'lamp' || kind === 'fan') && [run.from[0], run.to[0]].includes(id))!;
    const at = doc.sheet!.connections![load.id]!;
    const moved = applyPatch(led, { set: { connections: { [load.id]: { ...at, y: at.y + 1500, pinned: true } } } });
    expect(goesAlong(shown(moved, run.id).points, { x: to })).toBe(true);
    const wire = doc.wires.find(({ id }) => id === run.wires[0])!;
    const far = wire.to[0] === load.id ? 'to' : 'from';
    const rewired = applyPatch(led, { set: { wires: [{ ...wire, [far]: [load.id, 'E'] }] } });
    expect(goesAlong(shown(rewired, run.id).points, { x: to })).toBe(true);
  });

  it('moves a stretch that is led already instead of adding a line', () => {
    const now = shown(led, run.id);
    const again = now.points.findIndex((p, i) => p.x === to && now.points[i + 1]?.x === to);
    const more = done(bendRun(led, face, now, again, to + 500));
    expect(more.patch.set!.bends![`connections:${run.wires[0]}`]).toEqual([{ x: to + 500 }]);
  });

  it('is taken back byte for byte, and by "route again"', () => {
    expect(JSON.stringify(applyPatch(led, invert(doc, command.patch)))).toBe(JSON.stringify(doc));
    const again = done(routeAgain(led, face, run.wires));
    expect(JSON.stringify(applyPatch(led, again.patch))).toBe(JSON.stringify(doc));
    expect(JSON.stringify(applyPatch(led, done(routeAgain(led, face, [])).patch))).toBe(JSON.stringify(doc));
    expect(isRefusal(routeAgain(doc, face, []))).toBe(true);
    expect(isRefusal(routeAgain(led, 'overview', []))).toBe(true);
    // the way before is no reason to keep a line that is gone
    const free = buildScene(doc, face, { ...page, before: buildScene(led, face, page) });
    expect(free.runs.find(({ id }) => id === run.id)!.lines).toBeUndefined();
    expect(goesAlong(free.runs.find(({ id }) => id === run.id)!.points, { x: to })).toBe(false);
  });

  it('can be merged with a change of another run', () => {
    const other = scene.runs.find((r) => r.id !== run.id && stretchAcross(r, 'x') !== null)!;
    const theirs = done(bendRun(doc, face, other, stretchAcross(other, 'x')!, other.points[0]!.x - 500)).patch;
    expect([...touched(theirs)].filter((key) => touched(command.patch).has(key))).toEqual([]);
    expect([...touched(command.patch)]).toEqual([`bends:connections:${run.wires[0]}`]);
    expect(applyPatch(applyPatch(doc, theirs), command.patch)).toEqual(applyPatch(led, theirs));
    expect(diff(doc, led)).toEqual(command.patch);
  });

  it('moves with its run when both ends move', () => {
    const together = applyPatch(led, moveParts(led, face, [run.from[0], run.to[0]], 1000, 500).patch);
    expect(together.sheet!.bends).toEqual({ [`connections:${run.wires[0]}`]: [{ x: to + 1000 }] });
    const alone = applyPatch(led, moveParts(led, face, [run.to[0]], 1000, 500).patch);
    expect(alone.sheet!.bends).toEqual(led.sheet!.bends);
  });

  it('leads a cable of the overview', () => {
    const cable = buildScene(doc, 'overview').runs.find((r) => r.cable && stretchAcross(r, 'x') !== null)!;
    const i = stretchAcross(cable, 'x')!;
    const x = cable.points[i]!.x + 500;
    const bent = applyPatch(doc, done(bendRun(doc, 'overview', cable, i, x)).patch);
    const drawn = buildScene(bent, 'overview').runs.find(({ id }) => id === cable.id)!;
    expect(goesAlong(drawn.points, { x })).toBe(true);
  });
});
