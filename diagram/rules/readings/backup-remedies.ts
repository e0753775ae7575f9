import { autonomyHours } from '../../calculations/autonomy';
import { CHARGE_LIMIT } from '../../calculations/battery-bank';
import { currentAtCutoffA } from '../../calculations/backup-load';
import { LEADS_MM2 } from '../../calculations/battery-lead';
import type { BackupFigures } from '../../circuit/backup-figures';
import { dcStrings, fusesOn } from '../../circuit/dc-leads';
import { ASSUMED_EFFICIENCY } from '../../circuit/loads';
import type { Cable, End, Part, PartOf, Wire } from '../../document/schema';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { amps, voltAmps } from './amounts';
import { dcLeads, leadIz } from './dc-leads';
import { freeOn, withEnd } from './rewire';
import { say } from './words';

/** VA that inverters for homes are sold in; common practice, no source */
const INVERTERS_VA = [
  400, 600, 700, 850, 1000, 1100, 1400, 1500, 2000, 2500, 3000, 3500, 4000, 5000, 6000, 8000, 10000,
];
/** A that dc fuses are sold in; common practice, no source */
const DC_FUSES_A = [30, 50, 63, 80, 100, 125, 150, 175, 200, 250, 300, 350, 400, 500];
/** Ah of one battery that shops sell; common practice, no source */
const BATTERIES_AH = [40, 60, 75, 80, 100, 120, 135, 150, 165, 180, 200, 220, 240, 250, 280, 300, 350, 400];
/** at most so many batteries in parallel: more share unevenly; common practice, no source */
const MOST_PARALLEL = 4;
/** A per Ah that a charger is set to where the old one is too weak for the bank; makers' advice, from memory */
const USUAL_CHARGE = 0.1;

/** The fuse and the leads that a larger inverter asks for; null where no size does. */
function dcSide(context: Context, inverter: PartOf<'inverter'>): { parts: Part[]; cables: Cable[] } | null {
  const { va, efficiency = ASSUMED_EFFICIENCY, cutoff } = inverter;
  if (va === undefined || cutoff === undefined) return { parts: [], cables: [] };
  const needA = currentAtCutoffA({ va, efficiency, cutoffV: cutoff });
  const { strings } = dcStrings(context.graph, inverter);
  const fuses = strings.flatMap(({ edges }) => fusesOn(context.graph, edges));
  const parts: Part[] = [];
  let fuseA = 0;
  for (const fuse of fuses) {
    if (fuse.kind !== 'fuse' || fuse.rating === undefined) continue;
    const rating = fuse.rating >= needA ? fuse.rating : DC_FUSES_A.find((size) => size >= needA);
    if (rating === undefined) return null;
    fuseA = Math.max(fuseA, rating);
    if (rating !== fuse.rating) parts.push({ ...fuse, rating });
  }
  const cables: Cable[] = [];
  for (const { cable, currentA } of dcLeads(context, strings, needA).leads) {
    const carries = (csa: number) => (leadIz(context, { ...cable, csa }) ?? 0) >= Math.max(currentA, fuseA);
    const csa = carries(cable.csa) ? cable.csa : LEADS_MM2.find((size) => size > cable.csa && carries(size));
    if (csa === undefined) return null;
    if (csa !== cable.csa) cables.push({ ...cable, csa });
  }
  return { parts, cables };
}

/** "Fit an inverter of 1100 VA", with fuse and leads for it. @param need VA running, and VA for a moment */
export function largerInverter(
  context: Context,
  { inverter }: BackupFigures,
  need: { va: number; surgeVa: number },
): Remedy[] {
  const ratio = inverter.va !== undefined && inverter.surge !== undefined ? inverter.surge / inverter.va : 2;
  const va = INVERTERS_VA.find((size) => size >= need.va && size > (inverter.va ?? 0) && size * ratio >= need.surgeVa);
  if (va === undefined) return [];
  const larger: PartOf<'inverter'> = { ...inverter, va, surge: Math.round(va * ratio) };
  const dc = dcSide(context, larger);
  if (!dc) return [];
  const beside = dc.parts.length + dc.cables.length > 0 ? ', with fuse and leads for it' : '';
  return [
    {
      label: `Fit an inverter of ${voltAmps(va)}${beside}`,
      patch: { set: { parts: [larger, ...dc.parts], ...(dc.cables.length > 0 && { cables: dc.cables }) } },
    },
  ];
}

/**
 * A larger battery, and several of the same: the least that last long enough, with the charger set for them where it is
 * too weak.
 */
