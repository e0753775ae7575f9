import type { Role } from '../../document/schema';
import { sizeBackup } from '../../survey/drafting/backup-size';
import { drawBackupSource } from '../../survey/drafting/backup-source';
import { breakingCapacity } from '../../survey/drafting/draft-home';
import { canTapBeside, findGroups, tapBeside } from '../../survey/drafting/groups';
import { BACKUP_BOARD, BOARD } from '../../survey/drafting/house';
import { HOUSE, groupIds } from '../../survey/drafting/ids';
import { drawNotices } from '../../survey/drafting/places';
import { DRAFT_AMBIENT } from '../../survey/drafting/plan-home';
import { USUAL_RUN, emptyRoom } from '../../survey/columns';
import { LENGTH } from '../../survey/drafting/assumptions';
import { ROLE_OF } from '../walk';
import { nameOf } from '../../document/names';
import { Strokes, plainSize } from './drawing';
import type { At, Recipe } from './types';

/** Devices at a bar, the backup source, what is bonded to earth, and landing a terminal that hangs free. */

export const devicesAtBar: Recipe = function* (at) {
  if (at.part.kind !== 'line-bar' || at.conductor !== 'L') return;
  const { draft } = at.practice;
  const common = { assembly: false, values: [], counts: [] } as const;
  const plain = at.backup ? draft.backup : draft.outlets;
  yield {
    ...common,
    id: 'breaker',
    what: 'breaker alone',
    detail: `${plain.curve}${plain.ratingA}`,
    reason: 'its cable comes later',
    rank: 50,
    place: () => {
      const s = new Strokes(at);
      const id = s.part({ kind: 'mcb', poles: 1, rating: plain.ratingA, curve: plain.curve, icn: draft.icnA });
      s.sketch.wire(s.tap(at.end), [id, '1'], 'line');
      return s.command('Place a breaker', [id, '2']);
    },
  };
  yield {
    ...common,
    id: 'rcbo',
    what: 'rcbo for one way alone',
    detail: `${plain.curve}${plain.ratingA}, 30 mA`,
    reason: 'its earth faults leave the other ways on',
    rank: 51,
    place: () => {
      const s = new Strokes(at);
      const id = s.part({
        kind: 'rcbo',
        poles: 1,
        rating: plain.ratingA,
        curve: plain.curve,
        icn: draft.icnA,
        sensitivity: 0.03,
        type: draft.rcdType,
        delay: 'none',
      });
      s.sketch.wire(s.tap(at.end), [id, '1'], 'line');
      const neutral = s.neutral();
      if (neutral) s.sketch.wire(neutral, [id, '3'], 'neutral');
      return s.command('Place an rcbo', [id, '2']);
    },
  };
  yield {
    ...common,
    id: 'spare',
    what: 'spare way, closed off',
    detail: `${plain.curve}${plain.ratingA}`,
    reason: 'room for what comes later',
    rank: 52,
    place: () => {
      const s = new Strokes(at);
      const id = s.part({
        kind: 'mcb',
        label: 'Spare',
        spare: true,
        poles: 1,
        rating: plain.ratingA,
        curve: plain.curve,
        icn: draft.icnA,
      });
      s.sketch.wire(s.tap(at.end), [id, '1'], 'line');
      return s.command('Place a spare way', at.end);
    },
  };
};

/** What a first backup source is sized for where no survey says what stays on. */
const SMALL = { ...emptyRoom('small', 0), lamps: 4, keepLamps: 4, fans: 2, keepFans: 2, keepOutletWatts: 100 };

/** What a backup source consists of: where any of it stands already, the rest is drawn piece by piece. */
const BACKUP_PARTS = [
  HOUSE.inverter,
  HOUSE.battery,
  HOUSE.batteryFuse,
  HOUSE.feed,
  HOUSE.feedRcd,
  HOUSE.output,
  ...Object.values(groupIds('backup', 1)),
] as const;

export const backupSource: Recipe = function* (at) {
  const atBoard = at.part.kind === 'line-bar' || at.part.kind === 'rcd' || at.part.kind === 'isolator';
  if (!atBoard || at.conductor !== 'L' || at.doc.parts.some((part) => part.kind === 'inverter')) return;
  const draw = (): Strokes | null => {
    const s = new Strokes(at);
    const group = findGroups(at.doc, s.sketch).find(
      (candidate) => !candidate.backup && canTapBeside(s.sketch, candidate),
    );
    const kept = (at.doc.survey ?? []).filter((row) => row.keepLamps + row.keepFans + row.keepOutletWatts > 0);
    const size = sizeBackup(kept.length > 0 ? kept : [SMALL], at.hoursWanted || 3, at.practice, DRAFT_AMBIENT);
    if (!group || !size || BACKUP_PARTS.some((id) => s.sketch.find(id))) return null;
    const from = tapBeside(s.sketch, group)!;
    const intake = group.bars.place;
    drawBackupSource(s.sketch, {
      size,
      from,
      intake,
      hours: at.hoursWanted || 3,
      groups: 1,
      icn: breakingCapacity(at.doc.supply, at.practice),
      earthBar: group.bars.earthBar,
    });
    drawNotices(s.sketch, intake, [BOARD, BACKUP_BOARD], s.sketch.find(HOUSE.inverter)!.ref!);
    return s;
  };
  const tried = draw();
  const inverter = tried?.sketch.find(HOUSE.inverter);
  if (inverter?.kind !== 'inverter') return;
  yield {
    id: 'backup source',
    what: 'backup source, with its own ways',
    detail: `${inverter.va} VA, ${at.hoursWanted || 3} h`,
    reason: 'inverter, battery with its fuse, rcd and bars of the backed-up ways',
    assembly: true,
    rank: 45,
    values: [],
    counts: [],
    place: () => draw()!.command('Place the backup source', [groupIds('backup', 1).lineBar, '2']),
  };
};

