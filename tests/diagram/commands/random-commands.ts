import { bendRun, routeAgain } from '@/diagram/commands/bend-run';
import { copyParts, pasteClip } from '@/diagram/commands/copy';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import { copyRoom } from '@/diagram/commands/copy-room';
import { editCable, editName, editRating, editRatings } from '@/diagram/commands/edit-in-place';
import { marksOf } from '@/diagram/commands/ends';
import { suggest } from '@/diagram/commands/extend/catalogue';
import { joinTerminals } from '@/diagram/commands/join-terminals';
import { moveLoad, waysFor } from '@/diagram/commands/move-load';
import { alignParts, distributeParts, moveParts, placeExactly } from '@/diagram/commands/move-parts';
import { renumber } from '@/diagram/commands/renumber';
import { isRefusal, type Command, type NewId, type Refusal } from '@/diagram/commands/types';
import type { End, Installation } from '@/diagram/document/schema';

/** A small generator of chance with a seed, so that a failure can be run again. */
export function chance(seed: number): (below: number) => number {
  let state = seed >>> 0;
  return (below) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}

const RATINGS = ['B16', 'C20 2P', '9 W', '40 A', '63 A 30 mA A', '2 kW', '12 V 150 Ah'];

/** Some command that a person could give on this drawing; null where chance chose one that is refused. */
export function randomCommand(doc: Installation, pick: (below: number) => number, newId: NewId): Command | null {
  const of = <T>(list: readonly T[]): T | undefined => list[pick(list.length)];
  const part = of(doc.parts);
  const face = pick(2) === 0 ? 'overview' : 'connections';
  if (!part) return null;
  const end = (id: string): End | null => {
    const owner = doc.parts.find((candidate) => candidate.id === id);
    const mark = owner && of(marksOf(doc, owner));
    return mark ? [id, mark] : null;
  };
  const outcome = ((): Command | Refusal | null => {
    switch (pick(20)) {
      case 0:
      case 1:
        return editRating(doc, part.id, of(RATINGS)!);
      case 2:
        return editName(doc, part.id, pick(2) === 0 ? 'ref' : 'label', `n${pick(100)}`);
      case 3: {
        const cable = of(doc.cables);
        return cable ? editCable(doc, cable.id, `3x${of([1.5, 2.5, 4])} ${1 + pick(40)} m`) : null;
      }
      case 4:
      case 5:
        return moveParts(doc, face, [part.id], (pick(9) - 4) * 250, (pick(9) - 4) * 250);
      case 6:
        return alignParts(doc, face, [part.id, of(doc.parts)!.id], 'row');
      case 7: {
        const from = end(part.id);
        const to = end(of(doc.parts)!.id);
        return from && to ? joinTerminals(doc, from, to, newId) : null;
      }
      case 8:
        return deleteSelection(doc, [part.id], []);
      case 9: {
        const wire = of(doc.wires);
        return wire ? deleteSelection(doc, [], [wire.id]) : null;
      }
      case 10: {
        const clip = copyParts(doc, [part.id, of(doc.parts)!.id]);
        return clip && pasteClip(doc, clip, newId, 'Duplicate');
      }
      case 11: {
        const from = end(part.id);
        const line = from && of(suggest(doc, from, { newId }).all);
        return line ? line.place({}) : null;
      }
      case 12: {
        const load = of(doc.parts.filter((candidate) => candidate.kind === 'lamp' || candidate.kind === 'fan'));
        const way = load && of(waysFor(doc, load.id));
        return load && way ? moveLoad(doc, [load.id], way.device, newId) : null;
      }
      case 13:
        return editRatings(doc, doc.parts.filter((each) => each.kind === part.kind).map((each) => each.id), of(RATINGS)!);
      case 14:
        return distributeParts(doc, face, [part.id, of(doc.parts)!.id, of(doc.parts)!.id], pick(2) === 0 ? 'row' : 'column');
      case 15:
        return placeExactly(doc, face, part.id, `${pick(400)}, ${pick(300)}`);
      case 16: {
        // Rooms are few and large: a home that doubled at each turn would be no home for long.
        const place = doc.places.length < 12 ? of(doc.places) : undefined;
        return place ? copyRoom(doc, { place: place.id, name: newId(), feed: pick(2) === 0 ? 'same' : 'new' }, newId) : null;
      }
      case 17: {
        const wire = of(doc.wires);
        // any straight way will do: what is kept is the line, not where the run lay
        const run = wire && { wires: [wire.id], points: [{ x: 0, y: 0 }, { x: 0, y: 5000 }] };
        return run ? bendRun(doc, face, run, 0, pick(200) * 250) : null;
      }
      case 18:
        return routeAgain(doc, face, [of(doc.wires)?.id ?? '']);
      default:
        return renumber(doc);
    }
  })();
  return outcome && !isRefusal(outcome) ? outcome : null;
}