export function largerBank(context: Context, figures: BackupFigures, wantedHours: number): Remedy[] {
  const { inverter, bank, load } = figures;
  const batteries = dcStrings(context.graph, inverter).strings.flatMap((string) => string.batteries);
  const [battery] = batteries;
  if (!bank || batteries.length !== 1 || battery?.ah === undefined) return [];
  const efficiency = inverter.efficiency ?? ASSUMED_EFFICIENCY;
  const lasts = (ah: number) => autonomyHours({ bank: { ...bank, ah }, watts: load.watts, efficiency }) >= wantedHours;
  const fitted = (label: string, changed: PartOf<'battery'>, ah: number): Remedy => {
    const charge = Math.round(USUAL_CHARGE * ah);
    const isWeak = inverter.charge !== undefined && inverter.charge < CHARGE_LIMIT[bank.chemistry].least * ah;
    const charger = isWeak ? [{ ...inverter, charge }] : [];
    const beside = charger.length > 0 ? `, charged with ${amps(charge)}` : '';
    return { label: `${label}${beside}`, patch: { set: { parts: [changed, ...charger] } } };
  };
  const size = BATTERIES_AH.find((ah) => ah > battery.ah! && lasts((bank.ah * ah) / battery.ah!));
  const remedies: Remedy[] = [];
  if (size !== undefined)
    remedies.push(fitted(`Fit a battery of ${size} Ah`, { ...battery, ah: size }, (bank.ah * size) / battery.ah));
  const single = (battery.count ?? 1) === 1 || battery.arrangement === 'parallel';
  const count = battery.count ?? 1;
  for (let more = count + 1; single && more <= MOST_PARALLEL; more++) {
    const ah = battery.ah * more;
    if (!lasts(ah)) continue;
    const several = { ...battery, count: more, arrangement: 'parallel' } as const;
    remedies.push(fitted(`Fit ${more} such batteries in parallel`, several, ah));
    break;
  }
  return remedies;
}

/** Bars that ways of the mains take their line and neutral from. */
function mainsBars({ ways, graph }: Context): { line: string; neutral: string }[] {
  const pairs = new Map<string, { line: string; neutral: string }>();
  for (const way of ways.filter(({ backup }) => !backup)) {
    const line = barOf(graph.wires.values(), way.device, (id) => graph.parts.get(id)!.kind === 'line-bar');
    const neutral = way.wires
      .map((id) => graph.wires.get(id)!)
      .filter(({ role }) => role === 'neutral')
      .flatMap(({ from, to }) => [from[0], to[0]])
      .find((id) => graph.parts.get(id)!.kind === 'neutral-bar');
    if (line && neutral) pairs.set(`${line} ${neutral}`, { line, neutral });
  }
  return [...pairs.values()];
}

function barOf(wires: Iterable<Wire>, device: string, isBar: (id: string) => boolean): string | undefined {
  for (const { from, to } of wires) {
    if (from[0] === device && isBar(to[0])) return to[0];
    if (to[0] === device && isBar(from[0])) return from[0];
  }
  return undefined;
}

/** "Move Q21 to the mains": a backed-up way led to bars that a mains way has, line and neutral together. */
export function wayToMains(context: Context, device: string): Remedy[] {
  const { graph, document } = context;
  const way = context.ways.find((each) => each.device === device && each.backup);
  if (!way) return [];
  const kind = (id: string) => graph.parts.get(id)?.kind;
  const lands = ({ from, to }: Wire, bar: Part['kind']): End | undefined => [from, to].find(([id]) => kind(id) === bar);
  const lines = document.wires.flatMap((wire) => {
    const at = lands(wire, 'line-bar');
    return at && [wire.from[0], wire.to[0]].includes(device) ? [{ wire, at }] : [];
  });
  const neutrals = way.wires.flatMap((id) => {
    const wire = graph.wires.get(id)!;
    const at = wire.role === 'neutral' ? lands(wire, 'neutral-bar') : undefined;
    return at ? [{ wire, at }] : [];
  });
  if (lines.length !== 1 || neutrals.length !== 1) return [];
  return mainsBars(context).flatMap(({ line, neutral }): Remedy[] => {
    const to = [freeOn(context, line), freeOn(context, neutral)];
    if (!to[0] || !to[1]) return [];
    const wires = [withEnd(lines[0]!.wire, lines[0]!.at, to[0]), withEnd(neutrals[0]!.wire, neutrals[0]!.at, to[1])];
    return [{ label: `Move ${say(context, device)} to the mains`, patch: { set: { wires } } }];
  });
}

/** The ways of a backup source, the one that takes most first: what is left off in an outage. */
export function waysToMains(context: Context, { drawn }: BackupFigures): Remedy[] {
  const byWay = new Map<string, number>();
  for (const { way, amps: taken } of drawn) if (way !== null) byWay.set(way, (byWay.get(way) ?? 0) + taken);
  const ways = [...byWay].sort(([a, x], [b, y]) => y - x || (a < b ? -1 : 1)).slice(0, 3);
  return ways.flatMap(([device]) => wayToMains(context, device));
}
