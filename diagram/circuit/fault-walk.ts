import { byDesignation, nameOf } from '../document/names';
import type { Graph } from '../terminals/graph';
import { reach, reaches } from '../terminals/reach';
import type { Standing } from './assemble';
import type { Condition } from './conditions';
import type { Evaluated, Evaluation } from './evaluate';
import { caseVoltsOf, darkLoads, liveParts, loadVoltsOf, wireAmpsOf } from './fault-reading';
import { insertFault, type Inserted } from './fault-insert';
import { deviceLacks, urges, type Urge } from './fault-trips';
import { FaultError, type Fault, type FaultStep, type FaultWalk } from './fault-types';
import { size, solveStanding, standingsOf, type Steady } from './steady';

/** A fault current below this is none. */
const NOTHING_A = 1e-3;

const WORDS: Record<Fault['kind'], (name: string, wire?: string) => string> = {
  'line-to-case': (name) => `line touches the case of ${name}`,
  'line-to-neutral': (name) => `line touches neutral at ${name}`,
  'neutral-open': (name, wire) =>
    wire === undefined ? `the neutral of ${name} opens` : `the neutral ${wire} at ${name} opens`,
  'neutral-to-earth': (name) => `neutral touches earth at ${name}`,
};

function conditionNamed(evaluation: Evaluation, name: string | undefined): Evaluated {
  const { evaluated } = evaluation;
  const found = name === undefined ? evaluated[0] : evaluated.find(({ condition }) => condition.name === name);
  if (found) return found;
  throw new FaultError(
    `there is no condition "${name}": this home has ${evaluated.map(({ condition }) => condition.name).join(', ')}`,
  );
}

/** What the supply's data must give for a fault of this kind to be walked on mains. */
function requireSupply(graph: Graph, condition: Condition, faults: readonly Fault[]): void {
  const { supply } = graph.document;
  if (condition.base === 'outage') return;
  const earth = faults.some(({ kind }) => kind === 'line-to-case' || kind === 'neutral-to-earth');
  if (earth && supply.system === 'TT' && supply.ra === undefined)
    throw new FaultError('cannot be walked without the resistance of the earth electrode (supply.ra)');
  if (earth && supply.system !== 'TT' && supply.ze === undefined)
    throw new FaultError('cannot be walked without the external earth fault loop impedance (supply.ze)');
  if (faults.some(({ kind }) => kind === 'line-to-neutral') && supply.zln === undefined)
    throw new FaultError('cannot be walked without the external line-neutral loop impedance (supply.zln)');
}

/** The home with all its loads on, two-way switches so that the faulted point is fed. */
function startingStand(graph: Graph, evaluated: Evaluated, faults: readonly Fault[]): Standing {
  const rounds = standingsOf(graph, evaluated);
  return (rounds.find(({ points }) => points.includes(faults[0]!.at)) ?? rounds[0]!).standing;
}

function withOpened(graph: Graph, standing: Standing, device: string): Standing {
  const closed = standing.closed.slice();
  for (const edge of graph.contactsOf.get(device)!) closed[edge] = 0;
  return { ...standing, closed };
}

/** The conductor at the fault no longer hangs on any source's line. */
function isDead(graph: Graph, standing: Standing, node: number): boolean {
  const starts = standing.condition.sources.map(({ line }) => line);
  return !reaches(reach(graph, starts, standing.closed), node);
}

/**
 * Walks one fault, or several in sequence: each is put in when the home is still after the one before. All devices
 * watch
 * their currents; the one that must open first opens, as late as its curve allows, and the home is solved again, until
 * nothing more must open. What a device has endured already counts towards its time.
 * @param condition name of the condition; the first where not given
 * @throws FaultError where the fault, the condition or the supply's data do not allow it
 */
export function walkFaults(
  graph: Graph,
  evaluation: Evaluation,
  faults: readonly Fault[],
  condition?: string,
): FaultWalk {
  if (faults.length === 0) throw new FaultError('there is no fault to walk');
  const evaluated = conditionNamed(evaluation, condition);
  return walkFrom(graph, startingStand(graph, evaluated, faults), faults);
}

/** What a walk shows as it goes: the home solved before the first fault, and after each step. */
export interface WalkWatch {
  before?(steady: Steady): void;
  step?(step: FaultStep, steady: Steady): void;
}

/**
 * Walks faults from a home that stands in any way: its switches and devices where somebody has put them.
 * @throws FaultError as {@link walkFaults}
 */
