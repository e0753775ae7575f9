import type { End } from '../../document/schema';
import { LENGTH, RCD_RATINGS, ratingFor } from './assumptions';
import type { WayBars } from './draw-way';
import { HOUSE, groupIds } from './ids';
import type { Sketch } from './sketch';

export const BOARD = 'Board';
export const BACKUP_BOARD = 'Backup board';

/** A pair of conductors that things are fed from. */
export interface Pair {
  line: End;
  neutral: End;
}

interface OriginNeed {
  /** A, of service fuse, meter, main switch and main rcd */
  ratingA: number;
  place: string;
  /** how many feeders leave the origin: rcds and the inverter's feed */
  feeders: number;
  /** A, of the delayed rcd before everything; null where the system needs none */
  mainSensitivityA: number | null;
}

/** Everything from the service line to where the feeders begin. @returns taps for the feeders */
export function drawOrigin(sketch: Sketch, need: OriginNeed): () => Pair {
  const { place, ratingA } = need;
  const tt = sketch.supply.system === 'TT';
  const here = { place, board: BOARD };
  sketch.part({ id: HOUSE.supply, kind: 'supply', place }, null);
  sketch.part({ id: HOUSE.serviceFuse, kind: 'fuse', place, rating: ratingA, standard: 'gG' });
  sketch.part({ id: HOUSE.meter, kind: 'meter', place, rating: ratingA });
  sketch.part({
    id: HOUSE.mainSwitch,
    kind: 'isolator',
    label: 'Main switch',
    ...here,
    poles: 2,
    rating: ratingA,
    state: 'closed',
  });
  sketch.part({ id: HOUSE.earthBar, kind: 'earth-bar', ...here }, sketch.nextRef('X'));
  sketch.wire([HOUSE.supply, 'L'], [HOUSE.serviceFuse, '1'], 'line');
  sketch.wire([HOUSE.serviceFuse, '2'], [HOUSE.meter, '1'], 'line');
  sketch.wire([HOUSE.supply, 'N'], [HOUSE.meter, '2'], 'neutral');
  sketch.wire([HOUSE.meter, '4'], [HOUSE.mainSwitch, '1'], 'line');
  sketch.wire([HOUSE.meter, '3'], [HOUSE.mainSwitch, '3'], 'neutral');
  if (tt) {
    sketch.part({ id: HOUSE.electrode, kind: 'electrode', place }, null);
    sketch.wire([HOUSE.electrode, 'E'], sketch.nextOn(HOUSE.earthBar), 'earth');
  } else sketch.wire([HOUSE.supply, 'E'], sketch.nextOn(HOUSE.earthBar), 'earth');
  drawBond(sketch, place);

  let end: Pair = { line: [HOUSE.mainSwitch, '2'], neutral: [HOUSE.mainSwitch, '4'] };
  if (need.mainSensitivityA !== null) {
    const delay = need.mainSensitivityA >= 0.1 ? 'S' : 'none';
    const rating = ratingFor(ratingA, RCD_RATINGS);
    sketch.part({
      id: HOUSE.mainRcd,
      kind: 'rcd',
      label: 'Main rcd',
      ...here,
      rating,
      sensitivity: need.mainSensitivityA,
      type: sketch.practice.draft.rcdType,
      delay,
    });
    sketch.wire(end.line, [HOUSE.mainRcd, '1'], 'line');
    sketch.wire(end.neutral, [HOUSE.mainRcd, '3'], 'neutral');
    end = { line: [HOUSE.mainRcd, '2'], neutral: [HOUSE.mainRcd, '4'] };
  }
  drawArrester(sketch, end, here);
  if (need.feeders < 2) return () => end;
  return drawBars(sketch, end, { line: HOUSE.lineBar, neutral: HOUSE.neutralBar, ...here, ratingA });
}

function drawBond(sketch: Sketch, place: string): void {
  sketch.part({ id: HOUSE.bond, kind: 'bond', place, to: 'water' }, null);
  const { material, insulation } = sketch.practice.draft;
  const cable = sketch.cable({
    id: `${HOUSE.bond}.cable`,
    csa: 10,
    cpc: 10,
    material,
    insulation,
    method: 'C',
    length: LENGTH.mainBond,
    cores: 1,
  });
  sketch.wire(sketch.nextOn(HOUSE.earthBar), [HOUSE.bond, 'E'], 'earth', cable);
}

/** Behind a main rcd on TT: its own short circuit to earth is then cleared. */
function drawArrester(sketch: Sketch, from: Pair, here: { place: string; board: string }): void {
  sketch.part({ id: HOUSE.spd, kind: 'spd', ...here, class: 2 });
  sketch.wire(from.line, [HOUSE.spd, 'L'], 'line');
  sketch.wire(from.neutral, [HOUSE.spd, 'N'], 'neutral');
  sketch.wire([HOUSE.spd, 'E'], sketch.nextOn(HOUSE.earthBar), 'earth');
}

interface BarsNeed {
  line: string;
  neutral: string;
  place: string;
  board: string;
  ratingA: number;
  cable?: string;
}

/** A line bar and a neutral bar fed from a pair. @returns their next free terminals, at each call */
export function drawBars(sketch: Sketch, from: Pair, need: BarsNeed): () => Pair {
  const { place, board } = need;
  sketch.part({ id: need.line, kind: 'line-bar', place, board, rating: need.ratingA }, null);
  sketch.part({ id: need.neutral, kind: 'neutral-bar', place, board }, sketch.nextRef('X'));
  sketch.wire(from.line, sketch.nextOn(need.line), 'line', need.cable);
  sketch.wire(from.neutral, sketch.nextOn(need.neutral), 'neutral', need.cable);
  return () => ({ line: sketch.nextOn(need.line), neutral: sketch.nextOn(need.neutral) });
}

export interface GroupNeed {
  side: 'mains' | 'backup';
  n: number;
  label: string;
  /** A, at least the device before it */
  ratingA: number;
  icn: number;
  /** where the rcd stands */
  rcdPlace: string;
  rcdBoard: string;
  /** where the bars and ways stand */
  place: string;
  board: string;
  /** the run between rcd and bars, where they stand apart */
  cable?: string;
  /** the bar at which the earths of its ways meet, where that is not the draft's own */
  earthBar?: string;
}

/** A 30 mA rcd with the line bar and the neutral bar of its ways. */
export function drawGroup(sketch: Sketch, from: Pair, need: GroupNeed): WayBars {
  const ids = groupIds(need.side, need.n);
  const rating = ratingFor(need.ratingA, RCD_RATINGS);
  const place = { place: need.rcdPlace, board: need.rcdBoard };
  sketch.part({
    id: ids.rcd,
    kind: 'rcd',
    label: need.label,
    ...place,
    rating,
    sensitivity: 0.03,
    type: sketch.practice.draft.rcdType,
    delay: 'none',
  });
  sketch.wire(from.line, [ids.rcd, '1'], 'line');
  sketch.wire(from.neutral, [ids.rcd, '3'], 'neutral');
  drawBars(
    sketch,
    { line: [ids.rcd, '2'], neutral: [ids.rcd, '4'] },
    {
      line: ids.lineBar,
      neutral: ids.neutralBar,
      place: need.place,
      board: need.board,
      ratingA: rating,
      cable: need.cable,
    },
  );
  return {
    lineBar: ids.lineBar,
    neutralBar: ids.neutralBar,
    earthBar: need.earthBar ?? HOUSE.earthBar,
    place: need.place,
    board: need.board,
    icn: need.icn,
  };
}
