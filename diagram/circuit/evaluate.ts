import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { pathTo, reach, reaches, type Reach } from '../terminals/reach';
import { isOvercurrent, isPoint, isResidual } from '../terminals/roles-of-parts';
import { listConditions, type Condition, type Conditions, type Source } from './conditions';
import { findCrossedJoints, type CrossedJoint } from './crossed-joints';
import { earthAnchors } from './earth';
import type { Nature } from './natures';
import { findDoubledNeutrals, findMeetings } from './odd-one-out';
import { joinsFeeds, type ParallelJoint } from './parallel-joints';
import { switchPositions, type Positions } from './positions';

/** The home in one condition with its two-way and cross switches in one position. */
export interface Stand {
  position: number;
  closed: Uint8Array;
  /** by source of the condition: what its line reaches, and what its neutral reaches, never through a load */
  line: Reach[];
  neutral: Reach[];
  /** line meets neutral or earth in this position: nothing else is to be read from it */
  shorted: boolean;
}

/** How a lamp, fan, appliance or socket stands in a condition, in the best position of its switches. */
export interface PointState {
  part: Part;
  /** line at one end and the same source's neutral at the other */
  fed: boolean;
  /** fed, but with line at N and neutral at L, in every position that feeds it */
  reversed: boolean;
  /** the source whose line reaches it */
  source: Source | null;
  /** edges from the source's line to the point; empty without line */
  lineEdges: number[];
  /** edges from the source's neutral to the point; empty without a way back */
  neutralEdges: number[];
  /** ids of the devices, from the source on, that its line and its neutral pass */
  lineDevices: readonly string[];
  neutralDevices: readonly string[];
  /** id of the nearest overcurrent device in its line */
  overcurrent: string | null;
  /** id of the nearest residual-current device in its line */
  rcd: string | null;
  /** node of the end at which the line arrives, and of the other */
  lineEnd: number;
  neutralEnd: number;
}

export interface Evaluated {
  condition: Condition;
  /** wires that join line, neutral and earth whatever the switches do; taken out of everything else here */
  crossed: CrossedJoint[];
  /**
   * wires that close loops: lines of two devices joined, neutrals joined twice. They, and on battery those of `mains`, are
   * taken out of `stands` and `points`, so that each point is read as it was meant; `whole`, `drawn` and `asDrawn` have them
   */
  lineLoops: ParallelJoint[];
  neutralLoops: ParallelJoint[];
  /** by edge: what is closed, loops included, two-way and cross switches open */
  whole: Uint8Array;
  /** at least one; only the first without two-way and cross switches */
  stands: Stand[];
  points: ReadonlyMap<string, PointState>;
  /** by point, how it is fed in other positions of two-way and cross switches, where that is through other devices */
  otherwise: ReadonlyMap<string, readonly PointState[]>;
  drawn: Stand[];
  asDrawn: ReadonlyMap<string, PointState>;
}

export interface Evaluation extends Conditions {
  positions: Positions;
  evaluated: Evaluated[];
}

const known = new WeakMap<Graph, Map<string, readonly string[]>>();

/** Ids of the devices that a path passes; one list for all paths through the same, so that readers look at each once. */
export function devicesOn(graph: Graph, edges: readonly number[]): readonly string[] {
  const ids = new Set<string>();
  for (const number of edges) {
    const { kind, part } = graph.edges[number]!;
    if (kind === 'device' || kind === 'changeover' || kind === 'bypass' || kind === 'through') ids.add(part!);
  }
  const lists = known.get(graph) ?? new Map<string, readonly string[]>();
  known.set(graph, lists);
  const key = [...ids].join(' ');
  const list = lists.get(key) ?? [...ids];
  lists.set(key, list);
  return list;
}

function stand(
  graph: Graph,
  condition: Condition,
  closed: Uint8Array,
  position: number,
  apart: (node: number) => boolean,
): Stand {
  const line = condition.sources.map((source) => reach(graph, [source.line], closed));
  const neutral = condition.sources.map((source) => reach(graph, [source.neutral], closed));
  return { position, closed, line, neutral, shorted: line.some((walk) => walk.order.some(apart)) };
}

