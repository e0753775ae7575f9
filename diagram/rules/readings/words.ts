import { byDesignation, listNames } from '../../document/names';
import { KIND_NAME } from '../../document/kinds';
import type { Part } from '../../document/schema';
import type { Context } from '../context';

/** Parts by id, in order of designation. */
export const inOrder = (context: Context, ids: Iterable<string>): Part[] =>
  [...new Set(ids)].map((id) => context.graph.parts.get(id)!).sort(byDesignation);

/** "E1", "E1 and X2", "2 lamps in Map room": the parts as a person would call them, alike ones counted. */
export function sayParts(context: Context, ids: Iterable<string>, most = 6): string {
  const counted = new Map<string, { part: Part; count: number }>();
  for (const part of inOrder(context, ids)) {
    const name = context.name(part);
    const entry = counted.get(name) ?? { part, count: 0 };
    counted.set(name, { ...entry, count: entry.count + 1 });
  }
  const names = [...counted].map(([name, { part, count }]) => {
    if (count === 1) return part.ref ? name : `the ${name}`;
    const kind = KIND_NAME[part.kind];
    return `${count} ${name.replace(kind, plural(kind))}`;
  });
  return listNames(names, most);
}

const plural = (noun: string): string => (noun.endsWith('ch') ? `${noun}es` : noun.endsWith('s') ? noun : `${noun}s`);

/** "Q1" or "the switch in Study". */
export const say = (context: Context, id: string): string => sayParts(context, [id]);

/** "The switch in Study" at the head of a sentence. */
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** "from Q11 to the neutral bar in Hall", "between 2 joints in Study" */
export function sayWire(context: Context, id: string): string {
  const wire = context.document.wires.find((each) => each.id === id)!;
  const known = [wire.from[0], wire.to[0]].filter((part) => context.graph.parts.has(part));
  const ends = [wire.from, wire.to].map(([part]) => (context.graph.parts.has(part) ? say(context, part) : 'nowhere'));
  return ends[0] === ends[1] ? `between ${sayParts(context, known)}` : `from ${ends[0]} to ${ends[1]}`;
}

/** "is" or "are" for a count. */
export const be = (count: number): string => (count === 1 ? 'is' : 'are');
