import { applyPatch, diff, isEmptyPatch, type Patch } from '../document/patch';
import {
  emptyDocument,
  type Installation,
  type Position,
  type PracticeId,
  type Supply,
  type SurveyRoom,
} from '../document/schema';
import { placeAll } from '../layout/place';
import { practices } from '../practices';
import { drawnByPlace, drawnIn } from './drawn';
import { draftHome } from './drafting/draft-home';
import { extendHome } from './drafting/extend-home';
import { wholeRoom, type Wish } from './drafting/wish';
import { Sketch } from './drafting/sketch';

export interface DraftOptions {
  title: string;
  practice: PracticeId;
  supply: Supply;
  /** h on battery that the job asks for */
  hoursWanted: number;
}

/** A room of which something stands on the sheet already is left to a later draft: its supply comes first. */
function untouched(doc: Installation): (room: SurveyRoom) => Wish {
  const places = drawnByPlace(doc);
  const nothing = { lamps: [], fans: [], outlets: [], heavy: [], keptLamps: [], keptFans: [], keptOutlet: false };
  return (room) => {
    const { lamps, fans, outlets, heavy, keptOutlets } = drawnIn(places, room.id);
    const drawn = [lamps, fans, outlets, heavy, keptOutlets].some((list) => list.length > 0);
    return drawn ? { room, ...nothing } : wholeRoom(room);
  };
}

/** Positions of parts that are gone from the drawing are dropped. */
function withoutStrays(doc: Installation): Installation {
  const ids = new Set(doc.parts.map(({ id }) => id));
  const kept = <P extends Position>(positions: Record<string, P> = {}) =>
    Object.fromEntries(Object.entries(positions).filter(([id]) => ids.has(id)));
  const { overview, connections, plan } = doc.sheet ?? {};
  return { ...doc, sheet: { ...doc.sheet, overview: kept(overview), connections: kept(connections), plan: kept(plan) } };
}

/** The document with what its survey asks for drawn: a whole home where it has no supply, else what is missing. */
function drafted(doc: Installation, hoursWanted: number): Installation {
  const options = { practice: doc.practice, supply: doc.supply, hoursWanted };
  const sketch = new Sketch(doc, practices[doc.practice]);
  if (doc.parts.some(({ kind }) => kind === 'supply')) extendHome(sketch, doc, options);
  else draftHome(sketch, doc, options, untouched(doc));
  const drawn = sketch.finish();
  if (isEmptyPatch(diff(doc, drawn))) return doc;
  const kept = withoutStrays(drawn);
  return applyPatch(kept, placeAll(kept));
}

/**
 * A complete drawing of what the rooms hold: origin, board, ways, the backup source with its own ways, a switchboard a room,
 * every core wired, cables sized. Rows with errors are left out. The same rooms give the same bytes.
 */
export function draftDocument(rooms: readonly SurveyRoom[], options: DraftOptions): Installation {
  const { title, practice, supply, hoursWanted } = options;
  const survey = [...rooms].sort((a, b) => a.order - b.order);
  return drafted({ ...emptyDocument(title, practice, supply), survey }, hoursWanted);
}

/**
 * The change that draws what the survey of a document has and its drawing has not; empty where they are in step. What a
 * person moved or changed by hand stays; rows with errors stay as drawn.
 * @param hoursWanted h on battery that the job asks for; a room may ask for more
 */
export function draftPatch(doc: Installation, hoursWanted = 0): Patch {
  return diff(doc, drafted(doc, hoursWanted));
}
