import { polesOf } from '../../document/kinds';
import type { Part } from '../../document/schema';
import type { Source } from '../../circuit/conditions';
import type { Evaluated, Stand } from '../../circuit/evaluate';
import { pathTo, reach, reaches, type Reach } from '../../terminals/reach';
import { isPoint } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** Contacts that open a neutral alone, with the points whose neutral they open. */
export interface NeutralContact {
  contacts: string[];
  points: string[];
  wires: string[];
  conditions: string[];
}

/** Opens one pole and nothing else with it. */
const isSingle = (part: Part): boolean =>
  part.kind === 'switch' ||
  part.kind === 'switch-2way' ||
  part.kind === 'switch-cross' ||
  part.kind === 'regulator' ||
  (part.kind === 'isolator' && polesOf(part) === 1);

const isFuse = (part: Part): boolean =>
  (part.kind === 'fuse' && part.standard !== 'dc') || (part.kind === 'mcb' && polesOf(part) === 1);

/** The pole of an rcbo that alone watches the current, where one does: it belongs into the line. */
const isWatched = ({ contactsOf }: Context['graph'], part: Part, edge: number): boolean =>
  part.kind === 'rcbo' && (part.poles ?? 1) === 1 && contactsOf.get(part.id)![0] === edge;

interface Return {
  point: string;
  /** edges of single-pole contacts on the way back, and of fuses */
  control: number[];
  fuses: number[];
  path: number[];
}

/** The way back of a point in one stand, where it hangs on contacts: from the source to the end that is neutral. */
function returnOf(context: Context, stand: Stand, neutral: Reach, part: Part, without: Reach): Return | undefined {
  const { graph } = context;
  const nodes = ['N', 'L'].map((mark) => graph.node(part.id, mark)!);
  // In some positions of two-way switches line and neutral come to the other ends.
  for (const [end, other] of [nodes, [...nodes].reverse()] as [number, number][]) {
    if (!reaches(neutral, end) || reaches(without, end)) continue;
    const line = stand.line.find((walk) => reaches(walk, other));
    if (!line) continue;
    const path = pathTo(graph, neutral, end);
    const inLine = new Set(pathTo(graph, line, other).map((number) => graph.edges[number]!.part));
    const at = (wanted: (device: Part, edge: number) => boolean) =>
      path.filter((number) => {
        const device = graph.parts.get(graph.edges[number]!.part ?? '');
        return device !== undefined && wanted(device, number);
      });
    return {
      point: part.id,
      control: at((device) => isSingle(device) || (device.kind === 'switch-2pole' && !inLine.has(device.id))),
      fuses: at((device, edge) => isFuse(device) || isWatched(graph, device, edge)),
      path,
    };
  }
  return undefined;
}

/** Points whose way back hangs on a single-pole contact or a fuse, in one stand. */
function returnsIn(context: Context, { points }: Evaluated, stand: Stand, i: number, source: Source): Return[] {
  const { graph } = context;
  const neutral = stand.neutral[i]!;
  const opened = stand.closed.slice();
  let found = false;
  graph.edges.forEach((edge, number) => {
    const device = graph.parts.get(edge.part ?? '');
    if (!device) return;
    const counts =
      isSingle(device) || isFuse(device) || device.kind === 'switch-2pole' || isWatched(graph, device, number);
    if (!counts) return;
    opened[number] = 0;
    found ||= reaches(neutral, edge.a) && reaches(neutral, edge.b);
  });
  if (!found) return [];
  const without = reach(graph, [source.neutral], opened);
  return [...graph.parts.values()].flatMap((part) => {
    if (!isPoint(part) || points.get(part.id)!.reversed) return [];
    return returnOf(context, stand, neutral, part, without) ?? [];
  });
}

const add = (list: string[], ids: readonly string[]) => list.push(...ids.filter((id) => !list.includes(id)));

/**
 * Notes a way back under its contacts. Ways that meet in a contact are one entry, and where `joined`, all of one point.
 */
function note(
  { graph }: Context,
  into: NeutralContact[],
  way: Return,
  edges: readonly number[],
  condition: string,
  joined: boolean,
) {
  const { point, path } = way;
  const contacts = [...new Set(edges.map((number) => graph.edges[number]!.part!))];
  const meets = (each: NeutralContact) =>
    (joined && each.points.includes(point)) || each.contacts.some((id) => contacts.includes(id));
  let entry = into.find(meets);
  if (!entry) into.push((entry = { contacts: [], points: [], wires: [], conditions: [] }));
  add(entry.contacts, contacts);
  add(entry.points, [point]);
  add(entry.conditions, [condition]);
  const beside = edges.flatMap((number) => [path[path.indexOf(number) - 1], path[path.indexOf(number) + 1]]);
  add(
    entry.wires,
    beside.flatMap((number) => graph.edges[number ?? -1]?.wire?.id ?? []),
  );
}

/**
 * Single-pole contacts and fuses in the neutral of points that are fed the right way round. A point that is fed the
 * wrong
 * way round is left to the rule of polarity: there the neutral is what the drawing calls line.
 */
export const neutralContacts = once((context: Context) => {
  const switched: NeutralContact[] = [];
  const fused: NeutralContact[] = [];
  for (const evaluated of context.evaluated) {
    const { condition, stands } = evaluated;
    for (const stand of stands.filter(({ shorted }) => !shorted)) {
      condition.sources.forEach((source, i) => {
        for (const way of returnsIn(context, evaluated, stand, i, source)) {
          if (way.control.length > 0) note(context, switched, way, way.control, condition.name, true);
          for (const fuse of way.fuses) note(context, fused, way, [fuse], condition.name, false);
        }
      });
    }
  }
  return { switched, fused };
});
