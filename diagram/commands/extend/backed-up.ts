import type { End, Installation } from '../../document/schema';
import { USUAL_RUN, USUAL_WATTS } from '../../survey/columns';
import { findGroups, roomiest } from '../../survey/drafting/groups';
import { intoBox, regulatedFan, switchedLamp } from './assemblies';
import { Strokes, sizeFor, sizeWords } from './drawing';
import { boardOf } from './rooms';
import type { At, Recipe } from './types';

/** From anything in a room: a way of its own behind the backup source, into the room's switchboard. */

const LEAST_KINDS = new Set(['switch', 'switch-2way', 'joint', 'socket', 'lamp', 'fan', 'appliance', 'regulator']);

const hasPower = (doc: Installation): boolean => doc.parts.some((part) => part.kind === 'inverter');

/** A box that holds conductors of both sources says so. */
function warn(s: Strokes, place: string, board: string): void {
  const source = s.at.doc.parts.find((part) => part.kind === 'inverter')?.ref ?? 'the backup source';
  s.sketch.notice({ place, board, text: `Two supplies: mains and ${source}. Switch off both, lock off, prove dead.` });
}

export const backedUpWay: Recipe = function* (at) {
  const { place } = at.part;
  if (!place || !LEAST_KINDS.has(at.part.kind) || !hasPower(at.doc)) return;
  const room = at.doc.places.find((candidate) => candidate.id === place);
  const probe = new Strokes(at);
  const group = roomiest(findGroups(at.doc, probe.sketch).filter((candidate) => candidate.backup));
  if (!room || room.kind === 'intake' || !group || group.bars.place === place) return;
  const row = at.doc.survey?.find((candidate) => candidate.id === place);
  const metres = row?.run ?? USUAL_RUN;
  const { ratingA, curve } = at.practice.draft.backup;
  const behind: At = { ...at, backup: true };
  const size = (watts: number, length: number) => sizeFor(behind, 'backup', { ratingA, curve }, watts, length);
  yield {
    id: 'backed-up way',
    what: 'backed-up way to this room',
    detail: `${curve}${ratingA}, ${sizeWords(size(USUAL_WATTS.lamp, metres))}, ${metres} m`,
    reason: 'breaker at the backup bar, run, and what it is to keep on in an outage',
    assembly: true,
    rank: 40,
    values: [
      { id: 'metres', label: 'run', unit: 'm', value: metres, least: 1, most: 200 },
      { id: 'watts', label: 'each lamp', unit: 'W', value: row?.lampWatts || USUAL_WATTS.lamp, least: 1, most: 20_000 },
    ],
    counts: [
      { id: 'lamps', label: 'switch and lamp', count: 1, most: 8 },
      { id: 'fans', label: 'fan, regulator', count: 0, most: 4 },
    ],
    place(choice) {
      const s = new Strokes(at);
      const { lamps = 1, fans = 0, metres: run = metres, watts = USUAL_WATTS.lamp } = choice;
      const board = boardOf(s, place);
      const shared = at.doc.parts.some((part) => part.place === place && part.board === board);
      const breaker = s.part({
        kind: 'mcb',
        label: `${room.name} backup`.slice(0, 80),
        place: group.bars.place,
        board: group.bars.board,
        poles: 1,
        rating: ratingA,
        curve,
        icn: group.bars.icn,
      });
      s.sketch.wire(s.sketch.nextOn(group.bars.lineBar), [breaker, '1'], 'line');
      const wanted = size(lamps * watts + fans * USUAL_WATTS.fan, run);
      const from = {
        line: [breaker, '2'] as End,
        neutral: s.sketch.nextOn(group.bars.neutralBar),
        earth: s.sketch.nextOn(group.bars.earthBar),
      };
      let source = intoBox(s, from, place, board, wanted, s.cable(wanted, run, { fromBoard: true }));
      for (let n = 0; n < Math.max(1, lamps + fans); n++) {
        const loop = n < fans ? regulatedFan(s, source, USUAL_WATTS.fan).loop : switchedLamp(s, source, watts).loop;
        source = { ...source, line: loop, run: undefined };
      }
      if (shared) warn(s, place, board);
      return s.command(`Place a backed-up way to the ${room.name.toLowerCase()}`, source.line);
    },
  };
};
