import { KIND_NAME } from '@/diagram/document/kinds';
import { nameOf } from '@/diagram/document/names';
import { ratingText } from '@/diagram/commands/rating-text';
import { wiresAt } from '@/diagram/commands/ends';
import type { Installation } from '@/diagram/document/schema';
import type { Selection } from './store';

/** What is in hand, as the foot writes it and a screen reader says it. */
export function handWords(doc: Installation, { parts, wires, terminal }: Selection): string {
  if (parts.length > 1) return `${parts.length} parts in hand`;
  const part = doc.parts.find((candidate) => candidate.id === parts[0]);
  if (!part) return wires.length > 0 ? `${wires.length === 1 ? 'A wire' : `${wires.length} cores`} in hand` : '';
  const place = doc.places.find((candidate) => candidate.id === part.place)?.name;
  const said = [nameOf(doc, part), part.ref && KIND_NAME[part.kind], ratingText(part), part.label, place].filter(
    Boolean,
  );
  if (!terminal) return said.join(', ');
  const others = wiresAt(doc, terminal).map((wire) => {
    const [id, mark] = wire.from[0] === terminal[0] && wire.from[1] === terminal[1] ? wire.to : wire.from;
    const other = doc.parts.find((candidate) => candidate.id === id);
    return other ? `${nameOf(doc, other)}.${mark}` : id;
  });
  return `${said.join(', ')}; terminal ${terminal[1]}${others.length > 0 ? `, wired to ${others.slice(0, 3).join(' and ')}` : ', free'}`;
}
