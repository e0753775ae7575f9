import { nameOf } from '../document/names';
import type { Graph } from '../terminals/graph';
import { reach, reaches } from '../terminals/reach';
import type { Standing } from './assemble';
import type { Condition } from './conditions';
import type { Evaluated, Evaluation } from './evaluate';
import { assumptions, stayAsTheyAre } from './fault-assumes';
import { caseVoltsOf, darkLoads, liveParts, loadVoltsOf, wireAmpsOf } from './fault-reading';
import { insertFault, type Inserted } from './fault-insert';
import { withJoints, type DrawnJoint } from './fault-drawn';
import { endure, firstOf, remaining, type Endured } from './fault-endurance';
import { deviceLacks, urges } from './fault-trips';
import { FaultError, type Fault, type FaultStep, type FaultWalk } from './fault-types';
import { takeOver } from './inverters';
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
  return (rounds.find(({ points }) => faults.length > 0 && points.includes(faults[0]!.at)) ?? rounds[0]!).standing;
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
 * @param faults may be none where the drawing itself holds a short circuit: then that is walked
 * @param condition name of the condition; the first where not given
 * @throws FaultError where the fault, the condition or the supply's data do not allow it
 */
export function walkFaults(
  graph: Graph,
  evaluation: Evaluation,
  faults: readonly Fault[],
  condition?: string,
): FaultWalk {
  const evaluated = conditionNamed(evaluation, condition);
  const { standing, joints } = withJoints(graph, evaluated, startingStand(graph, evaluated, faults));
  if (faults.length + joints.length === 0) throw new FaultError('there is no fault to walk');
  return walkFrom(graph, standing, faults, { joints });
}

/** How a walk is to go, and who looks on. */
export interface Course {
  /** short circuits and joints to earth that are in the drawing: they come before the first fault, as steps of their own */
  joints?: readonly DrawnJoint[];
  /** inverters run from their batteries as soon as the mains no longer reaches them; else all stay as the condition has them */
  handsOver?: boolean;
  /** is shown the home solved before the first fault */
  before?(steady: Steady): void;
  /** is shown each step, and the home solved after it */
  step?(step: FaultStep, steady: Steady): void;
}

/**
 * Walks faults from a home that stands in any way: its switches and devices where somebody has put them.
 * @throws FaultError as {@link walkFaults}
 */
