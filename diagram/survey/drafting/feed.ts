import { sizeCable, type CableSize } from '../../calculations/size-cable';
import { LENGTH, RCD_RATINGS, ratingFor } from './assumptions';
import type { BackupSize } from './backup-size';
import { BOARD, type Pair } from './house';
import { HOUSE } from './ids';
import { BEFORE_BACKUP } from './size-run';
import type { Sketch } from './sketch';

/** The two-pole breaker of the inverter's feed, and the run to it. */
interface FeedPlan {
  ratingA: number;
  curve: 'B' | 'C';
  size: CableSize;
  /** false where the breaker cannot clear a fault in the run by itself: a delayed rcd stands before it */
  clears: boolean;
}

/** A, of the delayed rcd before a feed that its breaker does not clear */
const FEED_SENSITIVITY = 0.3;

/**
 * Feed of the inverter: what passes through to the loads, and the charger. On TN the breaker itself clears a fault in the
 * run within the time of a distribution circuit: type C for the charger's inrush where the loop allows it, else type B,
 * else behind an rcd. On TT the main rcd stands before everything.
 */
function planFeed({ practice, supply, ambient }: Sketch, size: BackupSize): FeedPlan {
  const { draft } = practice;
  const amps = (size.load.va + size.chargeWatts) / supply.voltage;
  const ratingA = ratingFor(Math.max(amps, size.va / supply.voltage), practice.breakerRatingsA.value, 10);
  const sized = (curve: FeedPlan['curve'], clears: boolean): FeedPlan | null => {
    const found = sizeCable({
      practice,
      device: { kind: 'mcb', ratingA, curve },
      ibA: amps,
      method: draft.method,
      material: draft.material,
      insulation: draft.insulation,
      ambientC: ambient,
      grouped: 1,
      lengthM: LENGTH.boardToInverter,
      voltage: supply.voltage,
      dropLimitPercent: BEFORE_BACKUP.feed,
      leastMm2: 2.5,
      ...(clears &&
        supply.ze !== undefined && {
          zsBeforeOhm: supply.ze,
          disconnectS: practice.disconnection.distributionTN.value,
        }),
    });
    return found && { ratingA, curve, size: found, clears };
  };
  const plan = supply.system === 'TT' ? null : (sized('C', true) ?? sized('B', true));
  const guarded = plan ?? sized('C', false);
  if (!guarded) throw new RangeError(`no cable on sale carries ${ratingA} A over ${LENGTH.boardToInverter} m`);
  return guarded;
}

/** A delayed rcd at the board, for the feed alone. */
function drawFeedRcd(sketch: Sketch, from: Pair, here: { place: string; board: string }, ratingA: number): Pair {
  const id = sketch.part({
    id: HOUSE.feedRcd,
    kind: 'rcd',
    label: 'Inverter feed',
    ...here,
    rating: ratingFor(ratingA, RCD_RATINGS),
    sensitivity: FEED_SENSITIVITY,
    type: sketch.practice.draft.rcdType,
    delay: 'S',
  });
  sketch.wire(from.line, [id, '1'], 'line');
  sketch.wire(from.neutral, [id, '3'], 'neutral');
  return { line: [id, '2'], neutral: [id, '4'] };
}

interface FeedNeed {
  size: BackupSize;
  from: Pair;
  /** where the board stands */
  intake: string;
  /** A, breaking capacity that the board asks for */
  icn: number;
  earthBar: string;
}

/** Draws the feed of the inverter from the board: breaker and run. */
export function drawFeed(sketch: Sketch, { size, from, intake, icn, earthBar }: FeedNeed): void {
  const plan = planFeed(sketch, size);
  const { draft } = sketch.practice;
  const here = { place: intake, board: BOARD };
  const guarded = plan.clears || sketch.supply.system === 'TT';
  const start = guarded ? from : drawFeedRcd(sketch, from, here, plan.ratingA);
  sketch.part({
    id: HOUSE.feed,
    kind: 'mcb',
    label: 'Inverter feed',
    ...here,
    poles: 2,
    rating: plan.ratingA,
    curve: plan.curve,
    icn,
  });
  const run = sketch.cable({
    id: 'inverter-feed.run',
    csa: plan.size.csaMm2,
    cpc: plan.size.cpcMm2,
    material: draft.material,
    insulation: draft.insulation,
    method: draft.method,
    length: LENGTH.boardToInverter,
    cores: 3,
  });
  sketch.wire(start.line, [HOUSE.feed, '1'], 'line');
  sketch.wire(start.neutral, [HOUSE.feed, '3'], 'neutral');
  sketch.wire([HOUSE.feed, '2'], [HOUSE.inverter, 'in.L'], 'line', run);
  sketch.wire([HOUSE.feed, '4'], [HOUSE.inverter, 'in.N'], 'neutral', run);
  sketch.wire(sketch.nextOn(earthBar), [HOUSE.inverter, 'in.E'], 'earth', run);
}
