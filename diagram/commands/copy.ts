import { z } from 'zod';
import {
  CableSchema,
  PartSchema,
  PositionSchema,
  WireSchema,
  canonical,
  type Cable,
  type Installation,
  type Part,
  type Position,
  type Wire,
} from '../document/schema';
import { REF_LETTER } from '../document/kinds';
import { diff } from '../document/patch';
import { MODULE } from '../symbols/types';
import { Designations } from './refs';
import { withPlaces } from './place-new';
import type { Command, NewId, Refusal } from './types';

const positions = z.record(z.string(), PositionSchema);

/** What the clipboard carries between windows: parts, the wires between them, their cables and places on the sheet. */
export const ClipSchema = z.strictObject({
  ohmstead: z.literal('clip/1'),
  parts: z.array(PartSchema).min(1).max(2000),
  wires: z.array(WireSchema).max(8000),
  cables: z.array(CableSchema).max(4000),
  overview: positions,
  connections: positions,
});
export type Clip = z.infer<typeof ClipSchema>;

/** Parts with the wires that lie wholly among them. Wires that leave the selection stay behind. */
export function copyParts(doc: Installation, ids: readonly string[]): Clip | null {
  const chosen = new Set(ids);
  const parts = doc.parts.filter((part) => chosen.has(part.id));
  if (parts.length === 0) return null;
  const wires = doc.wires.filter((wire) => chosen.has(wire.from[0]) && chosen.has(wire.to[0]));
  const used = new Set(wires.map((wire) => wire.cable));
  const only = (places: Record<string, Position> | undefined) =>
    Object.fromEntries(Object.entries(places ?? {}).filter(([id]) => chosen.has(id)));
  return {
    ohmstead: 'clip/1',
    parts,
    wires,
    cables: doc.cables.filter((cable) => used.has(cable.id)),
    overview: only(doc.sheet?.overview),
    connections: only(doc.sheet?.connections),
  };
}

/** What stands on the clipboard, or null where it is no piece of a drawing. */
export function readClip(text: string): Clip | null {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    // Any other text may lie on the clipboard: it is simply not ours.
    return null;
  }
  const result = ClipSchema.safeParse(data);
  return result.success ? result.data : null;
}

/** The clip with new ids and designations; nothing in it points outside it. */
function renamed(doc: Installation, clip: Clip, newId: NewId) {
  const ids = new Map<string, string>();
  for (const { id } of [...clip.parts, ...clip.cables]) if (!ids.has(id)) ids.set(id, newId());
  const refs = new Designations(doc.parts);
  const places = new Set(doc.places.map((place) => place.id));
  const part = (old: Part): Part => {
    const fresh = { ...old, id: ids.get(old.id)! };
    if (old.ref) fresh.ref = refs.next(REF_LETTER[old.kind], old.kind === 'socket' ? 21 : undefined);
    if (fresh.place && !places.has(fresh.place)) delete fresh.place;
    if (fresh.kind === 'plug' && fresh.in) {
      const socket = ids.get(fresh.in);
      if (socket) fresh.in = socket;
      else delete fresh.in;
    }
    return fresh;
  };
  const inside = clip.wires.filter((wire) => ids.has(wire.from[0]) && ids.has(wire.to[0]));
  const wires = inside.map((wire): Wire => {
    const { cable, ...rest } = wire;
    const lies = cable && ids.get(cable);
    return {
      ...rest,
      id: newId(),
      from: [ids.get(wire.from[0])!, wire.from[1]],
      to: [ids.get(wire.to[0])!, wire.to[1]],
      ...(lies && { cable: lies }),
    };
  });
  const used = new Set(wires.map((wire) => wire.cable));
  const cables = clip.cables
    .map((cable): Cable => ({ ...cable, id: ids.get(cable.id)! }))
    .filter((cable) => used.has(cable.id));
  return { ids, parts: clip.parts.map(part), wires, cables };
}

/** Parts and the wires among them once more, with new ids and designations, where they are. */
export const cloneParts = (doc: Installation, ids: readonly string[], newId: NewId) => {
  const clip = copyParts(doc, ids);
  return clip ? renamed(doc, clip, newId) : { ids: new Map<string, string>(), parts: [], wires: [], cables: [] };
};

/** A copy of what is held in place is not: it is to be moved to its own. */
const free = ({ locked: _, ...at }: Position): Position => at;

/** Puts a clip on the sheet, beside where it was. */
export function pasteClip(
  doc: Installation,
  clip: Clip,
  newId: NewId,
  word: 'Paste' | 'Duplicate' = 'Paste',
): Command | Refusal {
  const fresh = renamed(doc, clip, newId);
  const shifted = (places: Record<string, Position>, old: Record<string, Position> = {}) => ({
    ...old,
    ...Object.fromEntries(
      Object.entries(places).flatMap(([id, at]) =>
        fresh.ids.has(id)
          ? [[fresh.ids.get(id)!, { ...free(at), x: at.x + 4 * MODULE, y: at.y + 2 * MODULE, pinned: true }]]
          : [],
      ),
    ),
  });
  const next = canonical({
    ...doc,
    parts: [...doc.parts, ...fresh.parts],
    wires: [...doc.wires, ...fresh.wires],
    cables: [...doc.cables, ...fresh.cables],
    sheet: {
      ...doc.sheet,
      overview: shifted(clip.overview, doc.sheet?.overview),
      connections: shifted(clip.connections, doc.sheet?.connections),
    },
  });
  const parts = fresh.parts.map((part) => part.id);
  const names = fresh.parts.slice(0, 3).map((part) => part.ref ?? part.kind);
  return {
    label: `${word} ${names.join(', ')}${parts.length > 3 ? ` and ${parts.length - 3} more` : ''}`,
    patch: withPlaces(doc, diff(doc, next)),
    parts,
  };
}
