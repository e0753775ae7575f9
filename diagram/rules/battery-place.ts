import type { PartOf } from '../document/schema';
import { COMMON_PRACTICE, recalled } from './clauses';
import type { Context } from './context';
import { lackOf } from './readings/lacking';
import { changePart } from './readings/remedies';
import { capital, say } from './readings/words';
import type { Remedy, Rule } from './types';

/** "Stand it in Loft": places with air where nobody sleeps. */
const elsewhere = (context: Context, battery: PartOf<'battery'>): Remedy[] =>
  context.document.places
    .filter(({ kind, sleeping, ventilated }) => kind !== 'wet' && !sleeping && (kind === 'outdoor' || ventilated === true))
    .map(({ id, name }) => changePart(`Stand it in ${name}`, battery, { place: id }));

/** A flooded battery where its gas, or its acid, meets people. Outdoors there is air enough. */
export const batteryPlace: Rule = {
  meta: {
    id: 'battery-place',
    severity: 'advice',
    group: 'backup',
    title: 'A flooded battery stands where people sleep or no air moves',
    clauses: [recalled('IEC 62485-2', 'clause 7'), recalled('IEC 60364-5-55', '551.8'), COMMON_PRACTICE],
    lesson:
      'A flooded battery gives off hydrogen while it charges, and a mist of acid with it. In a cupboard the gas ' +
      'gathers until a contact sparks; in a bedroom the mist is breathed all night.',
    remedy: 'Stand it in a ventilated place where nobody sleeps, or fit a sealed battery.',
  },
  *check(context) {
    for (const battery of context.parts('battery')) {
      if (battery.kind !== 'battery' || battery.chemistry !== 'flooded' || battery.place === undefined) continue;
      const place = context.graph.places.get(battery.place);
      if (!place || place.kind === 'outdoor') continue;
      const why = place.sleeping ? 'where people sleep' : place.ventilated === false ? 'which is not ventilated' : null;
      if (why === null) continue;
      yield {
        heading: `${capital(say(context, battery.id))} stands in ${place.name}`,
        message: `A flooded battery gives off hydrogen and a mist of acid while it charges; ${say(context, battery.id)} stands in ${place.name}, ${why}.`,
        parts: [battery.id],
        remedies: [changePart('Fit a sealed battery', battery, { chemistry: 'vrla' }), ...elsewhere(context, battery)],
      };
    }
  },
  *lacks(context) {
    for (const battery of context.parts('battery')) {
      if (battery.kind !== 'battery' || battery.place === undefined) continue;
      const place = context.graph.places.get(battery.place);
      if (battery.chemistry === undefined) yield lackOf(context, battery, 'the chemistry');
      else if (
        battery.chemistry === 'flooded' &&
        place &&
        place.kind !== 'outdoor' &&
        !place.sleeping &&
        place.ventilated === undefined
      )
        yield { parts: [battery.id], what: `whether ${place.name} is ventilated` };
    }
  },
};
