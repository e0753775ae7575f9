import { ARRANGEMENTS, type Installation } from '../document/schema';
import { KEPT, touched, type Kept, type Patch } from '../document/patch';

/**
 * Two people on one drawing. A key (`parts:Q1`, `overview:Q1`, `title`) names the smallest thing that a change sets or
 * removes; all judgements here are made key by key, so that one person's work never writes over the other's unseen.
 */

type Side = Record<string, unknown>;
type Item = { id: string };
const LISTS: ReadonlySet<string> = new Set(['places', 'parts', 'wires', 'cables', 'survey', 'plans']);
/** What the sheet keeps by id: positions and bends. */
const isKept = (name: string): name is Kept => (KEPT as readonly string[]).includes(name);

/** `parts:Q1` as its two halves; a field of the document has no second one. */
export function splitKey(key: string): { name: string; id: string | null } {
  const colon = key.indexOf(':');
  return colon < 0 ? { name: key, id: null } : { name: key.slice(0, colon), id: key.slice(colon + 1) };
}

/** What the document holds at a key; undefined where it holds nothing. */
export function valueAt(doc: Installation, key: string): unknown {
  const { name, id } = splitKey(key);
  if (id === null) return doc[name as keyof Installation];
  if (isKept(name)) return doc.sheet?.[name]?.[id];
  return (doc[name as 'parts'] as readonly Item[] | undefined)?.find((item) => item.id === id);
}

/** What a change leaves at a key that it touches; undefined where it removes. */
export function valueIn(patch: Patch, key: string): unknown {
  const { name, id } = splitKey(key);
  const side = (patch.set as Side | undefined)?.[name];
  if (id === null) return side;
  if (isKept(name)) return (side as Record<string, unknown> | undefined)?.[id];
  return (side as readonly Item[] | undefined)?.find((item) => item.id === id);
}

/** The same value, whatever the order of its fields: a document that was read again has them in another order. */
function equal(a: unknown, b: unknown): boolean {
  if (a === b) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  const [left, right] = [a as Record<string, unknown>, b as Record<string, unknown>];
  const keys = Object.keys(left);
  return keys.length === Object.keys(right).length && keys.every((key) => key in right && equal(left[key], right[key]));
}

/** The change without what it does at the given keys. */
export function without(patch: Patch, keys: ReadonlySet<string>): Patch {
  const strip = (side: Side | undefined): Side | undefined => {
    if (!side) return undefined;
    const kept: Side = {};
    for (const [name, value] of Object.entries(side)) {
      if (value === undefined) continue;
      if (Array.isArray(value) && (LISTS.has(name) || isKept(name))) {
        const rest = value.filter(
          (item: string | Item) => !keys.has(`${name}:${typeof item === 'string' ? item : item.id}`),
        );
        if (rest.length > 0) kept[name] = rest;
      } else if (isKept(name)) {
        const rest = Object.entries(value as object).filter(([id]) => !keys.has(`${name}:${id}`));
        if (rest.length > 0) kept[name] = Object.fromEntries(rest);
      } else if (!keys.has(name)) kept[name] = value;
    }
    return Object.keys(kept).length > 0 ? kept : undefined;
  };
  const set = strip(patch.set);
  const remove = strip(patch.remove);
  return { ...(set && { set }), ...(remove && { remove }) } as Patch;
}

/** Ids of the parts that a change leaves wires ending at. */
function partsNeeded(patch: Patch): Set<string> {
  return new Set((patch.set?.wires ?? []).flatMap((wire) => [wire.from[0], wire.to[0]]));
}

/**
 * The keys at which two changes from the same start cannot both stand: what both touch to different ends, and parts that
 * one removes while the other wires them.
 */
export function conflicts(mine: Patch, theirs: Patch): string[] {
  const ours = touched(mine);
  const keys = new Set(
    [...touched(theirs)].filter((key) => ours.has(key) && !equal(valueIn(mine, key), valueIn(theirs, key))),
  );
  const clash = (wiring: Patch, removing: Patch) => {
    const needed = partsNeeded(wiring);
    for (const id of removing.remove?.parts ?? []) if (needed.has(id)) keys.add(`parts:${id}`);
  };
  clash(mine, theirs);
  clash(theirs, mine);
  return [...keys].sort();
}

