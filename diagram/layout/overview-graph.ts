import { byCode, type End, type Installation, type Kind, type Part, type Role, type Wire } from '../document/schema';

/**
 * What the overview draws: the parts that the eye follows, and one run for the cores of a cable that go the same way.
 * Neutral and earth cores are the tick marks of their cable; only the earth of an electrode or a bond is a line of its own.
 */
export interface OverviewRun {
  id: string;
  wires: string[];
  cable?: string;
  from: End;
  to: End;
  role: Role;
  /** what the tick marks show */
  cores: ('L' | 'N' | 'E')[];
}

export interface OverviewGraph {
  /** every part of the document, by id */
  byId: ReadonlyMap<string, Part>;
  /** drawn parts, by id in code order */
  parts: ReadonlyMap<string, Part>;
  runs: readonly OverviewRun[];
  /** runs at each drawn part, in order of run id */
  at: ReadonlyMap<string, readonly OverviewRun[]>;
  /** neutral bars and the device whose neutral terminal feeds them */
  neutralFrom: ReadonlyMap<string, string>;
}

const LIVE: ReadonlySet<Role> = new Set<Role>(['line', 'switched', 'strapper', 'dc+', 'dc-']);
const EARTH_ENDS: ReadonlySet<Kind> = new Set<Kind>(['electrode', 'bond']);
/** Kinds that belong in a line: where one has only neutral or earth wires, that is what must be seen. */
const IN_LINE: ReadonlySet<Kind> = new Set<Kind>([
  'fuse',
  'isolator',
  'mcb',
  'rcd',
  'rcbo',
  'changeover',
  'switch',
  'switch-2way',
  'switch-cross',
  'switch-2pole',
  'regulator',
]);

export const coreOf = (role: Role): 'L' | 'N' | 'E' => (role === 'neutral' ? 'N' : role === 'earth' ? 'E' : 'L');

function drawnWires(doc: Installation, byId: ReadonlyMap<string, Part>): Wire[] {
  const whole = doc.wires.filter((wire) => byId.has(wire.from[0]) && byId.has(wire.to[0]));
  const withLive = new Set<string>();
  const plus = new Set<string>();
  for (const wire of whole) {
    if (!LIVE.has(wire.role)) continue;
    for (const [part] of [wire.from, wire.to]) {
      withLive.add(part);
      if (wire.role === 'dc+') plus.add(part);
    }
  }
  const kind = (end: End) => byId.get(end[0])!.kind;
  return whole.filter((wire) => {
    const kinds = [kind(wire.from), kind(wire.to)];
    // one line stands for both poles of the battery's lead
    if (wire.role === 'dc-') return !(plus.has(wire.from[0]) && plus.has(wire.to[0]));
    if (LIVE.has(wire.role)) return true;
    if (wire.role === 'earth') return kinds.some((k) => EARTH_ENDS.has(k)) && kinds.includes('earth-bar');
    return [wire.from, wire.to].some(([part]) => IN_LINE.has(byId.get(part)!.kind) && !withLive.has(part));
  });
}

/** Cores that a run's ticks show: all of its cable where the cable is one run, else its own and those that end where it does. */
function coresOf(run: OverviewRun, cable: readonly Wire[], alone: boolean): ('L' | 'N' | 'E')[] {
  const ends = new Set([run.from[0], run.to[0]]);
  const shown = cable.filter(
    (wire) =>
      run.wires.includes(wire.id) ||
      (coreOf(wire.role) !== 'L' && (alone || ends.has(wire.from[0]) || ends.has(wire.to[0]))),
  );
  const order = { L: 0, N: 1, E: 2 };
  return shown.map((wire) => coreOf(wire.role)).sort((a, b) => order[a] - order[b]);
}

/** Works out what the overview draws. Pure; the order of the document's lists does not matter. */
export function overviewGraph(doc: Installation): OverviewGraph {
  const byId = new Map([...doc.parts].sort((a, b) => byCode(a.id, b.id)).map((part) => [part.id, part]));
  const groups = new Map<string, Wire[]>();
  for (const wire of drawnWires(doc, byId).sort((a, b) => byCode(a.id, b.id))) {
    const pair = [wire.from[0], wire.to[0]].sort(byCode).join(' ');
    // line and dc never share a stroke, and a core outside a cable is its own
    const key = `${pair} ${wire.cable ?? ''} ${wire.role.startsWith('dc') ? wire.role : coreOf(wire.role)}`;
    groups.set(key, [...(groups.get(key) ?? []), wire]);
  }
  const inCable = new Map<string, Wire[]>();
  for (const wire of doc.wires) if (wire.cable) inCable.set(wire.cable, [...(inCable.get(wire.cable) ?? []), wire]);

  const runs = [...groups.values()].map((wires): OverviewRun => {
    const first = wires[0]!;
    return {
      id: `run:${first.id}`,
      wires: wires.map((wire) => wire.id),
      ...(first.cable && { cable: first.cable }),
      from: first.from,
      to: first.to,
      role: first.role,
      cores: [],
    };
  });
  runs.sort((a, b) => byCode(a.id, b.id));
  const drawnInCable = new Map<string, number>();
  for (const run of runs) if (run.cable) drawnInCable.set(run.cable, (drawnInCable.get(run.cable) ?? 0) + 1);
  for (const run of runs)
    if (run.cable) run.cores = coresOf(run, inCable.get(run.cable) ?? [], drawnInCable.get(run.cable) === 1);

  const at = new Map<string, OverviewRun[]>();
  for (const run of runs)
    for (const part of new Set([run.from[0], run.to[0]])) at.set(part, [...(at.get(part) ?? []), run]);
  const wired = new Set(doc.wires.flatMap((wire) => [wire.from[0], wire.to[0]]));
  // a joint of neutrals or earths is not drawn; one that nothing meets yet is, or it could not be taken in hand
  const parts = new Map([...byId].filter(([id, part]) => part.kind !== 'joint' || at.has(id) || !wired.has(id)));
  return { byId, parts, runs, at, neutralFrom: neutralSources(doc, byId) };
}

const NEUTRAL_SOURCES: ReadonlySet<Kind> = new Set<Kind>([
  'rcd',
  'rcbo',
  'isolator',
  'mcb',
  'meter',
  'changeover',
  'inverter',
]);

/** The device before each neutral bar: one whose outgoing neutral terminal is wired to it. */
function neutralSources(doc: Installation, byId: ReadonlyMap<string, Part>): Map<string, string> {
  const found = new Map<string, string>();
  for (const wire of [...doc.wires].sort((a, b) => byCode(a.id, b.id)))
    for (const [bar, source] of [
      [wire.from, wire.to],
      [wire.to, wire.from],
    ] as const) {
      const kind = byId.get(source[0])?.kind;
      const outgoing = source[1] === '4' || source[1] === 'out.N' || (kind === 'meter' && source[1] === '3');
      if (
        byId.get(bar[0])?.kind === 'neutral-bar' &&
        kind &&
        NEUTRAL_SOURCES.has(kind) &&
        outgoing &&
        !found.has(bar[0])
      )
        found.set(bar[0], source[0]);
    }
  return found;
}

/** The part at the other end of a run. */
export const otherEnd = (run: OverviewRun, part: string): End => (run.from[0] === part ? run.to : run.from);