/** What is joined to the earth bar. */
export const atEarthBar: Recipe = function* (at) {
  if (at.part.kind !== 'earth-bar') return;
  const bonded = new Set(at.doc.parts.flatMap((part) => (part.kind === 'bond' ? [part.to ?? ''] : [])));
  let rank = 10;
  for (const to of ['water', 'gas']) {
    if (bonded.has(to)) continue;
    yield {
      id: `bond ${to}`,
      what: `bond of the ${to} pipe`,
      detail: `10 mm2, ${LENGTH.mainBond} m`,
      reason: 'a metal pipe that enters the home',
      assembly: false,
      rank: rank++,
      values: [],
      counts: [],
      place: () => {
        const s = new Strokes(at);
        const id = s.part({ kind: 'bond', to, board: undefined }, null);
        const cable = s.cable({ csaMm2: 10, cpcMm2: 10, grouped: 1 }, LENGTH.mainBond, { cores: 1 });
        s.sketch.wire(s.sketch.nextOn(at.part.id), [id, 'E'], 'earth', cable);
        return s.command(`Place the bond of the ${to} pipe`, at.end);
      },
    };
  }
  if (at.doc.supply.system === 'TT' && !at.doc.parts.some((part) => part.kind === 'electrode'))
    yield {
      id: 'electrode',
      what: 'earth electrode',
      detail: at.doc.supply.ra ? `${at.doc.supply.ra} ohm` : '',
      reason: 'on TT the home has its own earth',
      assembly: false,
      rank: 1,
      values: [],
      counts: [],
      place: () => {
        const s = new Strokes(at);
        const id = s.part({ kind: 'electrode', board: undefined }, null);
        s.sketch.wire([id, 'E'], s.sketch.nextOn(at.part.id), 'earth');
        return s.command('Place the earth electrode', at.end);
      },
    };
};

/** A terminal that nothing reaches: where it belongs. */
export const land: Recipe = function* (at) {
  if (at.reached || at.wires > 0 || !at.conductor) return;
  const { conductor } = at;
  const companion = conductor === 'N' ? at.feed.N : conductor === 'E' ? at.feed.E : null;
  const bars = at.doc.parts.filter((part) => {
    const kind = conductor === 'N' ? 'neutral-bar' : conductor === 'E' ? 'earth-bar' : 'line-bar';
    return (
      (conductor === 'N' || conductor === 'E' || conductor === 'L') && part.kind === kind && part.id !== at.part.id
    );
  });
  const targets = [...(companion ? [companion[0]] : []), ...bars.map((bar) => bar.id)];
  let rank = 1;
  for (const id of new Set(targets)) {
    const target = at.doc.parts.find((part) => part.id === id)!;
    const role: Role = ROLE_OF[conductor];
    const own = companion?.[0] === id;
    yield {
      id: `land ${id}`,
      what: `wire to ${nameOf(at.doc, target)}`,
      detail: role,
      reason: own ? 'it belongs to the same way' : `a ${role} bar`,
      assembly: false,
      rank: rank++,
      values: [],
      counts: [],
      place: () => {
        const s = new Strokes(at);
        const from = s.tap(own && companion ? companion : [id, '1']);
        const apart = target.place !== at.part.place;
        const cable = apart
          ? (cableBeside(at) ?? s.cable(plainSize(at, at.practice.draft.lighting.csaMm2), USUAL_RUN, { cores: 1 }))
          : undefined;
        s.sketch.wire(from, at.end, role, cable);
        return s.command(`Wire ${nameOf(at.doc, at.part)} to ${nameOf(at.doc, target)}`, at.end);
      },
    };
  }
};

/** The cable that brings the part its other cores and has none of this one. */
function cableBeside(at: At): string | undefined {
  const role = ROLE_OF[at.conductor!];
  for (const wire of at.doc.wires) {
    if (!wire.cable || wire.to[0] !== at.part.id) continue;
    if (!at.doc.wires.some((other) => other.cable === wire.cable && other.role === role)) return wire.cable;
  }
  return undefined;
}