/**
 * One's own change after somebody decided key by key: at a key of `theirs` the other person's stands, at all other keys
 * mine does. A part of mine that they removed comes back when mine is kept; wires of mine to a part that stays removed go.
 * @param doc the document with my change in it, to bring back what I had
 */
export function settle(
  mine: Patch,
  doc: Installation,
  contested: readonly string[],
  theirs: ReadonlySet<string>,
): Patch {
  const dropped = new Set(contested.filter((key) => theirs.has(key)));
  for (const wire of mine.set?.wires ?? [])
    if (dropped.has(`parts:${wire.from[0]}`) || dropped.has(`parts:${wire.to[0]}`)) dropped.add(`wires:${wire.id}`);
  const rest = without(mine, dropped);
  const own = touched(rest);
  const back = contested.filter((key) => !theirs.has(key) && !own.has(key) && key.startsWith('parts:'));
  const parts = back.flatMap((key) => doc.parts.filter((part) => `parts:${part.id}` === key));
  if (parts.length === 0) return rest;
  return { ...rest, set: { ...rest.set, parts: [...(rest.set?.parts ?? []), ...parts] } };
}

/** Ids that what stays in the document points at: parts by wires and plugs, cables by wires, places by parts. */
function pointedAt(doc: Installation, patch: Patch): { parts: Set<string>; cables: Set<string>; places: Set<string> } {
  const after = <T extends Item>(list: readonly T[], set: readonly T[] = [], remove: readonly string[] = []): T[] => {
    const going = new Set([...remove, ...set.map((item) => item.id)]);
    return [...list.filter((item) => !going.has(item.id)), ...set];
  };
  const found = { parts: new Set<string>(), cables: new Set<string>(), places: new Set<string>() };
  for (const { from, to, cable } of after(doc.wires, patch.set?.wires, patch.remove?.wires)) {
    found.parts.add(from[0]).add(to[0]);
    if (cable !== undefined) found.cables.add(cable);
  }
  for (const part of after(doc.parts, patch.set?.parts, patch.remove?.parts)) {
    if (part.place !== undefined) found.places.add(part.place);
    if (part.kind === 'plug' && part.in !== undefined) found.parts.add(part.in);
  }
  return found;
}

/**
 * The part of an undoing change that takes back only one's own step: keys that somebody has changed since the step stay as
 * they are now, and what somebody has wired or placed since stays with what that hangs from.
 * @param back what would undo the step
 * @param step what the step itself left
 */
export function ownOnly(doc: Installation, back: Patch, step: Patch): Patch {
  const foreign = new Set([...touched(back)].filter((key) => !equal(valueAt(doc, key), valueIn(step, key))));
  const mine = without(back, foreign);
  const held = pointedAt(doc, mine);
  const kept = new Set<string>();
  for (const list of ['parts', 'cables', 'places'] as const)
    for (const id of mine.remove?.[list] ?? [])
      if (held[list].has(id))
        for (const name of list === 'parts' ? ['parts', ...ARRANGEMENTS] : [list]) kept.add(`${name}:${id}`);
  return kept.size === 0 ? mine : without(mine, kept);
}

/**
 * Steps of a history after a change of somebody else: what they left at a key is theirs for good, and no wire of a step
 * comes back to a part or into a cable that they have removed.
 */
export function disown<T extends { step: Patch; back: Patch }>(steps: readonly T[], theirs: Patch): readonly T[] {
  const written = touched(theirs);
  const parts = new Set(theirs.remove?.parts);
  const cables = new Set(theirs.remove?.cables);
  return steps.map((each) => {
    const keys = new Set([...touched(each.back)].filter((key) => written.has(key)));
    for (const { id, from, to, cable } of each.back.set?.wires ?? [])
      if (parts.has(from[0]) || parts.has(to[0]) || (cable !== undefined && cables.has(cable))) keys.add(`wires:${id}`);
    return keys.size === 0 ? each : { ...each, step: without(each.step, keys), back: without(each.back, keys) };
  });
}
