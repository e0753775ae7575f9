import type { End, Kind } from '../../document/schema';
import { LENGTH, POWER_FACTOR, REGULATOR_RATINGS, START, ratingFor } from '../../survey/drafting/assumptions';
import { USUAL_WATTS } from '../../survey/columns';
import { companionsOf } from '../companions';
import { endKey } from '../walk';
import { Strokes, sizeHere, sizeWords } from './drawing';
import type { At, Recipe } from './types';

/** What is hung behind a control switch: the load that it works. */

const LOADS: ReadonlySet<Kind> = new Set(['lamp', 'fan']);

const isSwitchedEnd = (at: At): boolean => {
  if (at.part.kind === 'switch' || at.part.kind === 'regulator' || at.part.kind === 'switch-2pole')
    return at.mark === '2';
  if (at.part.kind === 'switch-2way') return at.mark === 'C' && at.switched;
  return (
    (LOADS.has(at.part.kind) && at.mark === 'L' && at.wires > 0) ||
    (at.part.kind === 'joint' && at.switched && at.conductor === 'L')
  );
};

/** The neutral and earth of a switched line are those of the line before the switch; a load hands its own on. */
function companions(at: At): { N: End | null; E: End | null } {
  if (LOADS.has(at.part.kind)) return { N: [at.part.id, 'N'], E: [at.part.id, 'E'] };
  for (let end: End | null = at.end; end; end = at.walk.get(endKey(end))?.from ?? null) {
    const step = at.walk.get(endKey(end));
    if (!step?.switched) return companionsOf(at.doc, at.walk, end);
  }
  return { N: at.feed.N, E: at.feed.E };
}

interface Load {
  kind: 'lamp' | 'fan' | 'appliance';
  what: string;
  watts: number;
  regulator?: boolean;
  reason: string;
}

function loadsFor(at: At): Load[] {
  const lamp: Load = { kind: 'lamp', what: 'lamp', watts: USUAL_WATTS.lamp, reason: 'the lamp this switch works' };
  const fan: Load = { kind: 'fan', what: 'fan', watts: USUAL_WATTS.fan, reason: 'a regulator stands before it' };
  if (at.part.kind === 'regulator') return [fan];
  if (at.part.kind === 'fan') return [];
  if (at.part.kind === 'switch-2pole')
    return [{ kind: 'appliance', what: 'appliance', watts: 2000, reason: 'the appliance this switch isolates' }];
  if (at.part.kind === 'lamp' || at.part.kind === 'joint')
    return [{ ...lamp, what: 'one more lamp', reason: 'on the same switch' }];
  return [lamp, { ...fan, what: 'fan with regulator', regulator: true, reason: 'the regulator follows the switch' }];
}

export const loadsOfSwitch: Recipe = function* (at) {
  if (!isSwitchedEnd(at)) return;
  const { N, E } = companions(at);
  if (!N) return;
  let rank = 10;
  for (const load of loadsFor(at)) {
    const size = sizeHere(at, 'lighting');
    const length =
      at.part.kind === 'lamp'
        ? LENGTH.pointToPoint
        : load.kind === 'appliance'
          ? LENGTH.switchToAppliance
          : LENGTH.boxToPoint;
    yield {
      id: `load ${load.what}`,
      what: load.what,
      detail: `${sizeWords(size)}, ${length} m`,
      reason: load.reason,
      assembly: load.regulator === true,
      rank: rank++,
      values: [
        { id: 'watts', label: 'load', unit: 'W', value: load.watts, least: 1, most: 20_000 },
        { id: 'metres', label: 'run', unit: 'm', value: length, least: 1, most: 200 },
      ],
      counts: [],
      place(choice) {
        const s = new Strokes(at);
        const watts = choice.watts ?? load.watts;
        const cable = s.cable(size, choice.metres ?? length);
        let line = s.tap(at.end);
        if (load.regulator) {
          const regulator = s.part({
            kind: 'regulator',
            rating: ratingFor(watts / at.doc.supply.voltage, REGULATOR_RATINGS),
          });
          s.sketch.wire(line, [regulator, '1'], 'switched');
          line = [regulator, '2'];
        }
        const id = s.part({
          kind: load.kind,
          board: undefined,
          watts,
          pf: load.kind === 'appliance' ? POWER_FACTOR.heater : POWER_FACTOR[load.kind],
          ...(load.kind === 'fan' && { surge: START.fan }),
          class: 1,
          fixed: true,
        });
        s.sketch.wire(line, [id, 'L'], 'switched', cable);
        s.sketch.wire(at.part.kind === 'switch-2pole' ? [at.part.id, '4'] : s.tap(N), [id, 'N'], 'neutral', cable);
        if (E) s.sketch.wire(s.tap(E), [id, 'E'], 'earth', cable);
        return s.command(`Place ${load.what}`, [id, 'L']);
      },
    };
  }
};

/** From one two-way switch to the other: two strappers, and the lamp behind it. */
export const otherTwoWay: Recipe = function* (at) {
  const strap = at.part.kind === 'switch-2way' && (at.mark === '1' || at.mark === '2');
  if (!strap || at.wires > 0) return;
  const { N, E } = companions(at);
  if (!N) return;
  const size = sizeHere(at, 'lighting');
  yield {
    id: 'other two-way',
    what: 'the other two-way switch and its lamp',
    detail: `${sizeWords(size)}, ${LENGTH.roomToRoom} m`,
    reason: 'two strappers join the pair',
    assembly: true,
    rank: 10,
    values: [{ id: 'metres', label: 'strappers', unit: 'm', value: LENGTH.roomToRoom, least: 1, most: 200 }],
    counts: [],
    place(choice) {
      const s = new Strokes(at);
      const box = s.sketch.nextRef('X', 11);
      const far = s.part({ kind: 'switch-2way', board: box, rating: at.practice.draft.switchA, state: '1' });
      const straps = s.cable(size, choice.metres ?? LENGTH.roomToRoom);
      for (const mark of ['1', '2']) s.sketch.wire([at.part.id, mark], [far, mark], 'strapper', straps);
      const cable = s.cable(size, LENGTH.boxToPoint);
      const lamp = s.part({
        kind: 'lamp',
        board: undefined,
        watts: USUAL_WATTS.lamp,
        pf: POWER_FACTOR.lamp,
        class: 1,
        fixed: true,
      });
      s.sketch.wire([far, 'C'], [lamp, 'L'], 'switched', cable);
      s.sketch.wire(s.tap(N), [lamp, 'N'], 'neutral', cable);
      if (E) s.sketch.wire(s.tap(E), [lamp, 'E'], 'earth', cable);
      return s.command('Place the other two-way switch and its lamp', [lamp, 'L']);
    },
  };
};
