import type { DemandGroup, Practice } from '../practices/types';
import { allowanceText, allowedA } from './allowance';
import { requireNonNegative } from './requirements';

/** One load, or one way of outlets, before diversity. */
export interface DemandItem {
  group: DemandGroup;
  watts: number;
  /** A */
  currentA: number;
  /** a cooker whose control unit holds an outlet */
  outlet?: boolean;
}

export interface DemandRow {
  group: DemandGroup;
  what: string;
  count: number;
  /** connected */
  watts: number;
  currentA: number;
  /** after the allowance */
  demandWatts: number;
  demandA: number;
  allowance: string;
  source: string;
}

export interface Demand {
  rows: DemandRow[];
  connectedWatts: number;
  connectedA: number;
  demandWatts: number;
  demandA: number;
}

const GROUPS: readonly (readonly [DemandGroup, string])[] = [
  ['lighting', 'Lamps and fans'],
  ['sockets', 'Outlets, by way'],
  ['heating-power', 'Heating and power'],
  ['cooker', 'Cooking'],
  ['instant-water', 'Water heaters, instantaneous'],
  ['thermostatic-water', 'Water heaters with thermostat'],
  ['storage-heating', 'Storage and floor heating'],
  ['charging', 'Charging of the backup source'],
];

/**
 * Maximum demand of a home, every allowance a line that can be checked by hand. Currents are added arithmetically,
 * which
 * is never less than their vector sum; the watts after an allowance keep the group's power factor.
 * @throws RangeError naming the field
 */
export function maximumDemand(items: readonly DemandItem[], practice: Practice): Demand {
  items.forEach(({ watts }, i) => requireNonNegative(`items.${i}.watts`, watts));
  const rows: DemandRow[] = [];
  for (const [group, what] of GROUPS) {
    const members = items.filter((item) => item.group === group);
    if (members.length === 0) continue;
    const allowance = practice.diversity[group];
    const watts = members.reduce((sum, item) => sum + item.watts, 0);
    const currentA = members.reduce((sum, item) => sum + item.currentA, 0);
    const demandA = allowedA(
      members.map((item) => item.currentA),
      allowance.value,
      { perItem: group === 'cooker', outlets: members.filter((item) => item.outlet).length },
    );
    rows.push({
      group,
      what,
      count: members.length,
      watts,
      currentA,
      demandWatts: currentA > 0 ? (watts * demandA) / currentA : 0,
      demandA,
      allowance: allowanceText(allowance.value),
      source: allowance.note ? `${allowance.source} (${allowance.note})` : allowance.source,
    });
  }
  const total = (of: (row: DemandRow) => number) => rows.reduce((sum, row) => sum + of(row), 0);
  return {
    rows,
    connectedWatts: total((row) => row.watts),
    connectedA: total((row) => row.currentA),
    demandWatts: total((row) => row.demandWatts),
    demandA: total((row) => row.demandA),
  };
}
