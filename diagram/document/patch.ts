import { z } from 'zod';
import {
  ARRANGEMENTS,
  BendKeySchema,
  BendsSchema,
  CableSchema,
  FloorPlanSchema,
  IdSchema,
  NoticeSchema,
  PartSchema,
  PlaceSchema,
  PlanPositionSchema,
  PositionSchema,
  PracticeIdSchema,
  SilenceSchema,
  SupplySchema,
  SurveyRoomSchema,
  WireSchema,
  canonical,
  type Arrangement,
  type Installation,
} from './schema';

/**
 * A change of a document, as data: sets and removes by id, never by array position. Every command yields one; it is what
 * the outbox keeps, the server stores and the other window applies. Its inverse is computed, not written by hand.
 */

const LISTS = ['places', 'parts', 'wires', 'cables', 'survey', 'plans'] as const;
type List = (typeof LISTS)[number];
const FIELDS = ['title', 'practice', 'supply', 'ambient', 'notices', 'silenced'] as const;

const listOf = <T extends z.ZodType>(item: T) => z.array(item).min(1).optional();
const ids = z.array(IdSchema).min(1).optional();

export const PatchSchema = z.strictObject({
  set: z
    .strictObject({
      places: listOf(PlaceSchema),
      parts: listOf(PartSchema),
      wires: listOf(WireSchema),
      cables: listOf(CableSchema),
      survey: listOf(SurveyRoomSchema),
      plans: listOf(FloorPlanSchema),
      overview: z.record(IdSchema, PositionSchema).optional(),
      connections: z.record(IdSchema, PositionSchema).optional(),
      plan: z.record(IdSchema, PlanPositionSchema).optional(),
      bends: z.record(BendKeySchema, BendsSchema).optional(),
      title: z.string().max(120).optional(),
      practice: PracticeIdSchema.optional(),
      supply: SupplySchema.optional(),
      ambient: z.number().min(-40).max(80).optional(),
      notices: z.array(NoticeSchema).max(200).optional(),
      silenced: z.array(SilenceSchema).max(500).optional(),
    })
    .optional(),
  remove: z
    .strictObject({
      places: ids,
      parts: ids,
      wires: ids,
      cables: ids,
      survey: ids,
      plans: ids,
      overview: ids,
      connections: ids,
      plan: ids,
      bends: z.array(BendKeySchema).min(1).optional(),
      notices: z.literal(true).optional(),
      silenced: z.literal(true).optional(),
    })
    .optional(),
});
export type Patch = z.infer<typeof PatchSchema>;

type Item = { id: string };
const listIn = (doc: Installation, list: List): readonly Item[] => (doc[list] as readonly Item[] | undefined) ?? [];
/** What the sheet keeps by id: positions on each face, and the bends set by hand. */
export const KEPT = [...ARRANGEMENTS, 'bends'] as const;
export type Kept = Arrangement | 'bends';
const keptIn = (doc: Installation, kept: Kept): Record<string, unknown> => doc.sheet?.[kept] ?? {};

function mergeList(items: readonly Item[], set: readonly Item[] = [], remove: readonly string[] = []): Item[] {
  const merged = new Map(items.map((item) => [item.id, item]));
  for (const id of remove) merged.delete(id);
  for (const item of set) merged.set(item.id, item);
  return [...merged.values()];
}

/**
 * The document after a change, in canonical order; unchanged items are the same objects. Removing what is not there is
 * no error, so that a change can be replayed after another person's.
 */
export function applyPatch(doc: Installation, patch: Patch): Installation {
  const { set = {}, remove = {} } = patch;
  const next: Installation = { ...doc, sheet: { ...doc.sheet } };
  for (const field of FIELDS) if (set[field] !== undefined) Object.assign(next, { [field]: set[field] });
  if (remove.notices) delete next.notices;
  if (remove.silenced) delete next.silenced;
  for (const list of LISTS)
    if (set[list] || remove[list]) Object.assign(next, { [list]: mergeList(listIn(doc, list), set[list], remove[list]) });
  for (const kept of KEPT) {
    if (!set[kept] && !remove[kept]) continue;
    const items = { ...keptIn(doc, kept) };
    for (const id of remove[kept] ?? []) delete items[id];
    Object.assign(next.sheet!, { [kept]: { ...items, ...set[kept] } });
  }
  return canonical(next);
}

const same = (a: unknown, b: unknown): boolean => a === b || JSON.stringify(a) === JSON.stringify(b);

/** The change that turns `from` into `to`; empty when nothing differs. `from` and `to` are in canonical order. */
export function diff(from: Installation, to: Installation): Patch {
  const set: NonNullable<Patch['set']> = {};
  const remove: NonNullable<Patch['remove']> = {};
  for (const field of FIELDS) {
    if (same(from[field], to[field])) continue;
    if (to[field] === undefined) Object.assign(remove, { [field]: true });
    else Object.assign(set, { [field]: to[field] });
  }
  for (const list of LISTS) {
    const before = new Map(listIn(from, list).map((item) => [item.id, item]));
    const after = new Map(listIn(to, list).map((item) => [item.id, item]));
    const changed = [...after.values()].filter((item) => !same(before.get(item.id), item));
    const gone = [...before.keys()].filter((id) => !after.has(id));
    if (changed.length > 0) Object.assign(set, { [list]: changed });
    if (gone.length > 0) remove[list] = gone;
  }
  for (const kept of KEPT) {
    const before = keptIn(from, kept);
    const after = keptIn(to, kept);
    const changed = Object.keys(after).filter((id) => !same(before[id], after[id]));
    const gone = Object.keys(before).filter((id) => !after[id]);
    if (changed.length > 0) Object.assign(set, { [kept]: Object.fromEntries(changed.map((id) => [id, after[id]!])) });
    if (gone.length > 0) remove[kept] = gone;
  }
  return {
    ...(Object.keys(set).length > 0 && { set }),
    ...(Object.keys(remove).length > 0 && { remove }),
  };
}

export const isEmptyPatch = (patch: Patch): boolean => !patch.set && !patch.remove;

/** The change that takes `patch` back, for a document that is `doc` before it. */
export function invert(doc: Installation, patch: Patch): Patch {
  return diff(applyPatch(doc, patch), doc);
}

/** What a change touches, as `parts:Q1`, `title`, `overview:Q1` ...: two changes that share no key can both stand. */
export function touched(patch: Patch): Set<string> {
  const keys = new Set<string>();
  for (const side of [patch.set, patch.remove]) {
    for (const [name, value] of Object.entries(side ?? {})) {
      if (value === undefined) continue;
      if ((FIELDS as readonly string[]).includes(name)) keys.add(name);
      else if (Array.isArray(value)) for (const item of value) keys.add(`${name}:${typeof item === 'string' ? item : (item as Item).id}`);
      else for (const id of Object.keys(value)) keys.add(`${name}:${id}`);
    }
  }
  return keys;
}
