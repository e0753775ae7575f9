import { applyPatch, diff } from '../document/patch';
import type { Installation } from '../document/schema';
import { draftPatch } from '../survey/draft';
import { HOUSE, groupIds } from '../survey/drafting/ids';
import { screwsOf } from './ends';
import { withPlaces } from './place-new';
import type { Command } from './types';

/** The origin of a home: service line, fuse, meter, main switch, rcd and the bars from which ways are drawn. */
export function placeSupply(doc: Installation): Command {
  const bare = { ...doc, survey: [] };
  const drawn = applyPatch(bare, draftPatch(bare, 0));
  const patch = diff(doc, applyPatch({ ...drawn, ...(doc.survey && { survey: doc.survey }) }, {}));
  const bar = groupIds('mains', 1).lineBar;
  const placed = applyPatch(doc, patch);
  return { label: 'Place the supply', patch: withPlaces(doc, patch), next: [bar, screwsOf(placed, bar).free] };
}

/** The service line alone, for who draws the origin piece by piece. */
export function placeSupplyAlone(doc: Installation): Command {
  const place = doc.places.find(({ kind }) => kind === 'intake') ?? {
    id: HOUSE.intake,
    name: 'Intake',
    kind: 'intake' as const,
  };
  const patch = {
    set: {
      parts: [{ id: HOUSE.supply, kind: 'supply' as const, place: place.id }],
      ...(doc.places.includes(place) ? {} : { places: [place] }),
    },
  };
  return { label: 'Place the service line', patch: withPlaces(doc, patch), next: [HOUSE.supply, 'L'] };
}
