import type { Fault } from '@/diagram/circuit/fault-types';
import { faultOf, faultText } from '@/diagram/rehearsal/fault-places';
import type { Stance } from '@/diagram/rehearsal/stance';

/**
 * A rehearsal as the address writes it, so that it survives a reload and can be shown to others. Nothing of it is stored
 * in the drawing.
 */
export interface Address {
  /** null: as it stands before anybody has touched it */
  stance: Stance | null;
  /** laid over the stance once the home is known: what a link from a finding asks for */
  condition: string | null;
  faults: readonly Fault[];
  /** index of the station shown; null: where a walk begins */
  station: number | null;
  hand: string | null;
  /** id of the place whose connections are shown; null: the overview */
  place: string | null;
}

const CONDITION = /^(mains|outage|main-off|isolated)(\/[A0B]{1,20})?$/;
const ID = /^[A-Za-z0-9_.:-]{1,64}$/;
const idIn = (text: string | null): string | null => (text !== null && ID.test(text) ? text : null);
const listIn = (text: string | null): string[] => (text ?? '').split(',').filter(Boolean);

/** Reads an address; what is foreign in it is left out. */
export function readAddress(query: URLSearchParams): Address {
  const moved = listIn(query.get('set')).flatMap((text): [string, string][] => {
    const [id, setting] = text.split('~');
    return id && setting && ID.test(id) ? [[id, setting]] : [];
  });
  const wanted = query.get('condition') ?? '';
  const station = Number(query.get('step') ?? NaN);
  const supply = query.get('supply') === 'dead' ? 'dead' : 'live';
  return {
    stance: moved.length > 0 || supply === 'dead' ? { supply, moved: Object.fromEntries(moved) } : null,
    condition: CONDITION.test(wanted) ? wanted : null,
    faults: listIn(query.get('fault')).flatMap((text) => faultOf(text) ?? []),
    station: Number.isInteger(station) && station > 0 ? station - 1 : null,
    hand: idIn(query.get('hand')),
    place: idIn(query.get('place')),
  };
}

/** The query of a rehearsal; empty for a home as it stands. */
export function writeAddress({ stance, faults, station, hand, place }: Omit<Address, 'condition'>): string {
  const parts: string[] = [];
  const put = (key: string, value: string) =>
    parts.push(`${key}=${encodeURIComponent(value).replaceAll('%2C', ',').replaceAll('%3A', ':')}`);
  if (stance?.supply === 'dead') put('supply', 'dead');
  const moved = Object.entries(stance?.moved ?? {}).map(([id, setting]) => `${id}~${setting}`);
  if (moved.length > 0) put('set', moved.sort().join(','));
  if (faults.length > 0) put('fault', faults.map(faultText).join(','));
  if (faults.length > 0 && station !== null) put('step', String(station + 1));
  if (hand !== null) put('hand', hand);
  if (place !== null) put('place', place);
  return parts.join('&');
}

/** The rehearsal sheet of a job with a condition and faults put in: where a finding's "Rehearse it" leads. */
export function rehearsalHref(jobId: string, faults: readonly Fault[], condition?: string): string {
  const at = condition ? `condition=${encodeURIComponent(condition)}&` : '';
  return `/jobs/${jobId}/rehearsal?${at}${writeAddress({ stance: null, faults, station: null, hand: null, place: null })}`;
}
