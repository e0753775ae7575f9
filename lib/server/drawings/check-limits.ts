import 'server-only';
import { MAX_PARTS, MAX_PLANS, type Installation } from '@/diagram/document/schema';
import { AppError } from '@/lib/server/errors';

/** How many of each a document may hold: the bounds of its schema, counted without parsing the whole home again. */
const MOST: Record<string, [(doc: Installation) => number, number]> = {
  places: [(doc) => doc.places.length, 500],
  parts: [(doc) => doc.parts.length, MAX_PARTS],
  wires: [(doc) => doc.wires.length, 4 * MAX_PARTS],
  cables: [(doc) => doc.cables.length, MAX_PARTS],
  survey: [(doc) => doc.survey?.length ?? 0, 100],
  'sheet.overview': [(doc) => Object.keys(doc.sheet?.overview ?? {}).length, MAX_PARTS],
  plans: [(doc) => doc.plans?.length ?? 0, MAX_PLANS],
  'sheet.connections': [(doc) => Object.keys(doc.sheet?.connections ?? {}).length, MAX_PARTS],
  'sheet.plan': [(doc) => Object.keys(doc.sheet?.plan ?? {}).length, MAX_PARTS],
};

/**
 * Every item of a change is checked by its schema on the way in; what is left to check afterwards is the whole.
 * @throws AppError invalid, naming the list that is too long
 */
export function checkLimits(document: Installation): void {
  for (const [path, [count, most]] of Object.entries(MOST))
    if (count(document) > most)
      throw new AppError('invalid', 'The drawing would become too large.', { fields: { [path]: `At most ${most}.` } });
}
