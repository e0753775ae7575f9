import { diff, type Patch } from '../document/patch';
import { canonical, type Installation, type Part } from '../document/schema';
import { nameOf } from '../document/names';
import type { Command } from './types';

/** The document without some parts and wires, and without all that only they held up. */
export function withoutItems(doc: Installation, parts: ReadonlySet<string>, wires: ReadonlySet<string>): Installation {
  const rest = doc.wires.filter((wire) => !wires.has(wire.id) && !parts.has(wire.from[0]) && !parts.has(wire.to[0]));
  const used = new Set(rest.map((wire) => wire.cable));
  const before = new Set(doc.wires.map((wire) => wire.cable));
  const ids = new Set(doc.parts.map((part) => part.id).filter((id) => !parts.has(id)));
  const wireIds = new Set(rest.map((wire) => wire.id));
  const goes = (at: string) => parts.has(at) || (!ids.has(at) && !wireIds.has(at));
  const unplugged = (part: Part): Part => {
    if (part.kind !== 'plug' || !part.in || !parts.has(part.in)) return part;
    const { in: _socket, ...hanging } = part;
    return hanging;
  };
  const keep = <P>(positions: Record<string, P> | undefined) =>
    positions && Object.fromEntries(Object.entries(positions).filter(([id]) => !parts.has(id)));
  return canonical({
    ...doc,
    parts: doc.parts.filter((part) => !parts.has(part.id)).map(unplugged),
    wires: rest,
    cables: doc.cables.filter((cable) => used.has(cable.id) || !before.has(cable.id)),
    ...(doc.silenced && { silenced: doc.silenced.filter(({ at }) => !goes(at)) }),
    sheet: {
      ...doc.sheet,
      overview: keep(doc.sheet?.overview),
      connections: keep(doc.sheet?.connections),
      plan: keep(doc.sheet?.plan),
      bends: bendsOf(doc, wireIds),
    },
  });
}

/** Bends of the runs that stay. */
const bendsOf = (doc: Installation, wires: ReadonlySet<string>) =>
  doc.sheet?.bends &&
  Object.fromEntries(Object.entries(doc.sheet.bends).filter(([key]) => wires.has(key.slice(key.indexOf(':') + 1))));

/** Takes parts and wires off the drawing: a part's wires go with it, and a cable with its last wire. */
export function deleteSelection(doc: Installation, parts: readonly string[], wires: readonly string[]): Command {
  const patch: Patch = diff(doc, withoutItems(doc, new Set(parts), new Set(wires)));
  const named = doc.parts.filter((part) => parts.includes(part.id)).map((part) => nameOf(doc, part));
  const what = [...named.slice(0, 3), ...(named.length > 3 ? [`${named.length - 3} more`] : [])];
  if (parts.length === 0) what.push(wires.length === 1 ? 'a wire' : `${wires.length} wires`);
  return { label: `Delete ${what.join(', ')}`, patch };
}
