import type { Standing } from '../circuit/assemble';
import type { Fault, FaultStep, FaultWalk } from '../circuit/fault-types';
import { size, type Steady } from '../circuit/steady';
import type { Graph } from '../terminals/graph';
import { isResidual } from '../terminals/roles-of-parts';
import { faultPath, type PathStep } from './fault-path';
import { LIVE_VOLTS, NOTHING_A, type Figures } from './figures';
import { fedBy } from './paths';
import { ampText, capital, count, partName, partNames, timeText, voltText } from './words';

/** What stands in the margin at one station. */
export interface Told {
  heading: string;
  text: string;
}

interface Scene {
  graph: Graph;
  faults: readonly Fault[];
  start: Standing;
  read(steady: Steady): Figures;
}

interface Moment {
  step: FaultStep;
  steady: Steady;
  before: Steady;
}

const name = ({ graph }: Scene, id: string): string => partName(graph.document, graph.parts.get(id)!);
const names = ({ graph }: Scene, ids: readonly string[]): string =>
  partNames(
    graph.document,
    ids.map((id) => graph.parts.get(id)!),
  );

/** Whether the faulted part has a case of its own to speak of. */
const hasCase = (figures: Figures, fault: Fault): boolean => figures.parts[fault.at]?.caseVolts !== undefined;

function caseWords(scene: Scene, figures: Figures, fault: Fault): string {
  const volts = figures.parts[fault.at]?.caseVolts;
  return volts === undefined ? '' : `the case at ${voltText(volts)}`;
}

/** "Every earthed case in the home stands at 225 V.", or how many do. */
function casesWords(figures: Figures, own: string): string {
  const all = Object.entries(figures.parts).flatMap(([id, { caseVolts, load }]) =>
    caseVolts !== undefined && load !== undefined && id !== own ? [caseVolts] : [],
  );
  const up = all.filter((volts) => volts > LIVE_VOLTS);
  if (up.length === 0) return '';
  const worst = voltText(Math.max(...up));
  if (up.length === all.length && up.length > 1) return `Every earthed case in the home stands at ${worst}.`;
  return `${capital(count(up.length, 'other earthed case'))} ${up.length === 1 ? 'stands' : 'stand'} at ${worst}.`;
}

/** How the current of a fault to earth comes home. */
function homeWords({ graph, start }: Scene, path: readonly PathStep[]): string {
  const roles = new Set(path.flatMap(({ wire }) => (wire === undefined ? [] : [graph.wires.get(wire)!.role])));
  const at = (kind: string, mark: string) =>
    path.some((each) => [each.from, each.to].some(([id, end]) => graph.parts.get(id)!.kind === kind && end === mark));
  const ways: string[] = [];
  if (roles.has('earth')) ways.push('down the earth core');
  const { supply } = graph.document;
  if (at('electrode', 'E') && supply.ra !== undefined) ways.push(`through RA ${supply.ra} Ω and the ground`);
  const bond = path.find(({ part, from, to }) => {
    const ends = [from[1], to[1]];
    return part !== undefined && ends.includes('out.N') && ends.includes('out.E');
  });
  if (bond) ways.push(`home by the bond of ${partName(graph.document, graph.parts.get(bond.part!)!)}`);
  else if (at('supply', 'E') && start.condition.sources.some(({ kind }) => kind === 'mains'))
    ways.push("home by the supply's earth");
  else if (at('supply', 'N') || at('electrode', 'E')) ways.push("home by the supply's neutral");
  if (ways.length < 2) return ways.join('');
  return `${ways.slice(0, -1).join(', ')}, and ${ways.at(-1)}`;
}

/** Loads that have lost their way back, and those that get too much. */
function neutralWords(scene: Scene, figures: Figures, before: Figures): string {
  const { graph } = scene;
  const nominal = graph.document.supply.voltage;
  const loads = Object.entries(figures.parts).flatMap(([id, { load }]) => (load ? [{ id, volts: load.volts }] : []));
  const had = (id: string) => before.parts[id]!.load!.volts;
  const lost = loads.filter(({ id, volts }) => had(id) > nominal / 2 && volts <= nominal / 2).map(({ id }) => id);
  const over = loads.filter(({ id, volts }) => had(id) > nominal / 2 && volts > 1.1 * nominal).map(({ id }) => id);
  const live = [...graph.wires.values()].filter(
    ({ id, role }) => role === 'neutral' && figures.wires[id]!.state === 'live',
  );
  const worst = live.reduce((most, { id }) => Math.max(most, figures.wires[id]!.volts), 0);
  const said: string[] = [];
  if (lost.length > 0) said.push(`${names(scene, lost)} ${lost.length === 1 ? 'has' : 'have'} no way back.`);
  if (live.length > 0)
    said.push(`The neutral behind the break stands at ${voltText(worst)}, through the loads that are on.`);
  if (over.length > 0) said.push(`${names(scene, over)} ${over.length === 1 ? 'gets' : 'get'} more than it may.`);
  return said.join(' ');
}