/** How a point is fed in one position after the other; line at the right end first where both ends have it. */
function feedsOf(graph: Graph, part: Part, condition: Condition, stands: readonly Stand[]): PointState[] {
  return stands.flatMap((stand) => {
    const state = pointState(graph, part, condition, [stand]);
    return state.fed ? [state] : [];
  });
}

/** Feeds of a point through other devices than those of its first one. */
function otherFeeds(graph: Graph, condition: Condition, stands: readonly Stand[], first: PointState): PointState[] {
  const selects = (edges: readonly number[]) => edges.some((number) => graph.edges[number]!.kind === 'select');
  if (!first.fed || !(selects(first.lineEdges) || selects(first.neutralEdges))) return [];
  const key = ({ lineDevices, neutralDevices }: PointState) => `${lineDevices.join(' ')}|${neutralDevices.join(' ')}`;
  const found = new Map<string, PointState>([[key(first), first]]);
  for (const state of feedsOf(graph, first.part, condition, stands))
    if (!found.has(key(state))) found.set(key(state), state);
  return [...found.values()].slice(1);
}

function pointState(graph: Graph, part: Part, condition: Condition, stands: readonly Stand[]): PointState {
  const at = { L: graph.node(part.id, 'L')!, N: graph.node(part.id, 'N')! };
  const none: PointState = {
    part,
    fed: false,
    reversed: false,
    source: null,
    lineEdges: [],
    neutralEdges: [],
    lineDevices: [],
    neutralDevices: [],
    overcurrent: null,
    rcd: null,
    lineEnd: at.L,
    neutralEnd: at.N,
  };
  const build = (s: Stand, i: number, reversed: boolean, fed: boolean): PointState => {
    const lineEnd = reversed ? at.N : at.L;
    const neutralEnd = reversed ? at.L : at.N;
    const lineEdges = pathTo(graph, s.line[i]!, lineEnd);
    const neutralEdges = fed ? pathTo(graph, s.neutral[i]!, neutralEnd) : [];
    const lineDevices = devicesOn(graph, lineEdges);
    const last = (wanted: (p: Part) => boolean) => lineDevices.findLast((id) => wanted(graph.parts.get(id)!)) ?? null;
    return {
      part,
      fed,
      reversed: reversed && fed,
      source: condition.sources[i]!,
      lineEdges,
      neutralEdges,
      lineDevices,
      neutralDevices: devicesOn(graph, neutralEdges),
      overcurrent: last(isOvercurrent),
      rcd: last(isResidual),
      lineEnd,
      neutralEnd,
    };
  };
  const usable = stands.filter((s) => !s.shorted);
  let turned: PointState | undefined;
  let half: PointState | undefined;
  for (const s of usable) {
    for (let i = 0; i < condition.sources.length; i++) {
      const lineAtL = reaches(s.line[i]!, at.L);
      const lineAtN = reaches(s.line[i]!, at.N);
      if (lineAtL && reaches(s.neutral[i]!, at.N)) return build(s, i, false, true);
      if (lineAtN && reaches(s.neutral[i]!, at.L)) turned ??= build(s, i, true, true);
      if (lineAtL || lineAtN) half ??= build(s, i, !lineAtL, false);
    }
  }
  return turned ?? half ?? none;
}

/** What is closed in each position of the two-way and cross switches. */
function positionsOf(graph: Graph, positions: Positions, closed: Uint8Array): Uint8Array[] {
  if (positions.sets.length === 0) return [closed];
  const selects = graph.edges.flatMap((edge, number) => (edge.kind === 'select' ? [number] : []));
  return Array.from({ length: positions.count }, (_, position) => {
    const here = closed.slice();
    for (const number of selects) if (positions.isClosed(graph.edges[number]!, position)) here[number] = 1;
    return here;
  });
}

