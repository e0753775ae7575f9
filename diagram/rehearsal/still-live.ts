import type { Standing } from '../circuit/assemble';
import { solveStanding, type Steady } from '../circuit/steady';
import { polesOf } from '../document/kinds';
import { byCode, type Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { reach, reaches } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';
import { readFigures, type Figures } from './figures';
import { fedBy } from './paths';
import { isOpenSetting, settingsOf, type Setting } from './settings';

/** A terminal that is live, and what it is still fed through. */
export interface LiveTerminal {
  mark: string;
  volts: number;
  /** id of the source; null where it is live through a load */
  from: string | null;
  /** ids of the devices from the source on */
  through: string[];
}

/** Live parts in a place that has parts gone dark. */
export interface LiveBeside {
  /** id of the place */
  place: string;
  parts: string[];
  from: string[];
  /** ids of the overcurrent devices that feed them */
  ways: string[];
}

/** What is live and what is dark once somebody has opened a part. All lists hold ids, sorted. */
export interface StillLive {
  part: string;
  /** the position that opens it; null for what has no contact: then the home is as it stands */
  setting: Setting | null;
  /** it stands open already: what is said is how things are, not how they would be */
  already: boolean;
  /** its own terminals that are live then */
  own: LiveTerminal[];
  /** points that lose their supply by it */
  dark: string[];
  /** where people would work on what went dark: what is live in the same places */
  beside: LiveBeside[];
  /** sources that drive then */
  sources: string[];
  /** inverters that take over from their batteries by it */
  takesOver: string[];
  /** sources whose neutral is joined to no earth then, and was before or is not now */
  floating: string[];
  /** neutral wires that become live by it, through a load */
  liveNeutrals: string[];
  /** only its line opens: the neutral stays joined */
  neutralJoined: boolean;
}

const isEarthMark = (mark: string): boolean => mark === 'E' || mark.endsWith('.E');

/** The position of a part in which no current passes; null where it has none. */
export const openSetting = (part: Part): Setting | null => settingsOf(part).find(isOpenSetting) ?? null;

/** Sources whose neutral hangs on no earth: neither the supplier's, nor the electrode, nor a bond of their own. */
function floatingSources(graph: Graph, { condition, closed }: Standing): string[] {
  const earths: number[] = [];
  graph.partOf.forEach((part, node) => {
    const mark = graph.markOf[node]!;
    if (
      part.kind === 'electrode' ||
      (part.kind === 'supply' && (mark === 'N' || (mark === 'E' && graph.document.supply.system !== 'TT')))
    )
      earths.push(node);
  });
  const walk = reach(graph, earths, closed);
  return condition.sources.filter(({ neutral }) => !reaches(walk, neutral)).map(({ part }) => part.id);
}

/** Places of the points that go dark, with what lives on in them. */
function besideDark(
  graph: Graph,
  { condition, closed }: Standing,
  figures: Figures,
  dark: readonly string[],
): LiveBeside[] {
  const places = new Set(dark.flatMap((id) => graph.parts.get(id)!.place ?? []));
  const nodes = new Map<string, number[]>();
  graph.partOf.forEach((part, node) => {
    if (part.place === undefined || !places.has(part.place) || isEarthMark(graph.markOf[node]!)) return;
    nodes.set(part.place, [...(nodes.get(part.place) ?? []), node]);
  });
  const found: LiveBeside[] = [];
  for (const [place, list] of [...nodes].sort(([a], [b]) => byCode(a, b))) {
    const fed = fedBy(graph, condition, closed, list);
    const ids = list.map((node) => graph.partOf[node]!.id).filter((id) => figures.parts[id]!.state === 'live');
    const parts = [...new Set(ids)].sort(byCode);
    if (parts.length === 0) continue;
    const from = [...new Set([...fed.values()].map(({ source }) => source.part.id))].sort(byCode);
    const ways = [...new Set([...fed.values()].flatMap(({ way }) => way ?? []))].sort(byCode);
    found.push({ place, parts, from, ways });
  }
  return found;
}

function ownTerminals(graph: Graph, part: Part, steady: Steady): LiveTerminal[] {
  const { condition, closed } = steady.standing;
  const nodes: number[] = [];
  graph.partOf.forEach((other, node) => {
    if (other === part && !isEarthMark(graph.markOf[node]!)) nodes.push(node);
  });
  const fed = fedBy(graph, condition, closed, nodes);
  return nodes.flatMap((node) => {
    const by = fed.get(node);
    const { re, im } = steady.volts(node);
    const volts = by ? steady.between(node, by.source.neutral) : Math.hypot(re, im);
    if (!by && volts <= 50) return [];
    const mark = graph.markOf[node]!;
    return [
      { mark, volts, from: by?.source.part.id ?? null, through: (by?.devices ?? []).filter((id) => id !== part.id) },
    ];
  });
}

/**
 * What stays live when somebody opens a part.
 * @param now the home as it stands, solved
 * @param opened the home with the part open; the same as `now` for what cannot be opened
 */
export function stillLive(graph: Graph, part: Part, now: Steady, opened: Standing | null): StillLive {
  const before = readFigures(graph, now);
  const then = opened ? solveStanding(graph, opened) : now;
  const after = opened ? readFigures(graph, then) : before;
  const half = graph.document.supply.voltage / 2;
  const fed = (figures: Figures, id: string) => (figures.parts[id]?.load?.volts ?? 0) > half;
  const points = [...graph.parts.values()].filter(isPoint).map(({ id }) => id);
  const dark = points.filter((id) => fed(before, id) && !fed(after, id)).sort(byCode);
  const live = (figures: Figures, id: string) => figures.wires[id]?.state === 'live';
  const neutrals = [...graph.wires.values()].filter(({ role }) => role === 'neutral').map(({ id }) => id);
  const driving = now.standing.condition.onBattery;
  const setting = openSetting(part);
  return {
    part: part.id,
    setting,
    already: setting !== null && opened === null,
    own: ownTerminals(graph, part, then),
    dark,
    beside: besideDark(graph, then.standing, after, dark),
    sources: then.standing.condition.sources.map(({ part: { id } }) => id),
    takesOver: [...then.standing.condition.onBattery].filter((id) => !driving.has(id)).sort(byCode),
    floating: floatingSources(graph, then.standing),
    liveNeutrals: neutrals.filter((id) => live(after, id) && !live(before, id)).sort(byCode),
    neutralJoined:
      graph.contactsOf.has(part.id) && polesOf(part) === 1 && part.kind !== 'plug' && part.kind !== 'inverter',
  };
}