export function walkFrom(graph: Graph, start: Standing, faults: readonly Fault[], watch: WalkWatch = {}): FaultWalk {
  for (const { at } of faults) if (!graph.parts.has(at)) throw new FaultError(`there is no part "${at}"`);
  requireSupply(graph, start.condition, faults);
  let standing = start;
  const before = solveStanding(graph, standing);
  watch.before?.(before);
  const watchesOvercurrent = before.assembly.inverters.every(({ mostA }) => mostA !== null);
  const opened = new Set<string>();
  const steps: FaultStep[] = [];
  let now = before;
  let t = 0;
  let earliest = 0;
  let inserted!: Inserted;
  let began = 0;
  let touchVolts = 0;
  let faultAmps = 0;
  let by: string | null = null;
  let clearedAt: number | null = null;

  const reading = (steady: Steady) => readingAt(graph, inserted, before, steady);
  const add = (step: FaultStep) => {
    steps.push(step);
    watch.step?.(step, now);
  };
  for (const fault of faults) {
    inserted = insertFault(graph, fault, standing, now);
    standing = inserted.standing;
    now = solveStanding(graph, standing);
    began = t;
    by = null;
    clearedAt = null;
    const name = nameOf(graph.document, graph.parts.get(fault.at)!);
    const first = reading(now);
    add({ t, earliest, event: WORDS[fault.kind](name, fault.wire), part: fault.at, orElse: [], ...first });
    touchVolts = first.touchVolts;
    faultAmps = first.faultAmps;
    const endured = new Map<string, { early: number; late: number }>();
    const openedBefore = opened.size;
    for (;;) {
      const pending = urges(graph, now, opened, watchesOvercurrent).map((urge) => remaining(urge, endured));
      const next = pending
        .filter(({ lateS }) => Number.isFinite(lateS))
        .sort((a, b) => a.lateS - b.lateS || rank(a.urge) - rank(b.urge) || byDesignation(a.urge.part, b.urge.part))[0];
      if (!next) break;
      for (const { urge } of pending) endure(urge, next.lateS, endured);
      const { part, amps, astrayAmps } = next.urge;
      const orElse = pending
        .filter((each) => each !== next && each.earlyS < next.lateS)
        .map(({ urge }) => urge.part.id);
      t += next.lateS;
      earliest += Math.min(next.earlyS, next.lateS);
      opened.add(part.id);
      standing = withOpened(graph, standing, part.id);
      now = solveStanding(graph, standing);
      add({
        t,
        earliest,
        event: `${nameOf(graph.document, part)} opens`,
        part: part.id,
        amps,
        astrayAmps,
        orElse,
        ...reading(now),
      });
      const still = inserted.conductor !== undefined && isDead(graph, standing, inserted.conductor);
      const quiet = steps[steps.length - 1]!.faultAmps < NOTHING_A;
      if (clearedAt === null && inserted.extra >= 0 && quiet && (still || fault.kind === 'neutral-to-earth')) {
        clearedAt = t;
        by = part.id;
      }
    }
    if (opened.size === openedBefore) add({ ...steps[steps.length - 1]!, event: 'no device opens' });
  }
  const last = steps[steps.length - 1]!;
  return {
    condition: start.condition.name,
    steps,
    touchVolts,
    faultAmps,
    cleared: clearedAt !== null,
    clearedAfter: clearedAt === null ? null : clearedAt - began,
    by,
    live: last.live,
    dark: last.dark,
    lacks: deviceLacks(graph),
  };
}

type Reading = Pick<
  FaultStep,
  'neutralVolts' | 'touchVolts' | 'faultAmps' | 'caseVolts' | 'loadVolts' | 'wireAmps' | 'live' | 'dark'
>;

function readingAt(graph: Graph, { fault, extra }: Inserted, before: Steady, steady: Steady): Reading {
  const caseVolts = caseVoltsOf(graph, steady);
  const branch = steady.assembly.firstExtra + extra;
  const { currentRe, currentIm } = steady.solution;
  const own = graph.node(fault.at, 'E') ?? graph.node(fault.at, 'out.E');
  const worst = Object.values(caseVolts).reduce((most, volts) => Math.max(most, volts), 0);
  return {
    // A neutral that opens has no case of its own: the worst of the home's tells.
    touchVolts: fault.kind === 'neutral-open' || own === undefined ? worst : size(steady.volts(own)),
    faultAmps: extra < 0 ? 0 : Math.hypot(currentRe[branch]!, currentIm[branch]!),
    caseVolts,
    neutralVolts: steady.standing.condition.sources.reduce(
      (most, { neutral }) => Math.max(most, size(steady.volts(neutral))),
      0,
    ),
    loadVolts: loadVoltsOf(graph, steady),
    wireAmps: wireAmpsOf(graph, steady),
    live: liveParts(graph, steady),
    dark: darkLoads(graph, before, steady),
  };
}

interface Pending {
  urge: Urge;
  earlyS: number;
  lateS: number;
}

type Endured = Map<string, { early: number; late: number }>;

/** What is left of a device's times, when it has endured shares of them already. */
function remaining(urge: Urge, endured: Endured): Pending {
  const { early = 0, late = 0 } = endured.get(urge.part.id) ?? {};
  return { urge, earlyS: urge.earliestS * Math.max(0, 1 - early), lateS: urge.latestS * Math.max(0, 1 - late) };
}

function endure(urge: Urge, seconds: number, endured: Endured): void {
  const { early = 0, late = 0 } = endured.get(urge.part.id) ?? {};
  endured.set(urge.part.id, {
    early: Math.min(1, early + seconds / urge.earliestS),
    late: Math.min(1, late + (Number.isFinite(urge.latestS) ? seconds / urge.latestS : 0)),
  });
}

/** Of two devices that must open at the same time the smaller goes first; a residual one before an overcurrent one. */
const rank = ({ part, astrayAmps }: Urge): number => {
  if (part.kind === 'rcd' || (part.kind === 'rcbo' && astrayAmps > 0)) return 0;
  return 'rating' in part && part.rating !== undefined ? part.rating : Infinity;
};
