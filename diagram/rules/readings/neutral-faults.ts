import type { Evaluated, PointState } from '../../circuit/evaluate';
import { reach, reaches } from '../../terminals/reach';
import type { Context } from '../context';
import { doubledNeutrals } from './doubled-neutrals';
import { compareWays, strayWires } from './neutral-paths';
import { once } from './once';
import { potentials } from './potentials';
import { feedsIn, sharedNeutrals } from './shared-neutrals';

/** In order of which one wins where one cause could give several. */
const NEUTRAL_KINDS = ['lost', 'behind', 'borrowed', 'imbalance'] as const;
type NeutralKind = (typeof NEUTRAL_KINDS)[number];

/** Points whose neutral is led wrongly by one cause. */
export interface NeutralFault {
  kind: NeutralKind;
  points: string[];
  /** wires to be moved */
  wires: string[];
  /** devices, plugs and ways that the neutral passes and should not, or should and does not */
  devices: string[];
  /** the neutral passes devices that the line does not (true), or misses one (false) */
  foreign: boolean;
  conditions: string[];
  /** a wire that joins two neutrals; `points` are its ends */
  link?: true;
  /** a device whose neutral pole is wired from the wrong end */
  turned?: true;
}

/** Whether opening one device or plug takes a point's neutral away from its source. */
function isLostWithout(context: Context, evaluated: Evaluated, state: PointState, device: string): boolean {
  const { graph } = context;
  const closed = evaluated.whole.slice();
  // Two-way switches stand as they do where the point is fed.
  for (const number of state.neutralEdges) closed[number] = 1;
  for (const number of graph.contactsOf.get(device)!) closed[number] = 0;
  return !reaches(reach(graph, [state.source!.neutral], closed), state.neutralEnd);
}

interface Verdict {
  kind: NeutralKind;
  devices: string[];
  foreign: boolean;
  turned?: true;
}

function judge(context: Context, evaluated: Evaluated, state: PointState): Verdict | undefined {
  const backup = state.source?.kind === 'backup';
  if (!state.fed) {
    const stray = backup && potentials(context).neutral[state.neutralEnd] === 1;
    return stray ? { kind: 'lost', devices: [], foreign: true } : undefined;
  }
  const { foreign, missed, turned } = compareWays(context, state);
  if (backup) {
    const losing = foreign.filter((id) => isLostWithout(context, evaluated, state, id));
    if (losing.length > 0) return { kind: 'lost', devices: losing, foreign: true };
    const residual = foreign.filter((id) => ['rcd', 'rcbo'].includes(context.graph.parts.get(id)!.kind));
    if (residual.length + missed.length > 0)
      return { kind: 'behind', devices: [...residual, ...missed], foreign: residual.length > 0 };
    return turned.length > 0 ? { kind: 'imbalance', devices: turned, foreign: false, turned: true } : undefined;
  }
  const devices = foreign.filter((id) => context.graph.parts.get(id)!.kind !== 'plug');
  if (devices.length > 0) return { kind: 'borrowed', devices, foreign: true };
  if (missed.length > 0) return { kind: 'imbalance', devices: missed, foreign: false };
  return turned.length > 0 ? { kind: 'imbalance', devices: turned, foreign: false, turned: true } : undefined;
}

const rank = (kind: NeutralKind): number => NEUTRAL_KINDS.indexOf(kind);

/** Every point's worst neutral fault, with the conditions in which it holds. */
function worst(context: Context): Map<string, Verdict & { first: Evaluated; conditions: string[] }> {
  const found = new Map<string, Verdict & { first: Evaluated; conditions: string[] }>();
  for (const evaluated of context.evaluated) {
    for (const state of feedsIn(evaluated)) {
      const verdict = judge(context, evaluated, state);
      if (!verdict) continue;
      const id = state.part.id;
      const before = found.get(id);
      const name = evaluated.condition.name;
      if (!before || rank(verdict.kind) < rank(before.kind))
        found.set(id, { ...verdict, first: evaluated, conditions: [name] });
      else if (verdict.kind === before.kind && !before.conditions.includes(name)) before.conditions.push(name);
    }
  }
  return found;
}

/** Wrongly led neutrals, one entry a cause; where one cause gives several faults the strongest stands for all. */
export const neutralFaults = once((context: Context): NeutralFault[] => {
  const groups = new Map<string, { points: string[]; verdict: Verdict & { first: Evaluated; conditions: string[] } }>();
  for (const [id, verdict] of worst(context)) {
    const key = [verdict.kind, verdict.foreign, verdict.turned, ...verdict.devices, '|', ...verdict.conditions].join(' ');
    const entry = groups.get(key) ?? { points: [], verdict };
    entry.points.push(id);
    groups.set(key, entry);
  }
  const faults: NeutralFault[] = [];
  for (const { points, verdict } of groups.values()) {
    const { first, conditions, ...rest } = verdict;
    // A point that has no way back in its own condition is followed where it has one: on mains.
    const followed = points.every((id) => first.points.get(id)!.fed)
      ? first
      : (context.evaluated.find(({ points: states }) => points.every((id) => states.get(id)!.fed)) ?? first);
    const wires = strayWires(context, followed, points);
    const behindDevice = rest.devices.flatMap((device) =>
      [...first.points.values()].filter((state) => state.lineDevices.includes(device)).map(({ part }) => part.id),
    );
    // A device that every neutral misses is itself wired wrong: one cause, not one at each point.
    const device = rest.turned || (!rest.foreign && behindDevice.every((id) => points.includes(id)));
    faults.push({ ...rest, points, wires: device ? [] : wires, conditions });
  }
  const doubled = doubledNeutrals(context);
  const told = new Set(faults.flatMap(({ points }) => points));
  const shared = sharedNeutrals(context).filter(({ points }) => !points.every((id) => told.has(id)));
  return [...faults, ...doubled, ...shared];
});

export const neutralFaultsOf = (context: Context, kind: NeutralKind): NeutralFault[] =>
  neutralFaults(context).filter((fault) => fault.kind === kind);
