import { byCode, type Installation, type Part } from '../document/schema';
import { symbolFor } from '../symbols';
import type { Feeds } from '../terminals/feeds';
import { WaysBefore, linesOf } from './bends';
import { placeEnds, type Ends } from './ends';
import { feedsOf } from './feeds-of';
import { nameFrame } from './frame-names';
import { Ground, blockTexts, placeLabel, type Label } from './labels';
import { actualLevels, bands, lanes, roomFrames } from './overview-frames';
import { partLabel, takenBy } from './overview-labels';
import { m } from './overview-metrics';
import { planOverview, type OverviewPlan } from './overview-plan';
import { overviewPositions } from './overview-positions';
import { leavesPlace, overviewRoutes, type OverviewRoutes } from './overview-routes';
import { cableLabel, ringOf, ticksOf, type Ticks } from './overview-ticks';
import type { Box, Soft } from './route-grid';
import type { Scene, SceneFrame, ScenePart, SceneRing, SceneRun, SceneText } from './scene';
import { byIdOf } from './scene-order';
import { textBox } from './text-box';

/** Right edge of the names of the bands. */
const BAND_NAMES = 1150;

/** The overview of any document. */
export function overviewScene(doc: Installation, before?: Scene): Scene {
  const plan = planOverview(doc);
  const positions = overviewPositions(plan, doc.sheet?.overview ?? {});
  const { graph } = plan;
  const places = placeEnds(graph, positions);
  const feeds = feedsOf(doc);
  const frames = roomFrames(doc, plan, positions, places.bodies);
  const routes = overviewRoutes(
    graph,
    places.bodies,
    places.ends,
    spokenFor(plan, places, frames),
    (run) => feeds.wires.get(run.wires[0] ?? '') === 'backup',
    (run) => linesOf(doc, 'overview', run.wires),
    new WaysBefore(before, 'overview'),
  );
  const levels = actualLevels(plan, positions);
  const lettered = letter(doc, plan, places, routes, frames, feeds);

  const parts = [...graph.parts.values()].map((part) =>
    scenePart(plan, places, feeds, part, lettered.texts.get(part.id) ?? []),
  );
  const runs = graph.runs.map((run): SceneRun => {
    const ticks = lettered.ticks.get(run.id);
    const lines = linesOf(doc, 'overview', run.wires);
    return {
      id: run.id,
      wires: run.wires,
      ...(run.cable && { cable: run.cable }),
      from: run.from,
      to: run.to,
      points: routes.points.get(run.id)!,
      role: run.role,
      feed: feeds.wires.get(run.wires[0] ?? '') ?? 'none',
      weight: leavesPlace(graph, run) || !plan.roomOf.has(run.from[0]) ? 'heavy' : 'normal',
      ...(ticks && { ticks: ticks.ticks }),
      texts: lettered.texts.get(run.id) ?? [],
      ...(lines && { lines }),
      hops: routes.hops.get(run.id) ?? [],
    };
  });
  const reach = [
    ...parts.map((part) => ({ x: part.x + part.width, y: part.y + part.height })),
    ...frames.map((frame) => ({ x: frame.x + frame.width, y: frame.y + frame.height })),
    ...runs.flatMap((run) => run.points),
    ...[...lettered.texts.values()].flat().map((text) => ({ x: textBox(text).x + textBox(text).width, y: text.y })),
  ];
  const right = Math.max(m(60), ...reach.map(({ x }) => x)) + m(2);
  const bottom = Math.max(levels.bottom, ...reach.map(({ y }) => y + m(1)));
  return {
    face: 'overview',
    width: right,
    height: bottom,
    bands: bands(plan, places.bodies, levels, bottom),
    frames: [...lanes(plan, places.bodies, levels, right), ...frames],
    parts: parts.sort(byIdOf),
    runs,
    rings: lettered.rings,
    dots: routes.dots.map(({ x, y, run }) => ({ x, y, feed: feeds.wires.get(run) ?? 'none' })),
    texts: [],
  };
}

/** Ground where lettering is to stand: runs keep off it where they can. */
function spokenFor(plan: OverviewPlan, { bodies }: Ends, frames: readonly SceneFrame[]): Soft[] {
  const softs = frames.flatMap((frame) => frame.texts.map((text): Soft => ({ ...textBox(text), cost: 3 })));
  // in a switchboard the mains keeps to the upper rail, the backup to the lower one
  for (const frame of frames)
    if (frame.kind === 'switchboard')
      softs.push(
        { x: frame.x, y: frame.y + m(1), width: frame.width, height: m(7), cost: 0.8, feed: 'mains' },
        { x: frame.x, y: frame.y - m(1), width: frame.width, height: m(2), cost: 0.8, feed: 'backup' },
      );
  for (const [id, body] of bodies) {
    const { kind } = plan.graph.byId.get(id)!;
    if (kind === 'lamp' || kind === 'fan' || kind === 'socket' || kind === 'appliance')
      softs.push({ x: body.x - 250, y: body.y + body.height, width: body.width + 500, height: m(4), cost: 2 });
  }
  return softs;
}

