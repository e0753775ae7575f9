import type { SurveyRoom } from '../../document/schema';
import { isBackup, type WayPlan } from './way-plan';

/** Ids of drafted things: readable, and the same whenever the same room is drafted. */

const LONGEST = 36;

/** FNV-1a, 32 bit: a short stand-in for the end of an id that is too long to carry a suffix. */
function shortHash(text: string): string {
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193) >>> 0;
  return hash.toString(36);
}

/** What the ids of everything in a room begin with. */
export const roomKey = ({ id }: Pick<SurveyRoom, 'id'>): string =>
  id.length <= LONGEST ? id : `${id.slice(0, 24)}-${shortHash(id)}`;

/** The place in which the outlets of a wet room stand: beyond its zones. */
export const dryPlaceId = (room: Pick<SurveyRoom, 'id'>): string => `${roomKey(room)}.dry`;

export const wayKey = (way: Pick<WayPlan, 'kind' | 'number'>): string => `${way.kind}${way.number}`;
export const breakerId = (way: Pick<WayPlan, 'kind' | 'number' | 'segments'>): string =>
  `${roomKey(way.segments[0]!.room)}.way-${wayKey(way)}`;

/** Ids of the parts of the house that belong to no room. */
export const HOUSE = {
  intake: 'house.intake',
  backupPlace: 'house.backup',
  supply: 'supply',
  serviceFuse: 'service-fuse',
  meter: 'meter',
  mainSwitch: 'main-switch',
  mainRcd: 'main-rcd',
  electrode: 'electrode',
  bond: 'main-bond',
  spd: 'surge-arrester',
  earthBar: 'earth-bar',
  lineBar: 'main-line-bar',
  neutralBar: 'main-neutral-bar',
  feedRcd: 'inverter-feed-rcd',
  feed: 'inverter-feed',
  inverter: 'inverter',
  battery: 'battery',
  batteryFuse: 'battery-fuse',
  output: 'inverter-output',
  outputLine: 'output-line',
  outputNeutral: 'output-neutral',
} as const;

/** Ids of the nth group of ways behind one rcd. */
export function groupIds(side: 'mains' | 'backup', n: number): { rcd: string; lineBar: string; neutralBar: string } {
  const key = side === 'mains' ? `rcd${n}` : `backup-rcd${n}`;
  return { rcd: key, lineBar: `${key}.line-bar`, neutralBar: `${key}.neutral-bar` };
}

export const sideOf = (way: Pick<WayPlan, 'kind'>): 'mains' | 'backup' => (isBackup(way) ? 'backup' : 'mains');
