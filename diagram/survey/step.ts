import type { Patch } from '../document/patch';
import type { Installation, PlaceKindSchema, SurveyRoom } from '../document/schema';
import type { z } from 'zod';
import { roomErrors } from './check';
import { USUAL_WATTS, emptyRoom } from './columns';
import { drawnByPlace, drawnIn, type Drawn } from './drawn';
import { differenceOf, draftWords, type Difference } from './missing';
import { nextOrder } from './parse';

/** How each row of the survey stands to the drawing. */
export type StepState = 'in-step' | 'to-draw' | 'waits' | 'not-drawn' | 'differs' | 'not-in-survey';

export interface Step {
  /** id of the row, or of a place that is drawn and has no row */
  room: string;
  name: string;
  state: StepState;
  /** "in step", "+1 outlet", "waits", "not drawn yet", "1 lamp not in the survey", "drawn, not in the survey" */
  words: string;
  /** null for a place without a row and a row with an error */
  difference: Difference | null;
}

const isNothing = (drawn: Drawn): boolean =>
  drawn.lamps.length + drawn.fans.length + drawn.outlets.length + drawn.heavy.length + drawn.keptOutlets.length === 0;

/** A row that holds nothing is drawn as soon as its place is. */
const holdsNothing = (room: SurveyRoom): boolean =>
  room.lamps + room.fans + room.outlets + room.heavy.length + room.keepOutletWatts === 0;

function stepOf(doc: Installation, room: SurveyRoom, drawn: Drawn): Step {
  const difference = differenceOf(room, drawn);
  const say = (state: StepState, words: string): Step => ({ room: room.id, name: room.name, state, words, difference });
  const placed = doc.places.some(({ id }) => id === room.id);
  if (isNothing(drawn) && (!holdsNothing(room) || !placed)) return say('not-drawn', 'not drawn yet');
  const toDraw = draftWords(difference);
  if (toDraw.length > 0) return say('to-draw', toDraw.join(', '));
  if (difference.extra.length > 0) return say('differs', `${difference.extra.join(', ')} not in the survey`);
  if (difference.watts.length > 0) return say('differs', `drawn with ${difference.watts.join(', ')}`);
  return say('in-step', 'in step');
}

/** Rows in the order of the table, then places that have loads or outlets and no row. */
export function surveySteps(doc: Installation): Step[] {
  const survey = doc.survey ?? [];
  const places = drawnByPlace(doc);
  const wrong = new Set(
    roomErrors(survey, { practice: doc.practice, supply: doc.supply, hoursWanted: 0 }).map(({ room }) => room),
  );
  const rows = survey.map((room): Step => {
    if (wrong.has(room.id)) return { room: room.id, name: room.name, state: 'waits', words: 'waits', difference: null };
    return stepOf(doc, room, drawnIn(places, room.id));
  });
  const known = new Set(survey.map(({ id }) => id));
  const others = doc.places
    .filter(({ id }) => places.has(id) && !known.has(id))
    .map(({ id, name }): Step => ({
      room: id,
      name,
      state: 'not-in-survey',
      words: 'drawn, not in the survey',
      difference: null,
    }));
  return [...rows, ...others];
}

/** How many rows a draft would change: what the draft button says. */
export const stepsToDraw = (steps: readonly Step[]): Step[] =>
  steps.filter(({ state }) => state === 'to-draw' || state === 'not-drawn');

/** The watts that most of them have; the first of those where several do. */
function usualWatts(parts: readonly { watts?: number }[], otherwise: number): number {
  const counts = new Map<number, number>();
  for (const { watts } of parts) if (watts !== undefined) counts.set(watts, (counts.get(watts) ?? 0) + 1);
  let best = otherwise;
  let most = 0;
  for (const [watts, count] of counts) {
    if (count <= most) continue;
    most = count;
    best = watts;
  }
  return best;
}

const kindOf = (kind: z.infer<typeof PlaceKindSchema>, sleeping: boolean | undefined): SurveyRoom['kind'] =>
  kind === 'room' && sleeping ? 'sleeping' : kind;

/**
 * Writes what is drawn in a room into its row of the survey; a place without a row gets one. What only the survey knows
 * (hours, the length of the run) stays.
 * @param place id of the place
 * @throws RangeError where the document has no such place
 */
export function takeIntoSurvey(doc: Installation, place: string): Patch {
  const drawn = drawnIn(drawnByPlace(doc), place);
  const found = doc.places.find(({ id }) => id === place);
  if (!found) throw new RangeError(`the document has no place ${place}`);
  const survey = doc.survey ?? [];
  const row = survey.find(({ id }) => id === place) ?? {
    ...emptyRoom(place, nextOrder(survey)),
    name: found.name,
    kind: kindOf(found.kind, found.sleeping),
  };
  const taken: SurveyRoom = {
    ...row,
    lamps: Math.min(60, drawn.lamps.length),
    lampWatts: Math.min(2000, usualWatts(drawn.lamps, row.lampWatts || USUAL_WATTS.lamp)),
    fans: Math.min(20, drawn.fans.length),
    fanWatts: Math.min(1000, usualWatts(drawn.fans, row.fanWatts || USUAL_WATTS.fan)),
    outlets: Math.min(40, drawn.outlets.length),
    heavy: drawn.heavy.slice(0, 8).map(({ label, watts }) => ({
      what: (label?.trim() || 'appliance').slice(0, 40),
      watts: Math.min(20_000, watts || 1),
    })),
    keepLamps: Math.min(60, drawn.keptLamps.length),
    keepFans: Math.min(20, drawn.keptFans.length),
    keepOutletWatts: Math.min(
      3000,
      drawn.keptOutlets.reduce((sum, { load }) => sum + (load ?? 0), 0),
    ),
  };
  return { set: { survey: [taken] } };
}