export function walkFrom(
  graph: Graph,
  start: Standing,
  faults: readonly Fault[],
  course: Course = {},
): FaultWalk {
  const { joints = [], handsOver = false } = course;
  for (const { at } of faults) if (!graph.parts.has(at)) throw new FaultError(`there is no part "${at}"`);
  requireSupply(graph, start.condition, faults);
  const sound = solveStanding(graph, withoutJoints(start, joints));
  course.before?.(sound);
  const opened = new Set<string>();
  const moved = new Set<string>();
  const steps: FaultStep[] = [];
  let standing = start;
  let now = joints.length > 0 ? solveStanding(graph, start) : sound;
  let t = 0;
  let earliest = 0;

  const add = (event: Pick<FaultStep, 'event'> & Partial<FaultStep>, inserted: Inserted) => {
    const step: FaultStep = { t, earliest, orElse: [], ...event, ...readingAt(graph, inserted, sound, now) };
    steps.push(step);
    course.step?.(step, now);
  };
  /** Lets inverters take over that have lost the mains. @returns false where none has */
  const handOver = (inserted: Inserted): boolean => {
    const taken = handsOver ? takeOver(graph, standing) : null;
    if (!taken) return false;
    const seconds = Math.max(...taken.inverters.map(({ transfer = 0 }) => transfer)) / 1000;
    t += seconds;
    earliest += seconds;
    standing = taken.standing;
    now = solveStanding(graph, standing);
    for (const part of taken.inverters)
      add({ event: `${nameOf(graph.document, part)} takes over`, part: part.id, takesOver: true }, inserted);
    return true;
  };
  /** Lets devices open until the home is still; says which made the fault dead, and when. */
  const settle = (inserted: Inserted): { by: string; at: number } | null => {
    const endured: Endured = new Map();
    let cleared: { by: string; at: number } | null = null;
    handOver(inserted);
    for (;;) {
      const watchesOvercurrent = now.assembly.inverters.every(({ mostA }) => mostA !== null);
      const pending = urges(graph, now, opened, watchesOvercurrent).map((urge) => remaining(urge, endured));
      for (const { urge } of pending) if (urge.astrayAmps > 0) moved.add(urge.part.id);
      const next = firstOf(pending);
      if (!next) return cleared;
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
      add({ event: `${nameOf(graph.document, part)} opens`, part: part.id, amps, astrayAmps, orElse }, inserted);
      const flows = inserted.extra >= 0 || inserted.edge !== undefined;
      const over = () => flows && isOver(graph, inserted, standing, steps[steps.length - 1]!);
      if (!cleared && over()) cleared = { by: part.id, at: t };
      // What takes over may feed the fault again.
      if (handOver(inserted) && !over()) cleared = null;
    }
  };

  let last: string | null = null;
  let touchVolts = 0;
  let first: FaultStep | undefined;
  let cleared: { by: string; at: number } | null = null;
  for (const joint of joints) {
    const inserted = asInserted(joint, standing);
    const before = opened.size;
    add({ event: joint.event, part: joint.part }, inserted);
    first ??= steps[steps.length - 1]!;
    touchVolts = Math.max(touchVolts, steps[steps.length - 1]!.touchVolts);
    cleared = settle(inserted);
    if (opened.size === before) add({ event: 'no device opens', part: joint.part }, inserted);
    last = [...opened].at(-1) ?? null;
  }
  let began = 0;
  for (const fault of faults) {
    const inserted = insertFault(graph, fault, standing, now);
    standing = inserted.standing;
    now = solveStanding(graph, standing);
    began = t;
    const name = nameOf(graph.document, graph.parts.get(fault.at)!);
    add({ event: WORDS[fault.kind](name, fault.wire), part: fault.at }, inserted);
    first = steps[steps.length - 1]!;
    const before = opened.size;
    cleared = settle(inserted);
    // What a drawn short circuit has made dead already needs nothing more to open.
    if (!cleared && last !== null && inserted.extra >= 0 && isOver(graph, inserted, standing, first))
      cleared = { by: last, at: t };
    if (opened.size === before) add({ event: 'no device opens', part: fault.at }, inserted);
  }
  const end = steps[steps.length - 1]!;
  return {
    condition: start.condition.name,
    faults,
    steps,
    touchVolts: Math.max(touchVolts, first?.touchVolts ?? 0),
    faultAmps: first?.faultAmps ?? 0,
    cleared: cleared !== null,
    clearedAfter: cleared === null ? null : cleared.at - began,
    by: cleared?.by ?? null,
    live: end.live,
    dark: end.dark,
    lacks: deviceLacks(graph),
    assumes: [
      ...assumptions(graph, standing.condition, moved),
      ...(handsOver ? [] : stayAsTheyAre(graph, standing)),
    ],
  };
}

/** A drawn joint as if it had been put in: read at its part, no branch of its own. */
const asInserted = ({ part, edge }: DrawnJoint, standing: Standing): Inserted => ({
  fault: { kind: 'neutral-to-earth', at: part },
  standing,
  conductor: undefined,
  extra: -1,
  edge,
});

const withoutJoints = (start: Standing, joints: readonly DrawnJoint[]): Standing => {
  if (joints.length === 0) return start;
  const closed = start.closed.slice();
  for (const { edge } of joints) closed[edge] = 0;
  return { ...start, closed };
};

/** No current in the fault any more, and no line at it; a neutral on earth is over as soon as nothing flows. */
function isOver(graph: Graph, { conductor, fault }: Inserted, standing: Standing, step: FaultStep): boolean {
  const still = conductor !== undefined && isDead(graph, standing, conductor);
  return step.faultAmps < NOTHING_A && (still || fault.kind === 'neutral-to-earth');
}

type Reading = Pick<
  FaultStep,
  'neutralVolts' | 'touchVolts' | 'faultAmps' | 'caseVolts' | 'loadVolts' | 'wireAmps' | 'live' | 'dark'
>;

function readingAt(graph: Graph, { fault, extra, edge }: Inserted, before: Steady, steady: Steady): Reading {
  const caseVolts = caseVoltsOf(graph, steady);
  const branch = steady.assembly.firstExtra + extra;
  const { currentRe, currentIm } = steady.solution;
  const drawnAmps = edge === undefined ? 0 : size(steady.current(edge));
  const own = graph.node(fault.at, 'E') ?? graph.node(fault.at, 'out.E');
  const worst = Object.values(caseVolts).reduce((most, volts) => Math.max(most, volts), 0);
  return {
    // A neutral that opens has no case of its own: the worst of the home's tells.
    touchVolts: fault.kind === 'neutral-open' || own === undefined ? worst : size(steady.volts(own)),
    faultAmps: extra < 0 ? drawnAmps : Math.hypot(currentRe[branch]!, currentIm[branch]!),
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
