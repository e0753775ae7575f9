import type { Part, Position } from '../document/schema';
import { SHORT_BAR, symbolFor } from '../symbols';
import { BAR_AXIS, BAR_HEIGHT, type BarKind } from '../symbols/bar';
import { turnedSize, turnedTerminal, type Turn } from '../symbols/turn';
import { MODULE, type Side } from '../symbols/types';
import type { OverviewGraph, OverviewRun } from './overview-graph';
import { otherEnd } from './overview-graph';
import type { SceneTerminal } from './scene';

/** Where runs meet parts on the overview: fixed at most parts, along a bar wherever its conductors are. */
export interface RunEnd {
  part: string;
  x: number;
  y: number;
  side: Side;
  /** a joint is left in any direction */
  any: boolean;
}

export interface Body {
  x: number;
  y: number;
  width: number;
  height: number;
  turn: Turn;
  terminals: SceneTerminal[];
}

const isBar = (part: Part): part is Part & { kind: BarKind } =>
  part.kind === 'line-bar' || part.kind === 'neutral-bar' || part.kind === 'earth-bar';
const markAt = (run: OverviewRun, part: string): string => (run.from[0] === part ? run.from[1] : run.to[1]);
export const endKey = (run: OverviewRun, part: string): string => `${run.id} ${part}`;

export interface Ends {
  bodies: Map<string, Body>;
  /** by {@link endKey} */
  ends: Map<string, RunEnd>;
}

function fixedBody(part: Part, at: Position): Body {
  const symbol = symbolFor(part, 'overview');
  const turn = at.turn ?? 0;
  const terminals = Object.entries(symbol.terminals).map(([mark, place]): SceneTerminal => {
    const turned = turnedTerminal(place, symbol, turn);
    return { mark, x: at.x + turned.x, y: at.y + turned.y, side: turned.side };
  });
  return { x: at.x, y: at.y, ...turnedSize(symbol, turn), turn, terminals };
}

/** The end of a run at a part that is no bar. An unknown mark takes the first terminal: the finding names it, the line is seen. */
function fixedEnd(part: Part, body: Body, mark: string, towards: number): RunEnd {
  if (mark === 'pins') {
    const y = part.kind === 'plug' ? body.y : body.y + body.height;
    return { part: part.id, x: body.x + MODULE, y, side: part.kind === 'plug' ? 'up' : 'down', any: false };
  }
  const terminal = body.terminals.find((t) => t.mark === mark) ?? body.terminals[0];
  const middle = {
    x: body.x + Math.round(body.width / 2 / MODULE) * MODULE,
    y: body.y + Math.round(body.height / 2 / MODULE) * MODULE,
  };
  if (part.kind === 'joint' || !terminal) return { part: part.id, ...middle, side: 'up', any: part.kind === 'joint' };
  // strappers leave the dot on the side where the other switch is
  const side = part.kind === 'switch-2way' && mark !== 'C' ? (towards < terminal.x ? 'left' : 'right') : terminal.side;
  return { part: part.id, x: terminal.x, y: terminal.y, side, any: false };
}

/** Bodies of all parts and the ends of all runs. `positions` holds every drawn part. */
export function placeEnds(graph: OverviewGraph, positions: ReadonlyMap<string, Position>): Ends {
  const bodies = new Map<string, Body>();
  const ends = new Map<string, RunEnd>();
  for (const [id, part] of graph.parts) if (!isBar(part)) bodies.set(id, fixedBody(part, positions.get(id)!));
  const middleOf = (id: string): { x: number; y: number } => {
    const body = bodies.get(id);
    if (body) return { x: body.x + body.width / 2, y: body.y + body.height / 2 };
    const at = positions.get(id)!;
    return { x: at.x + SHORT_BAR / 2, y: at.y + BAR_AXIS };
  };
  for (const run of graph.runs)
    for (const id of [run.from[0], run.to[0]]) {
      const part = graph.byId.get(id)!;
      const body = bodies.get(id);
      if (body) ends.set(endKey(run, id), fixedEnd(part, body, markAt(run, id), middleOf(otherEnd(run, id)[0]).x));
    }
  for (const [id, part] of graph.parts)
    if (isBar(part)) bodies.set(id, barBody(part, positions.get(id)!, graph, ends, middleOf));
  return { bodies, ends };
}

function barBody(
  part: Part,
  at: Position,
  graph: OverviewGraph,
  ends: Map<string, RunEnd>,
  middleOf: (id: string) => { x: number; y: number },
): Body {
  const axis = at.y + BAR_AXIS;
  const runs = graph.at.get(part.id) ?? [];
  const hanging: { run: OverviewRun; x: number; side: Side }[] = [];
  const beside: { run: OverviewRun; x: number }[] = [];
  for (const run of runs) {
    const far = otherEnd(run, part.id)[0];
    const end = ends.get(endKey(run, far));
    const x = end?.x ?? middleOf(far).x;
    const y = end?.y ?? middleOf(far).y;
    if (end && (end.side === 'left' || end.side === 'right') && !end.any) beside.push({ run, x });
    else hanging.push({ run, x: Math.round(x), side: y >= axis ? 'down' : 'up' });
  }
  const xs = hanging.map(({ x }) => x);
  const left = Math.min(at.x, ...xs.map((x) => x - 2 * MODULE));
  const right = Math.max(
    at.x + (runs.length > 0 && part.kind === 'line-bar' ? 4 * MODULE : SHORT_BAR),
    ...xs.map((x) => x + 2 * MODULE),
  );
  const terminals: SceneTerminal[] = [];
  const note = (run: OverviewRun, x: number, side: Side) => {
    ends.set(endKey(run, part.id), { part: part.id, x, y: axis, side, any: false });
    const mark = markAt(run, part.id);
    if (!terminals.some((t) => t.mark === mark)) terminals.push({ mark, x, y: axis, side });
  };
  for (const { run, x, side } of hanging) note(run, x, side);
  for (const { run, x } of beside)
    note(run, x > (left + right) / 2 ? right : left, x > (left + right) / 2 ? 'right' : 'left');
  let free = 1;
  while (terminals.some((t) => t.mark === String(free))) free++;
  terminals.push({ mark: String(free), x: right - MODULE, y: axis, side: 'down' });
  terminals.sort((a, b) => Number(a.mark) - Number(b.mark));
  return { x: left, y: at.y, width: right - left, height: BAR_HEIGHT, turn: 0, terminals };
}