function scenePart(plan: OverviewPlan, { bodies }: Ends, feeds: Feeds, part: Part, texts: SceneText[]): ScenePart {
  const body = bodies.get(part.id)!;
  const feed = feeds.parts.get(part.id) ?? 'none';
  const room = plan.roomOf.get(part.id);
  return {
    id: part.id,
    kind: part.kind,
    symbol: `${symbolFor(part, 'overview').id}${part.kind === 'line-bar' && feed === 'backup' ? '.cased' : ''}`,
    turn: body.turn,
    x: body.x,
    y: body.y,
    width: body.width,
    height: body.height,
    feed,
    terminals: body.terminals,
    texts,
    ...(room && { frame: `room:${room}` }),
  };
}

interface Lettered {
  /** by id of the part or run */
  texts: Map<string, SceneText[]>;
  ticks: Map<string, Ticks>;
  rings: SceneRing[];
}

/** Places rings, ticks and all lettering, each clear of what stands there before. */
function letter(
  doc: Installation,
  plan: OverviewPlan,
  { bodies }: Ends,
  routes: OverviewRoutes,
  frames: readonly SceneFrame[],
  feeds: Feeds,
): Lettered {
  const { graph } = plan;
  const ground = new Ground();
  // the names of the bands stand here
  ground.add({
    x: -m(20),
    y: 0,
    width: m(20) + BAND_NAMES,
    height: Math.max(...[...bodies.values()].map((body) => body.y + body.height), 0) + m(20),
  });
  for (const [id, body] of bodies) ground.add(takenBy(graph.byId.get(id)!, body));
  for (const run of graph.runs)
    ground.addPath(routes.points.get(run.id)!, feeds.wires.get(run.wires[0] ?? '') === 'backup' ? 90 : 40);
  for (const frame of frames) {
    const { x, y, width: w, height: h } = frame;
    ground.addPath(
      [
        { x, y },
        { x: x + w, y },
        { x: x + w, y: y + h },
        { x, y: y + h },
        { x, y },
      ],
      20,
    );
  }
  const solid = new Ground();
  for (const body of bodies.values()) solid.add(body);
  for (const run of graph.runs) solid.addPath(routes.points.get(run.id)!, 0, run.id);
  const ringed = new Map<string, SceneRing>();
  for (const way of plan.ways) {
    const run = graph.at.get(way.device)?.find((r) => leavesDevice(r, way.device));
    if (!run || !bodies.has(way.device)) continue;
    const points = routes.points.get(run.id)!;
    const ring = ringOf(
      way,
      run.from[0] === way.device ? points : [...points].reverse(),
      feeds.parts.get(way.device) ?? 'none',
    );
    if (!ring) continue;
    ringed.set(run.id, ring);
    ground.add({ x: ring.x - ring.radius, y: ring.y - ring.radius, width: 2 * ring.radius, height: 2 * ring.radius });
  }
  const ticks = new Map<string, Ticks>();
  const labels: Label[] = [];
  const named = new Set<string>();
  for (const run of graph.runs) {
    if (!leavesPlace(graph, run)) continue;
    const points = routes.points.get(run.id)!;
    const fromSource = ringed.get(run.id)?.part === run.to[0] ? [...points].reverse() : points;
    const found = ticksOf(run, fromSource, ringed.has(run.id), (box) => solid.overlap(grown(box), 1, run.id) > 0);
    if (!found) continue;
    ticks.set(run.id, found);
    ground.add(found.box);
    // a cable drawn as several runs is named once
    const label = named.has(run.cable!)
      ? null
      : cableLabel(doc, graph, run, found, ringed.has(run.id) || !plan.roomOf.has(run.from[0]));
    if (!label) continue;
    named.add(run.cable!);
    labels.push(label);
  }
  for (const frame of frames) nameFrame(ground, frame);
  // parts first: their words have fewer places than a cable's
  const ofParts = [...graph.parts.values()].flatMap((part) => partLabel(doc, plan, part, bodies.get(part.id)!) ?? []);
  const texts = new Map<string, SceneText[]>();
  for (const label of [
    ...ofParts.sort((a, b) => rank(b) - rank(a) || byCode(a.owner, b.owner)),
    ...labels.sort((a, b) => byCode(a.owner, b.owner)),
  ]) {
    const block = placeLabel(ground, label);
    if (block) texts.set(label.owner, blockTexts(block));
  }
  return { texts, ticks, rings: [...ringed.values()].sort((a, b) => byCode(a.part, b.part)) };
}

const grown = (box: Box): Box => ({ x: box.x - 1, y: box.y - 1, width: box.width + 2, height: box.height + 2 });

/** Bigger lettering is placed first. */
const rank = (label: Label): number => label.size;

/** The device's outgoing run: the one at its lower terminal, or its only cable. */
const leavesDevice = (
  run: { from: readonly [string, string]; to: readonly [string, string] },
  device: string,
): boolean => (run.from[0] === device && run.from[1] === '2') || (run.to[0] === device && run.to[1] === '2');