/** @param onMains edges that close a loop on mains in the same positions of the changeovers */
function evaluateCondition(
  graph: Graph,
  condition: Condition,
  positions: Positions,
  onMains: readonly number[],
): Evaluated {
  const anchors = conductorAnchors(graph, condition);
  const lineStarts = condition.sources.map(({ line }) => line);
  const neutralStarts = [...anchors].filter(([, nature]) => nature === 'N').map(([node]) => node);
  const notLine = (node: number) => anchors.has(node) && anchors.get(node) !== 'L';
  const isEarth = (node: number) => anchors.get(node) === 'E';

  let closed = condition.closed;
  let crossed: CrossedJoint[] = [];
  const touches = (starts: number[], apart: (node: number) => boolean) =>
    reach(graph, starts, closed).order.some(apart);
  if (touches(lineStarts, notLine) || touches(neutralStarts, isEarth)) {
    crossed = findCrossedJoints(graph, closed, anchors);
    closed = closed.slice();
    for (const { edge } of crossed) closed[edge] = 0;
  }
  const whole = closed;
  const starts = { line: lineStarts, neutral: neutralStarts };
  // Lines of two ways may meet in one position of two-way switches only: each is looked at.
  const lineLoops = findMeetings(graph, positionsOf(graph, positions, whole), starts);
  const single = whole.slice();
  for (const { edge } of lineLoops) single[edge] = 0;
  const neutralLoops = findDoubledNeutrals(graph, single, starts);
  const loops = [...[...lineLoops, ...neutralLoops].map(({ edge }) => edge), ...onMains];
  const states = (from: Uint8Array) => {
    const stands = positionsOf(graph, positions, from).map((here, position) =>
      stand(graph, condition, here, position, notLine),
    );
    const points = new Map<string, PointState>();
    for (const part of graph.parts.values())
      if (isPoint(part)) points.set(part.id, pointState(graph, part, condition, stands));
    const otherwise = new Map<string, PointState[]>();
    if (stands.length > 1)
      for (const [id, first] of points) {
        const others = otherFeeds(graph, condition, stands, first);
        if (others.length > 0) otherwise.set(id, others);
      }
    return { stands, points, otherwise };
  };
  const drawn = states(whole);
  const common = { condition, crossed, lineLoops, neutralLoops, whole, drawn: drawn.stands, asDrawn: drawn.points };
  if (loops.length === 0) return { ...common, ...drawn };
  const apart = whole.slice();
  for (const edge of loops) apart[edge] = 0;
  return { ...common, ...states(apart) };
}

/** Nodes that are line, neutral or earth by what they are: the poles of the supply and of inverters on battery, and the earth. */
export function conductorAnchors(graph: Graph, { onBattery }: Condition): Map<number, Nature> {
  const anchors = new Map<number, Nature>();
  for (const part of graph.parts.values()) {
    if (part.kind !== 'supply' && !onBattery.has(part.id)) continue;
    const prefix = part.kind === 'supply' ? '' : 'out.';
    anchors.set(graph.node(part.id, `${prefix}L`)!, 'L');
    anchors.set(graph.node(part.id, `${prefix}N`)!, 'N');
  }
  for (const node of earthAnchors(graph)) anchors.set(node, 'E');
  return anchors;
}

/** Works a home out in every condition: who is fed, from where, through what and back by which way. */
export function evaluate(graph: Graph): Evaluation {
  const conditions = listConditions(graph);
  const positions = switchPositions(graph);
  const evaluated: Evaluated[] = [];
  const onMains: number[][] = [];
  for (const condition of conditions.list) {
    const places = JSON.stringify([...condition.positions]);
    const mains = evaluated.find(
      (other) => other.condition.base === 'mains' && JSON.stringify([...other.condition.positions]) === places,
    );
    const loops = mains ? [...mains.lineLoops, ...mains.neutralLoops].map(({ edge }) => edge) : [];
    evaluated.push(evaluateCondition(graph, condition, positions, loops));
    onMains.push(loops);
  }
  const common = { ...conditions, positions };
  if (conditions.changeovers.length === 0) return { ...common, evaluated };
  // A wire that joins two feeds while the changeovers stand one way is no feed while they stand another.
  const meeting = evaluated.flatMap(({ lineLoops }) => lineLoops.filter((joint) => joinsFeeds(graph, joint)));
  if (meeting.length === 0) return { ...common, evaluated };
  const joints = [...new Set(meeting.map(({ edge }) => edge))];
  return {
    ...common,
    evaluated: evaluated.map(({ condition }, i) =>
      evaluateCondition(graph, condition, positions, [...joints, ...onMains[i]!]),
    ),
  };
}
