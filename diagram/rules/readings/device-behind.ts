import type { Source } from '../../circuit/conditions';
import type { Part } from '../../document/schema';
import { practices } from '../../practices';
import type { Context } from '../context';
import type { Remedy } from '../types';
import { freeRef, newPartId, putBehind } from './put-in';

/** A, a service fuse where nothing else says how large the service is: the largest of the practices' drafts */
const SERVICE_A = 63;

/** A fuse at the head of the service, or a two-pole breaker at the output of an inverter. */
export function deviceBehind(context: Context, { part, kind }: Source): Remedy[] {
  const common = { ...(part.place !== undefined && { place: part.place }) };
  if (kind === 'mains') {
    const main = context.mainSwitch;
    const rating = main && 'rating' in main && main.rating !== undefined ? main.rating : SERVICE_A;
    const fuse: Part = {
      id: newPartId(context, 'service'),
      kind: 'fuse',
      ref: freeRef(context, 'F'),
      ...common,
      rating,
      standard: 'gG',
    };
    return putBehind(context, `Put a service fuse of ${rating} A before the meter`, fuse, [
      { at: [part.id, 'L'], into: '1', out: '2', role: 'line' },
    ]);
  }
  if (part.kind !== 'inverter' || part.va === undefined) return [];
  const full = part.va / context.document.supply.voltage;
  const rating = practices[context.practice].breakerRatingsA.value.find((size) => size >= full);
  if (rating === undefined) return [];
  const mcb: Part = {
    id: newPartId(context, 'output'),
    kind: 'mcb',
    ref: freeRef(context, 'Q'),
    label: 'Backup output',
    ...common,
    poles: 2,
    rating,
    curve: 'C',
    icn: 6000,
  };
  return putBehind(context, `Put a two-pole breaker of ${rating} A at its output`, mcb, [
    { at: [part.id, 'out.L'], into: '1', out: '2', role: 'line' },
    { at: [part.id, 'out.N'], into: '3', out: '4', role: 'neutral' },
  ]);
}
