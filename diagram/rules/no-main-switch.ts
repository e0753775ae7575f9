import type { Part } from '../document/schema';
import { recalled, seen } from './clauses';
import type { Context } from './context';
import { commanders } from './readings/command';
import { figuresOf, onMains } from './readings/figures';
import { freeRef, newPartId, putBehind } from './readings/put-in';
import type { Remedy, Rule } from './types';

/** A two-pole switch right behind the meter, rated as the service. */
function mainSwitchBehind(context: Context, meter: Part): Remedy[] {
  const ratings = context.parts('fuse').flatMap((fuse) => ('rating' in fuse && fuse.rating !== undefined ? [fuse.rating] : []));
  const own = 'rating' in meter ? meter.rating : undefined;
  const rating = own ?? (ratings.length > 0 ? Math.max(...ratings) : undefined);
  const [line, neutral] = meter.kind === 'meter' ? ['4', '3'] : ['L', 'N'];
  const isolator: Part = {
    id: newPartId(context, 'main'),
    kind: 'isolator',
    ref: freeRef(context, 'Q'),
    label: 'Main switch',
    ...(meter.place !== undefined && { place: meter.place }),
    poles: 2,
    ...(rating !== undefined && { rating }),
  };
  return putBehind(context, 'Put a two-pole main switch behind the meter', isolator, [
    { at: [meter.id, line!], into: '1', out: '2', role: 'line' },
    { at: [meter.id, neutral!], into: '3', out: '4', role: 'neutral' },
  ]);
}

/** No device by which the whole home is made dead at once. */
export const noMainSwitch: Rule = {
  meta: {
    id: 'no-main-switch',
    severity: 'defect',
    group: 'overload',
    title: 'Nothing switches the whole home off',
    clauses: [seen('BS 7671', '462.1.201'), recalled('IEC 60364-4-46', '462.1')],
    lesson:
      'Somebody who smells burning must be able to make the home dead with one hand and without a key. A row of ' +
      'breakers is no main switch: one is always forgotten, and the fuse before the meter belongs to the ' +
      'supplier.',
    remedy: 'Put a two-pole main switch behind the meter, before anything branches off.',
  },
  *check(context) {
    const fed = figuresOf(context).drawn.filter(({ source }) => source?.kind === 'mains');
    if (fed.length === 0 || commanders(context).length > 0) return;
    const meter = context.parts('meter')[0] ?? context.parts('supply')[0];
    yield {
      heading: 'There is no main switch',
      message:
        'No one switch, breaker or rcd lies before everything that the mains feed: the home cannot be made dead in one action.',
      parts: meter ? [meter.id] : [],
      conditions: onMains(context),
      get remedies() {
        return meter ? mainSwitchBehind(context, meter) : [];
      },
    };
  },
};
