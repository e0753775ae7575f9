import { traceFeeds } from '../terminals/feeds';
import type { Installation, Part, PartOf, SurveyRoom } from '../document/schema';
import { dryPlaceId } from './drafting/ids';

/** What the drawing has in a room, in the survey's terms. Lists are in the order of the document. */
export interface Drawn {
  lamps: PartOf<'lamp'>[];
  fans: PartOf<'fan'>[];
  outlets: PartOf<'socket'>[];
  heavy: PartOf<'appliance'>[];
  /** of these, what is fed behind an inverter; kept outlets are counted apart from `outlets`, as in the survey */
  keptLamps: PartOf<'lamp'>[];
  keptFans: PartOf<'fan'>[];
  keptOutlets: PartOf<'socket'>[];
}

const nothing = (): Drawn => ({
  lamps: [],
  fans: [],
  outlets: [],
  heavy: [],
  keptLamps: [],
  keptFans: [],
  keptOutlets: [],
});

function note(drawn: Drawn, part: Part, kept: boolean): void {
  if (part.kind === 'lamp') {
    drawn.lamps.push(part);
    if (kept) drawn.keptLamps.push(part);
  } else if (part.kind === 'fan') {
    drawn.fans.push(part);
    if (kept) drawn.keptFans.push(part);
  } else if (part.kind === 'socket') (kept ? drawn.keptOutlets : drawn.outlets).push(part);
  else if (part.kind === 'appliance') drawn.heavy.push(part);
}

/** What is drawn, by place that has a load or an outlet; the part of a wet room outside its zones counts as the room. */
export function drawnByPlace(doc: Installation): Map<string, Drawn> {
  const feeds = traceFeeds(doc);
  const roomOf = new Map((doc.survey ?? []).map((room: SurveyRoom) => [dryPlaceId(room), room.id]));
  const places = new Map<string, Drawn>();
  for (const part of doc.parts) {
    if (part.place === undefined) continue;
    if (part.kind !== 'lamp' && part.kind !== 'fan' && part.kind !== 'socket' && part.kind !== 'appliance') continue;
    const place = roomOf.get(part.place) ?? part.place;
    const drawn = places.get(place) ?? nothing();
    places.set(place, drawn);
    note(drawn, part, feeds.parts.get(part.id) === 'backup');
  }
  return places;
}

/** What is drawn in a place; nothing where it has no load and no outlet. */
export const drawnIn = (places: ReadonlyMap<string, Drawn>, place: string): Drawn => places.get(place) ?? nothing();
