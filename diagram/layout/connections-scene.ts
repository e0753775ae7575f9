import { isBar } from '../document/kinds';
import type { End, Installation, Part, Position, Wire } from '../document/schema';
import { practices } from '../practices';
import { symbolFor } from '../symbols';
import { barSymbol, type BarKind } from '../symbols/bar';
import type { Side } from '../symbols/types';
import type { Feeds } from '../terminals/feeds';
import { WaysBefore, linesOf } from './bends';
import { barBodies, fixedBodies, placeCables, type PlacedCable, type Stub } from './connections-ends';
import { connectionFrames } from './connections-frames';
import { letterPage } from './connections-labels';
import { connectionPages, readPage, type Page } from './connections-page';
import { isLongBar, usedMarks } from './connections-page-state';
import { planPage } from './connections-place';
import type { Body } from './ends';
import { m } from './overview-metrics';
import { planOverview } from './overview-plan';
import { feedsOf } from './feeds-of';
import { fillIn } from './positions';
import { routeAll } from './route';
import type { Line, Obstacle, RouteEnd, RouteRequest, Soft } from './route-grid';
import { findHops } from './route-marks';
import type { Point, Scene, ScenePart, SceneRun } from './scene';
import { byIdOf } from './scene-order';
import { textBox } from './text-box';

export { connectionPages, type ConnectionPage } from './connections-page';

/** Where every part stands on its page of the connections face: stored, or worked out. */
export function connectionPositions(doc: Installation): Map<string, Position> {
  const plan = planOverview(doc);
  const all = new Map<string, Position>();
  for (const { place } of connectionPages(doc)) {
    const page = readPage(doc, plan, place);
    for (const [id, at] of positionsOf(doc, page, planPage(doc, plan, page))) all.set(id, at);
  }
  return all;
}

function positionsOf(doc: Installation, page: Page, planned: ReadonlyMap<string, Position>): Map<string, Position> {
  const near = (id: string): string[] =>
    page.inner.flatMap((wire) => (wire.from[0] === id ? [wire.to[0]] : wire.to[0] === id ? [wire.from[0]] : []));
  const size = (id: string) =>
    symbolFor(
      page.parts.find((part) => part.id === id)!,
      'connections',
    );
  return fillIn(planned, doc.sheet?.connections ?? {}, near, size);
}

/** Ways out of a terminal: its own side, then those beside it. Bars and joints are left up or down alike. */
function sidesOf(part: Part, side: Side): Pick<RouteEnd, 'sides' | 'even'> {
  if (isLongBar(part.kind)) return side === 'left' ? { sides: ['left'] } : { sides: ['down', 'up'], even: true };
  if (part.kind === 'joint') return { sides: ['down', 'up'], even: true };
  if (part.kind === 'socket') return { sides: ['up', 'down'] };
  const beside: Side[] = side === 'up' || side === 'down' ? ['right', 'left'] : ['down', 'up'];
  return { sides: [side, ...beside] };
}

/** One place with each core to each terminal; the first page where no place is named. */
export function connectionsScene(doc: Installation, place?: string, before?: Scene): Scene {
  const plan = planOverview(doc);
  const page = readPage(doc, plan, place ?? connectionPages(doc)[0]?.place ?? '');
  const marks = usedMarks(doc);
  const positions = positionsOf(doc, page, planPage(doc, plan, page));
  const fixed = fixedBodies(page, positions, marks);
  const cables = placeCables(page, fixed, positions);
  const bodies = barBodies(page, positions, fixed, cables, marks);
  const feeds = feedsOf(doc);
  const frames = connectionFrames(doc, page, bodies, cables);
  const drawn = drawnRuns(page);
  // a core that leaves and comes in on one page is led by hand where it comes in
  const lines = new Map(drawn.map(({ id, wire }) => [id, id === wire.id ? linesOf(doc, 'connections', [id]) : undefined]));
  const routes = routeCores(drawn, page, bodies, cables, feeds, lines, new WaysBefore(before, 'connections', page.place));
  const texts = letterPage(page, plan, bodies, cables, frames, routes.points);
  const { colours } = practices[doc.practice].colourSchemes[0];

  const parts = page.parts.map((part): ScenePart => {
    const body = bodies.get(part.id)!;
    const feed = feeds.parts.get(part.id) ?? 'none';
    const symbol = isBar(part.kind)
      ? barSymbol(part.kind as BarKind, 'connections', body.width, feed === 'backup' && part.kind === 'line-bar').id
      : symbolFor(part, 'connections').id;
    return {
      id: part.id,
      kind: part.kind,
      symbol,
      turn: body.turn,
      x: body.x,
      y: body.y,
      width: body.width,
      height: body.height,
      feed,
      terminals: body.terminals,
      texts: texts.parts.get(part.id) ?? [],
    };
  });
  const run = ({ id, wire, far }: DrawnRun): SceneRun => ({
    id: `wire:${id}`,
    wires: [wire.id],
    ...(wire.cable && { cable: wire.cable }),
    from: wire.from,
    to: wire.to,
    ...(far && bodies.has(far[0]) && { cut: far === wire.from ? ('from' as const) : ('to' as const) }),
    points: routes.points.get(id)!,
    role: wire.role,
    feed: feeds.wires.get(wire.id) ?? 'none',
    colour: wire.colour ?? colours[wire.role].value[0],
    weight: 'normal',
    texts: texts.wires.get(id) ?? [],
    ...(lines.get(id) && { lines: lines.get(id) }),
    hops: routes.hops.get(id) ?? [],
  });
  const runs = drawn.map(run);
  const reach: Point[] = [
    ...parts.map((part) => ({ x: part.x + part.width, y: part.y + part.height })),
    ...runs.flatMap((r) => r.points),
    ...frames.map((frame) => ({ x: frame.x + frame.width, y: frame.y + frame.height })),
    ...texts.reach,
    ...frames.flatMap((frame) => frame.texts).map((text) => ({ x: textBox(text).x + textBox(text).width, y: text.y })),
  ];
  return {
    face: 'connections',
    place: page.place,
    width: Math.max(m(60), ...reach.map(({ x }) => x)) + m(4),
    height: Math.max(m(40), ...reach.map(({ y }) => y)) + m(4),
    bands: [],
    frames,
    parts: parts.sort(byIdOf),
    runs: runs.sort(byIdOf),
    rings: [],
    dots: [],
    texts: texts.loose,
  };
}

