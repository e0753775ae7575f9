import { bankOf, joined, type Bank } from '../calculations/battery-bank';
import { chargingWatts } from '../calculations/autonomy';
import type { Part, PartOf } from '../document/schema';
import type { Edge, Graph } from '../terminals/graph';
import { spread } from '../terminals/spread';

/** What a point takes: watts, power factor and start. A socket takes its assumed load at unity. */
export interface Taken {
  watts: number;
  pf: number;
  surge: number;
}

/** Null where the drawing gives no watts: nothing is guessed. */
export function takenBy(part: Part): Taken | null {
  if (part.kind === 'socket') return part.load === undefined ? null : { watts: part.load, pf: 1, surge: 1 };
  if (part.kind !== 'lamp' && part.kind !== 'fan' && part.kind !== 'appliance') return null;
  return part.watts === undefined ? null : { watts: part.watts, pf: part.pf ?? 1, surge: part.surge ?? 1 };
}

const isLead = (edge: Edge) => edge.kind === 'wire' || edge.kind === 'device';

/** One battery part after another from the inverter's plus to its minus. */
interface Strings {
  batteries: PartOf<'battery'>[][];
  /** bat.+ was found joined to a battery's minus */
  reversed: PartOf<'battery'>[];
}

/** Follows the dc wiring of an inverter: each string of batteries between its terminals. */
export function batteryStrings(graph: Graph, inverter: PartOf<'inverter'>): Strings {
  const end = graph.node(inverter.id, 'bat.-')!;
  const reversed: PartOf<'battery'>[] = [];
  const passed = new Set<string>();
  const follow = (from: number): PartOf<'battery'>[][] => {
    const { nodes } = spread(graph, [from], isLead);
    if (nodes.has(end)) return [[]];
    const strings: PartOf<'battery'>[][] = [];
    for (const node of nodes) {
      const part = graph.partOf[node]!;
      if (part.kind !== 'battery' || passed.has(part.id)) continue;
      passed.add(part.id);
      const backwards = graph.markOf[node] === '-';
      const rest = follow(graph.node(part.id, backwards ? '+' : '-')!);
      if (rest.length > 0 && backwards) reversed.push(part);
      for (const tail of rest) strings.push([part, ...tail]);
    }
    return strings;
  };
  return { batteries: follow(graph.node(inverter.id, 'bat.+')!), reversed };
}

/** The bank behind an inverter; null where a battery lacks its volts or Ah, or none is there. */
export function bankBehind(graph: Graph, inverter: PartOf<'inverter'>): Bank | null {
  const strings = batteryStrings(graph, inverter).batteries.map((string) =>
    string.map((battery) =>
      battery.volts === undefined || battery.ah === undefined
        ? null
        : bankOf({ ...battery, volts: battery.volts, ah: battery.ah }),
    ),
  );
  const whole: Bank[] = [];
  for (const string of strings) {
    if (string.length === 0 || string.some((bank) => bank === null)) return null;
    whole.push(joined(string as Bank[], 'series'));
  }
  return whole.length === 0 ? null : joined(whole, 'parallel');
}

/** Efficiency where the drawing gives none: 0.8, the usual assumption (switchgear maker's blog). */
export const ASSUMED_EFFICIENCY = 0.8;

/** What an inverter's charger draws from the mains, W; null where charge current or bank is not known. */
export function chargeWatts(graph: Graph, inverter: PartOf<'inverter'>): number | null {
  const bank = bankBehind(graph, inverter);
  if (!bank || inverter.charge === undefined) return null;
  const efficiency = inverter.efficiency ?? ASSUMED_EFFICIENCY;
  return chargingWatts({ chargeA: inverter.charge, bankVolts: bank.volts, efficiency });
}

/** A that an inverter can drive into a fault on battery; null where neither it nor a surge is given. */
export function shortCircuitA(inverter: PartOf<'inverter'>, voltage: number): number | null {
  if (inverter.shortCircuit !== undefined) return inverter.shortCircuit;
  return inverter.surge === undefined ? null : inverter.surge / voltage;
}