/** Loads that fall below half their voltage while the fault stands: what feeds them cannot hold it. */
function dimmed(scene: Scene, before: Figures, now: Figures): string {
  const gone = dark(scene, before, now);
  return gone.length === 0
    ? ''
    : `Meanwhile ${names(scene, gone)} ${gone.length === 1 ? 'gets' : 'get'} less than half the voltage.`;
}

const unchanged = 'Nothing shows: no current changes, no device sees it.';

export const say = {
  before(scene: Scene, steady: Steady, fault: Fault): Told {
    const { graph } = scene;
    if (graph.parts.get(fault.at)!.kind === 'supply')
      return { heading: 'before', text: 'The neutral of the supply is whole.' };
    const nodes = ['L', 'out.L', 'in.L'].flatMap((mark) => graph.node(fault.at, mark) ?? []);
    const fed = [...fedBy(graph, steady.standing.condition, steady.standing.closed, nodes).values()][0];
    const figures = scene.read(steady);
    const way = fed?.way ?? null;
    const amps = way === null ? '' : `${ampText(steady.poleAmps(way)[0] ?? 0)} in ${name(scene, way)}`;
    const none = fed ? '' : `No source feeds ${name(scene, fault.at)} as things stand`;
    return {
      heading: 'before',
      text: `${capital([amps || none, caseWords(scene, figures, fault)].filter(Boolean).join('; '))}.`,
    };
  },

  fault(scene: Scene, { step, steady, before }: Moment, fault: Fault): Told {
    const figures = scene.read(steady);
    const heading = scene.graph.parts.get(fault.at)!.kind === 'supply' ? 'the neutral of the supply opens' : step.event;
    const path = faultPath(scene.graph, before, steady, step.faultAmps);
    const own = figures.parts[fault.at]?.caseVolts;
    if (fault.kind === 'neutral-open') {
      const said = [neutralWords(scene, figures, scene.read(before)), casesWords(figures, '')]
        .filter(Boolean)
        .join(' ');
      return { heading, text: said || unchanged };
    }
    const dims = dimmed(scene, scene.read(before), figures);
    if (fault.kind === 'line-to-neutral') {
      const runs = `${ampText(step.faultAmps)} runs out by the line and back by the neutral.`;
      return { heading, text: step.faultAmps < NOTHING_A ? unchanged : [runs, dims].filter(Boolean).join(' ') };
    }
    if (fault.kind === 'neutral-to-earth') {
      const text =
        step.faultAmps < NOTHING_A
          ? 'Nothing shows: neutral and earth stand at the same voltage, and no device sees it. It waits for a second fault.'
          : `${ampText(step.faultAmps)} of what should come back by the neutral goes by the earth.`;
      return { heading, text };
    }
    if (step.faultAmps < NOTHING_A) {
      if (own !== undefined && own > LIVE_VOLTS)
        return { heading, text: `0.0 A: nothing carries it home. The case stands at ${voltText(own)}.` };
      const lifted = steady.standing.condition.sources.find(({ neutral }) => size(steady.volts(neutral)) > LIVE_VOLTS);
      if (!lifted) return { heading, text: unchanged };
      const volts = voltText(size(steady.volts(lifted.neutral)));
      const who = name(scene, lifted.part.id);
      return {
        heading,
        text: `0.0 A: the neutral of ${who} has no earth, so nothing carries it home and no device sees it. That neutral now stands at ${volts} to earth; a second fault finds it there.`,
      };
    }
    const home = homeWords(scene, path);
    const stands = own === undefined ? '' : `The case stands at ${voltText(own)}.`;
    return {
      heading,
      text: [`${ampText(step.faultAmps)} runs ${home || 'home'}.`, stands, casesWords(figures, fault.at), dims]
        .filter(Boolean)
        .join(' '),
    };
  },

  opens(scene: Scene, { step, steady }: Moment, fault: Fault, before: Figures): Told {
    const part = scene.graph.parts.get(step.part!)!;
    const figures = scene.read(steady);
    const astray = step.astrayAmps ?? 0;
    const sees =
      isResidual(part) && part.sensitivity !== undefined && astray >= part.sensitivity / 2
        ? `It sees ${ampText(astray)} astray; ${ampText(part.sensitivity)} suffice.`
        : `${ampText(step.amps ?? 0)} through a rating of ${ampText('rating' in part ? (part.rating ?? 0) : 0)}.`;
    const sooner = step.earliest < step.t ? `Between ${timeText(step.earliest)} and ${timeText(step.t)}.` : '';
    const rival = step.orElse.length > 0 ? `${names(scene, step.orElse)} may open first.` : '';
    const shut = hasCase(figures, fault) ? `Case at ${voltText(figures.parts[fault.at]!.caseVolts!)}.` : '';
    const gone = dark(scene, before, figures);
    const goes = gone.length > 0 ? `${names(scene, gone)} ${gone.length === 1 ? 'goes' : 'go'} dark.` : '';
    return { heading: step.event, text: [sees, sooner, rival, shut, goes].filter(Boolean).join(' ') };
  },

  takesOver(scene: Scene, { step, steady }: Moment, fault: Fault, before: Figures): Told {
    const figures = scene.read(steady);
    const again = dark(scene, figures, before);
    const feeds = again.length > 0 ? `Its battery feeds ${names(scene, again)} again` : 'Nothing hangs on it that was dark';
    const volts = figures.parts[fault.at]?.caseVolts;
    const stands = volts !== undefined && volts > LIVE_VOLTS ? `, case at ${voltText(volts)}` : '';
    const fed = step.faultAmps < NOTHING_A && stands === '' ? '' : ` The fault is fed again: ${ampText(step.faultAmps)}${stands}.`;
    return { heading: step.event, text: `No mains at its input. ${feeds}.${fed}` };
  },

  holds(scene: Scene, { step, steady }: Moment, fault: Fault): Told {
    const volts = scene.read(steady).parts[fault.at]?.caseVolts;
    const amps = step.faultAmps < NOTHING_A ? '0.0 A' : ampText(step.faultAmps);
    const stands =
      volts !== undefined && volts > LIVE_VOLTS ? `, case at ${voltText(volts)} until somebody touches it` : '';
    return { heading: 'still', text: `No device opens. ${amps}${stands}.` };
  },

  still(scene: Scene, { steady }: Moment, first: Steady, result: FaultWalk): Told {
    const gone = dark(scene, scene.read(first), scene.read(steady));
    const cleared =
      result.clearedAfter === null
        ? 'The fault is still there.'
        : `Cleared ${timeText(result.clearedAfter)} after it began.`;
    const lost = gone.length > 0 ? `${names(scene, gone)} dark.` : 'Nothing else has gone dark.';
    const live = steady.standing.condition.sources.map(({ part }) => part.id);
    const stays =
      live.length > 0
        ? `${capital(names(scene, live))} ${live.length === 1 ? 'stays' : 'stay'} live up to what has opened.`
        : '';
    return { heading: 'still', text: [cleared, lost, stays].filter(Boolean).join(' ') };
  },

  alone(
    scene: Scene,
    { way, seconds }: { way: string; seconds: number },
    amps: number,
    { condition }: Standing,
  ): string {
    const how = Number.isFinite(seconds) ? `for up to ${timeText(seconds)}` : 'for ever';
    const where = condition.sources.every(({ kind }) => kind === 'backup') ? ' on battery' : '';
    return `${name(scene, way)} alone would let ${ampText(amps)} stand ${how}: the rcd is the only thing that clears this fault in time${where}.`;
  },
};

/** Loads that had their voltage and have it no longer. */
function dark({ graph }: Scene, before: Figures, now: Figures): string[] {
  const half = graph.document.supply.voltage / 2;
  const had = (figures: Figures, id: string) => (figures.parts[id]?.load?.volts ?? 0) > half;
  return Object.keys(before.parts).filter((id) => had(before, id) && !had(now, id));
}