/** A run of a page: a whole core, or what of one is drawn here. */
interface DrawnRun {
  id: string;
  wire: Wire;
  /** the end that is not drawn, or not by this run */
  far?: End;
}

const drawnRuns = (page: Page): DrawnRun[] => [
  ...page.inner.map((wire): DrawnRun => ({ id: wire.id, wire })),
  ...page.cables.flatMap(({ cores }) => cores.map(({ run, wire, far }): DrawnRun => ({ id: run, wire, far }))),
];

interface CoreRoutes {
  /** by id of the run */
  points: Map<string, Point[]>;
  hops: Map<string, Point[]>;
}

/** Every core for itself: cores meet at terminals and nowhere else. */
function routeCores(
  drawn: readonly DrawnRun[],
  page: Page,
  bodies: ReadonlyMap<string, Body>,
  cables: readonly PlacedCable[],
  feeds: Feeds,
  linesFor: ReadonlyMap<string, Line[] | undefined>,
  before: WaysBefore,
): CoreRoutes {
  const parts = new Map(page.parts.map((part) => [part.id, part]));
  const stubs = new Map(cables.flatMap((cable) => cable.stubs.map((stub) => [stub.core.run, stub] as const)));
  const atPart = ([id, mark]: End): RouteEnd => {
    const part = parts.get(id)!;
    const body = bodies.get(id)!;
    const t = body.terminals.find((terminal) => terminal.mark === mark);
    // a wire to a terminal that does not exist ends at the part's edge: the finding names it
    return { part: id, x: t?.x ?? body.x, y: t?.y ?? body.y, ...sidesOf(part, t?.side ?? 'up') };
  };
  const requests = drawn.map(({ id, wire, far }): RouteRequest => {
    const atStub = ({ x, y, side }: Stub): RouteEnd => ({ part: `stub ${id}`, x, y, sides: [side] });
    const [from, to] = [wire.from, wire.to].map((end) => (end === far ? atStub(stubs.get(id)!) : atPart(end))) as [
      RouteEnd,
      RouteEnd,
    ];
    const lines = linesFor.get(id);
    const given = before.of(`wire:${id}`, lines);
    const late = [wire.from, wire.to].some(([part]) => parts.get(part)?.kind === 'spd');
    return {
      id,
      ...(late && { late }),
      strand: id,
      family: id,
      net: id,
      from,
      to,
      backup: feeds.wires.get(wire.id) === 'backup',
      ...(lines && { lines }),
      ...(given && { given }),
    };
  });
  const obstacles = [...bodies].map(([id, body]): Obstacle => ({
    id,
    x: body.x,
    y: body.y,
    width: body.width,
    height: body.height,
    ...(isLongBar(parts.get(id)!.kind) && { crossable: true }),
  }));
  const { points } = routeAll(requests, [...obstacles, ...edgesOfPage(requests, cables)], namesOfCores(cables), {
    spread: true,
    pins: [...bodies.values()].flatMap((body) => body.terminals),
  });
  const paths = requests.map(({ id }) => ({ id, net: id, points: points.get(id)! }));
  return { points, hops: findHops(paths) };
}

/** Nothing is led through the names of the cables: above the cores at the head, below those at the foot. */
function edgesOfPage(requests: readonly RouteRequest[], cables: readonly PlacedCable[]): Obstacle[] {
  const xs = requests.flatMap(({ from, to }) => [from.x, to.x]);
  const [left, right] = [Math.min(...xs) - m(40), Math.max(...xs) + m(40)];
  const head = cables.find(({ cable }) => !cable.atFoot)?.stubs[0];
  const feet = cables.filter(({ cable }) => cable.atFoot);
  const foot = feet[0]?.stubs[0];
  const beyond = Math.max(...feet.map((cable) => cable.right)) + m(14);
  return [
    ...(head ? [{ id: 'head', x: left, y: head.y - m(20), width: right - left, height: m(20) - 1 }] : []),
    ...(foot ? [{ id: 'foot', x: left, y: foot.y + 1, width: beyond - left, height: m(20) }] : []),
  ];
}

/** Where the cores' names stand: runs turn below them where they can. */
function namesOfCores(cables: readonly PlacedCable[]): Soft[] {
  return cables.flatMap(({ cable, stubs, left, right }): Soft[] =>
    cable.atFoot ? [] : [{ x: left - m(4), y: stubs[0]!.y + 1, width: right - left + m(8), height: m(4), cost: 1.5 }],
  );
}
