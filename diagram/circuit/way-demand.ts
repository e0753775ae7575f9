import { allowedA } from '../calculations/allowance';
import { demandGroup } from '../calculations/demand-group';
import { maximumDemand, type Demand, type DemandItem } from '../calculations/maximum-demand';
import type { DemandGroup, Practice } from '../practices/types';
import type { Drawn } from './drawn';

/** What one way asks for, by itself. */
export interface WayLoad {
  /** id of the way's device */
  device: string;
  drawn: readonly Drawn[];
  /** all of it at once, W and A */
  watts: number;
  amps: number;
  /** after the diversity that the practice allows on one way */
  demandWatts: number;
  demandA: number;
  /** false while a load of it has no watts in the drawing */
  known: boolean;
}

function groupOf({ part }: Drawn): DemandGroup {
  if (part.kind === 'socket') return 'sockets';
  if (part.kind === 'lamp' || part.kind === 'fan') return 'lighting';
  return part.kind === 'inverter' ? 'charging' : demandGroup(part.label ?? '');
}

const add = (list: readonly Drawn[], of: (each: Drawn) => number): number =>
  list.reduce((sum, each) => sum + of(each), 0);

function byGroup(drawn: readonly Drawn[]): Map<DemandGroup, Drawn[]> {
  const groups = new Map<DemandGroup, Drawn[]>();
  for (const each of drawn) {
    const group = groupOf(each);
    const same = groups.get(group);
    if (same) same.push(each);
    else groups.set(group, [each]);
  }
  return groups;
}

/** The load of each way, by its device. */
export function wayLoads(drawn: readonly Drawn[], practice: Practice): Map<string, WayLoad> {
  const members = new Map<string, Drawn[]>();
  for (const each of drawn) {
    if (each.way === null) continue;
    const same = members.get(each.way);
    if (same) same.push(each);
    else members.set(each.way, [each]);
  }
  const loads = new Map<string, WayLoad>();
  for (const [device, list] of members) {
    let demandA = 0;
    let demandWatts = 0;
    for (const [group, same] of byGroup(list)) {
      const amps = add(same, (each) => each.amps);
      const allowed = practice.wayDiversity.includes(group)
        ? allowedA(
            same.map((each) => each.amps),
            practice.diversity[group].value,
            { perItem: group === 'cooker' },
          )
        : amps;
      demandA += allowed;
      demandWatts += amps > 0 ? (add(same, (each) => each.watts) * allowed) / amps : 0;
    }
    loads.set(device, {
      device,
      drawn: list,
      watts: add(list, (each) => each.watts),
      amps: add(list, (each) => each.amps),
      demandWatts,
      demandA,
      known: list.every((each) => each.known),
    });
  }
  return loads;
}

/** Entries of each way on the demand sheet: the same way is asked for by every device before it. */
const entries = new WeakMap<WayLoad, DemandItem[]>();

/** Entries of the demand sheet: the outlets of a way are one, as the table counts standard circuits; all else stands alone. */
function itemsOf(load: WayLoad): DemandItem[] {
  const known = entries.get(load) ?? workOutItems(load);
  entries.set(load, known);
  return known;
}

function workOutItems({ drawn }: WayLoad): DemandItem[] {
  const items: DemandItem[] = [];
  for (const [group, same] of byGroup(drawn)) {
    const one = (list: readonly Drawn[]) => ({
      group,
      watts: add(list, (each) => each.watts),
      currentA: add(list, (each) => each.amps),
    });
    if (group === 'sockets') items.push(one(same));
    else for (const each of same) items.push(one([each]));
  }
  return items.filter(({ watts }) => watts > 0);
}

/** The demand of several ways together, after the practice's allowances, line by line. */
export const demandOf = (ways: readonly WayLoad[], practice: Practice): Demand =>
  maximumDemand(ways.flatMap(itemsOf), practice);

/** True when two states of a way ask for the same. */
export function asksAlike(a: WayLoad, b: WayLoad): boolean {
  const [one, other] = [itemsOf(a), itemsOf(b)];
  return (
    one.length === other.length &&
    one.every(({ group, watts, currentA }, i) => {
      const item = other[i]!;
      return group === item.group && watts === item.watts && currentA === item.currentA;
    })
  );
}
