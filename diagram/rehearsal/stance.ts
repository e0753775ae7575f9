import { hasBattery } from '../circuit/inverters';
import { findMainSwitch } from '../circuit/main-switch';
import { byDesignation } from '../document/names';
import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';
import { spread } from '../terminals/spread';
import type { Settings } from './settings';

/** How somebody has put the home: nothing of it is saved in the drawing. */
export interface Stance {
  supply: 'live' | 'dead';
  /** only what stands otherwise than at rest, by id */
  moved: Settings;
}

export type ConditionName = 'mains' | 'outage' | 'main-off' | 'isolated';

/** The handles by which the conditions are made. */
export interface Handles {
  mainSwitch: Part | undefined;
  /** by designation, as the names of conditions have their positions */
  changeovers: Part[];
  /** devices between an inverter and its batteries */
  batteryDevices: Part[];
  /** the conditions of this home, in the order in which one goes through them */
  conditions: ConditionName[];
}

/** Devices in the dc leads of an inverter, found by walking from its dc terminals. */
export function devicesToBattery(graph: Graph, inverter: Part): Part[] {
  const starts = ['bat.+', 'bat.-'].map((mark) => graph.node(inverter.id, mark)!);
  const { edges } = spread(graph, starts, ({ kind }) => kind === 'wire' || kind === 'device');
  const found = new Map<string, Part>();
  for (const number of edges) {
    const { kind, part } = graph.edges[number]!;
    if (kind === 'device') found.set(part!, graph.parts.get(part!)!);
  }
  return [...found.values()];
}

/** Finds what the conditions of a home are made with. Without a backup source there is only `mains`. */
export function handlesOf(graph: Graph): Handles {
  const backups = [...graph.parts.values()]
    .filter((part) => part.kind === 'inverter' && hasBattery(graph, part))
    .sort(byDesignation);
  const mainSwitch = findMainSwitch(graph);
  const devices = new Map(
    backups.flatMap((part) => devicesToBattery(graph, part).map((each) => [each.id, each] as const)),
  );
  const batteryDevices = [...devices.values()].sort(byDesignation);
  const conditions: ConditionName[] = ['mains'];
  if (backups.length > 0) conditions.push('outage');
  if (backups.length > 0 && mainSwitch) conditions.push('main-off');
  // Every battery must have a handle of its own before one may say that it is isolated.
  const each = backups.every((part) => devicesToBattery(graph, part).length > 0);
  if (backups.length > 0 && mainSwitch && each) conditions.push('isolated');
  const changeovers = [...graph.parts.values()].filter(({ kind }) => kind === 'changeover').sort(byDesignation);
  return { mainSwitch, changeovers, batteryDevices, conditions };
}

const isOpen = ({ moved }: Stance, rest: Settings, part: Part): boolean => (moved[part.id] ?? rest[part.id]) === 'open';

/** The condition in which a stance is: which of the two sources is there, and what the main switch has parted. */
export function conditionOf(handles: Handles, rest: Settings, stance: Stance): ConditionName {
  const { mainSwitch, batteryDevices, conditions } = handles;
  if (stance.supply === 'dead') return 'outage';
  if (!mainSwitch || !isOpen(stance, rest, mainSwitch) || !conditions.includes('main-off')) return 'mains';
  const parted = batteryDevices.length > 0 && batteryDevices.every((part) => isOpen(stance, rest, part));
  return parted && conditions.includes('isolated') ? 'isolated' : 'main-off';
}

/** The stance with some parts put into a position; what then stands at rest is not listed. */
export function withSettings(stance: Stance, rest: Settings, settings: Settings): Stance {
  const moved = Object.entries({ ...stance.moved, ...settings }).filter(([id, setting]) => rest[id] !== setting);
  return { ...stance, moved: Object.fromEntries(moved) };
}

/** The stance in a condition: the supply, the main switch and the battery's devices as it wants them, all else as it is. */
export function inCondition(handles: Handles, rest: Settings, stance: Stance, name: ConditionName): Stance {
  const { mainSwitch, batteryDevices } = handles;
  const settings: Record<string, string> = {};
  if (mainSwitch) settings[mainSwitch.id] = name === 'main-off' || name === 'isolated' ? 'open' : 'closed';
  for (const { id } of batteryDevices) settings[id] = name === 'isolated' ? 'open' : 'closed';
  return withSettings({ ...stance, supply: name === 'outage' ? 'dead' : 'live' }, rest, settings);
}
