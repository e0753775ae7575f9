import { apparentCurrentA } from '../calculations/design-current';
import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { pathTo, reaches } from '../terminals/reach';
import { isOvercurrent, isPoint, isResidual } from '../terminals/roles-of-parts';
import type { Source } from './conditions';
import { devicesOn, type Evaluated, type Evaluation } from './evaluate';
import { chargeWatts, takenBy } from './loads';

/** What draws current: a lamp, fan, appliance or socket, or an inverter's input with its charger. */
export interface Drawn {
  part: Part;
  /** false for an inverter's input */
  isPoint: boolean;
  /** the condition that its paths are of: the first in which it is fed, so `mains` wherever that feeds it */
  condition: string | null;
  source: Source | null;
  lineEdges: readonly number[];
  neutralEdges: readonly number[];
  lineDevices: readonly string[];
  neutralDevices: readonly string[];
  lineEnd: number;
  neutralEnd: number;
  /** id of the overcurrent device nearest before it: the way it belongs to */
  way: string | null;
  rcd: string | null;
  /** W and A, running; 0 where not known */
  watts: number;
  amps: number;
  /** A of its start, at least the running one */
  startAmps: number;
  /** false where the drawing gives no watts for a load that must have them */
  known: boolean;
}

/** Sockets with a plug in them: what the plug feeds counts in the place of the load assumed at the socket. */
function plugged(graph: Graph): Set<string> {
  return new Set(
    [...graph.parts.values()].flatMap((part) => (part.kind === 'plug' && part.in !== undefined ? [part.in] : [])),
  );
}

function load(part: Part, voltage: number, taken: Set<string>): Pick<Drawn, 'watts' | 'amps' | 'startAmps' | 'known'> {
  const nothing = { watts: 0, amps: 0, startAmps: 0 };
  if (taken.has(part.id)) return { ...nothing, known: true };
  const wants = takenBy(part);
  // A socket without an assumed load has none: only a lamp, a fan or an appliance must say what it takes.
  if (!wants) return { ...nothing, known: part.kind === 'socket' };
  const amps = apparentCurrentA({ va: wants.watts / wants.pf, voltage });
  return { watts: wants.watts, amps, startAmps: amps * wants.surge, known: true };
}

/** The input of an inverter in a condition on mains; null where no mains line reaches it. */
function inputOf(graph: Graph, inverter: Part, { condition, stands }: Evaluated, voltage: number): Drawn | null {
  const stand = stands.find(({ shorted }) => !shorted);
  if (!stand || condition.base !== 'mains') return null;
  const lineEnd = graph.node(inverter.id, 'in.L')!;
  const neutralEnd = graph.node(inverter.id, 'in.N')!;
  const at = condition.sources.findIndex(({ kind }, i) => kind === 'mains' && reaches(stand.line[i]!, lineEnd));
  if (at < 0) return null;
  const lineEdges = pathTo(graph, stand.line[at]!, lineEnd);
  const neutralEdges = reaches(stand.neutral[at]!, neutralEnd) ? pathTo(graph, stand.neutral[at]!, neutralEnd) : [];
  const lineDevices = devicesOn(graph, lineEdges);
  const last = (wanted: (part: Part) => boolean) => lineDevices.findLast((id) => wanted(graph.parts.get(id)!)) ?? null;
  const watts = inverter.kind === 'inverter' ? (chargeWatts(graph, inverter) ?? 0) : 0;
  const amps = apparentCurrentA({ va: watts, voltage });
  return {
    part: inverter,
    isPoint: false,
    condition: condition.name,
    source: condition.sources[at]!,
    lineEdges,
    neutralEdges,
    lineDevices,
    neutralDevices: devicesOn(graph, neutralEdges),
    lineEnd,
    neutralEnd,
    way: last(isOvercurrent),
    rcd: last(isResidual),
    watts,
    amps,
    startAmps: amps,
    known: true,
  };
}

/** Everything that draws current in a home, in order of id, each with the paths by which it is fed first of all on mains. */
export function listDrawn(graph: Graph, { evaluated, backups }: Evaluation): Drawn[] {
  const { voltage } = graph.document.supply;
  const taken = plugged(graph);
  const drawn: Drawn[] = [];
  for (const part of graph.parts.values()) {
    if (!isPoint(part)) continue;
    const states = evaluated.map(({ condition, points }) => ({
      condition: condition.name,
      state: points.get(part.id)!,
    }));
    const best = states.find(({ state }) => state.fed) ?? states.find(({ state }) => state.source !== null);
    const state = best?.state ?? states[0]!.state;
    const { source, lineEdges, neutralEdges, lineDevices, neutralDevices, lineEnd, neutralEnd, overcurrent, rcd } =
      state;
    drawn.push({
      part,
      isPoint: true,
      condition: best?.condition ?? null,
      source,
      lineEdges,
      neutralEdges,
      lineDevices,
      neutralDevices,
      lineEnd,
      neutralEnd,
      way: overcurrent,
      rcd,
      ...load(part, voltage, taken),
    });
  }
  for (const inverter of backups) {
    const input = evaluated.map((each) => inputOf(graph, inverter, each, voltage)).find((each) => each !== null);
    if (input) drawn.push(input);
  }
  return drawn;
}
