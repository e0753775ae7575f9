import type { Installation, Part, Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { MODULE } from '../symbols/types';
import { traceFeeds } from '../terminals/feeds';
import { placeEnds } from './ends';
import { BODY } from './lettering';
import { FOOT, ROOM, m } from './overview-metrics';
import { overviewRoutes } from './overview-routes';
import { planOverview, type OverviewPlan } from './overview-plan';
import { byIdOf } from './scene-order';
import type { Scene, SceneFrame, ScenePart, SceneRun } from './scene';
import { designation, ratingLines } from './wording';

/** The overview of any document. */
export function overviewScene(doc: Installation, plan: OverviewPlan = planOverview(doc), stored: Record<string, Position> = doc.sheet?.overview ?? {}): Scene {
  const positions = new Map([...plan.positions].map(([id, at]) => [id, stored[id] ?? at]));
  const { graph } = plan;
  const { bodies, ends } = placeEnds(graph, positions);
  const feeds = traceFeeds(doc);
  const parts = [...graph.parts.values()].map((part): ScenePart => {
    const body = bodies.get(part.id)!;
    const feed = feeds.parts.get(part.id) ?? 'none';
    const frame = plan.roomOf.get(part.id);
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
      texts: part.kind === 'joint' ? [] : partTexts(part, body),
      ...(frame && { frame: `room:${frame}` }),
    };
  });
  const routed = overviewRoutes(graph, bodies, ends);
  const runs = graph.runs.map((run): SceneRun => ({
    id: run.id,
    wires: run.wires,
    ...(run.cable && { cable: run.cable }),
    from: run.from,
    to: run.to,
    points: routed.points.get(run.id)!,
    role: run.role,
    feed: feeds.wires.get(run.wires[0]!) ?? 'none',
    weight: 'normal',
    texts: [],
    hops: routed.hops.get(run.id) ?? [],
  }));
  const frames = roomFrames(doc, plan, parts);
  const right = Math.max(m(40), ...parts.map((part) => part.x + part.width), ...frames.map((frame) => frame.x + frame.width)) + m(4);
  const bottom = Math.max(plan.levels.bottom, ...parts.map((part) => part.y + part.height + m(4)));
  return { face: 'overview', width: right, height: bottom, bands: bandsOf(plan, parts, bottom), frames, parts: parts.sort(byIdOf), runs, rings: [], dots: routed.dots.map(({ x, y, run }) => ({ x, y, feed: feeds.wires.get(run) ?? 'none' })), texts: [] };
}

function partTexts(part: Part, body: { x: number; y: number; width: number; height: number }) {
  const lines = [designation(part), ...ratingLines(part)];
  const below = part.kind === 'lamp' || part.kind === 'fan' || part.kind === 'socket' || part.kind === 'appliance';
  return lines.map((text, i) =>
    below
      ? { text, x: body.x + body.width / 2, y: body.y + body.height + 500 + 400 * i, size: BODY, anchor: 'middle' as const, bold: i === 0 }
      : { text, x: body.x + body.width + 125, y: body.y + body.height / 2 + 400 * i, size: BODY, bold: i === 0 },
  );
}

function roomFrames(doc: Installation, plan: OverviewPlan, parts: readonly ScenePart[]): SceneFrame[] {
  const frames: SceneFrame[] = [];
  for (const place of doc.places) {
    const inside = parts.filter((part) => plan.roomOf.get(part.id) === place.id);
    if (inside.length === 0) continue;
    const left = Math.min(...inside.map((part) => part.x)) - m(2);
    const right = Math.max(...inside.map((part) => part.x + part.width)) + m(2);
    const top = plan.levels.rooms;
    frames.push({
      id: `room:${place.id}`,
      kind: 'room',
      place: place.id,
      x: left,
      y: top,
      width: right - left,
      height: ROOM.height,
      texts: [{ text: place.name.toUpperCase(), x: left + 250, y: top + ROOM.name, size: BODY, bold: true, spaced: true }],
    });
  }
  return frames;
}

function bandsOf(plan: OverviewPlan, parts: readonly ScenePart[], bottom: number): Scene['bands'] {
  const { bar, rooms, foot } = plan.levels;
  const meter = parts.find((part) => part.kind === 'meter');
  const edges: [string, number][] = [
    ['SUPPLY', 0],
    ...(meter ? ([['METER', meter.y - MODULE], ['MAIN PROTECTION', meter.y + meter.height + MODULE]] as [string, number][]) : []),
    ['BOARD', bar - m(2)],
    ['ROOMS', rooms - m(1)],
    ...(plan.backupBoard.size > 0 ? ([['BACKUP BOARD', foot + m(1)]] as [string, number][]) : []),
    ...(plan.tray.length > 0 ? ([['NOT PLACED', plan.backupBoard.size > 0 ? foot + FOOT.height + m(1) : foot + m(3)]] as [string, number][]) : []),
  ];
  return edges.map(([name, y], i) => ({ name, y, height: (edges[i + 1]?.[1] ?? bottom) - y }));
}
