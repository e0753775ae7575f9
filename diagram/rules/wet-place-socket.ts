import { practices } from '../practices';
import type { Place } from '../document/schema';
import { recalled } from './clauses';
import type { Context } from './context';
import type { Remedy, Rule } from './types';
import { capital, say } from './readings/words';
import { changePart } from './readings/remedies';
import type { PartOf } from '../document/schema';

/** Out of the zones, in a place of its own beside the wet one. */
function outside({ graph }: Context, socket: PartOf<'socket'>, wet: Place): Remedy[] {
  const id = `${wet.id}.dry`;
  const known = graph.places.get(id);
  if (known && (known.kind === 'wet' || known.zone !== undefined)) return [];
  const { patch } = changePart('', socket, { place: id });
  const place: Place = known ?? { id, name: `${wet.name.slice(0, 55)}, outside the zones`, kind: 'room' };
  return [{ label: 'Move it out of the zones', patch: { set: { ...patch.set, places: [place] } } }];
}

/** An outlet in a wet place; a shaver outlet with separated winding is let stand. */
export const wetPlaceSocket: Rule = {
  meta: {
    id: 'wet-place-socket',
    severity: 'danger',
    group: 'shock',
    title: 'An outlet stands in a wet place',
    clauses: [recalled('IEC 60364-7-701', '701.512.3'), recalled('BS 7671', '701.512.3')],
    lesson:
      'Wet skin lets ten times the current through, and a hair dryer falls into the bath with its lead. An rcd ' +
      'shortens the shock, it does not prevent it: an outlet belongs out of reach of the water.',
    remedy: 'Place the outlet outside the zones, at the distance that the local code asks for, or fit a shaver outlet.',
  },
  *check(context) {
    const { sockets, wetSocketDistanceM } = practices[context.practice];
    const shavers = new Set(sockets.filter(({ shaver }) => shaver).map(({ id }) => id));
    for (const socket of context.parts('socket')) {
      if (
        socket.kind !== 'socket' ||
        socket.place === undefined ||
        (socket.pattern !== undefined && shavers.has(socket.pattern))
      )
        continue;
      const place = context.graph.places.get(socket.place);
      if (place?.kind !== 'wet' && place?.zone === undefined) continue;
      const where = place.zone === undefined ? place.name : `zone ${place.zone} of ${place.name}`;
      yield {
        heading: `${capital(say(context, socket.id))} stands in a wet place`,
        message: `${capital(say(context, socket.id))} is in ${where}. No outlet is allowed within ${wetSocketDistanceM.value} m of the bath or shower.`,
        parts: [socket.id],
        remedies: outside(context, socket, place),
      };
    }
  },
};
