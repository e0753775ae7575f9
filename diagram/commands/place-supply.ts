import { diff } from '../document/patch';
import type { Installation } from '../document/schema';
import { practices } from '../practices';
import { SERVICE_RATINGS } from '../survey/drafting/assumptions';
import { breakingCapacity } from '../survey/drafting/draft-home';
import { BOARD, drawGroup, drawOrigin } from '../survey/drafting/house';
import { HOUSE, groupIds } from '../survey/drafting/ids';
import { mainSensitivityA } from '../survey/drafting/plan-home';
import { drawPlaces } from '../survey/drafting/places';
import { Sketch } from '../survey/drafting/sketch';
import { withPlaces } from './place-new';
import type { Command } from './types';

/** Feeders for which the origin has bars: the rcd of the ways, and a backup source later. */
const FEEDERS = 2;

/**
 * The origin of a home: service line, fuse, meter, main switch, the bars of its feeders, an rcd and the bars from which
 * ways are drawn. A backup source finds its place at the feeders' bars, so that nothing has to make room for it.
 */
export function placeSupply(doc: Installation): Command {
  const practice = practices[doc.practice];
  const sketch = new Sketch(doc, practice);
  const place = drawPlaces(sketch, []);
  const ratingA = SERVICE_RATINGS[0];
  const tt = doc.supply.system === 'TT';
  const mainRcd = tt ? mainSensitivityA(doc.supply, practice.touchVolts.value) : null;
  const taps = drawOrigin(sketch, { ratingA, place, feeders: FEEDERS, mainSensitivityA: mainRcd });
  const icn = breakingCapacity(doc.supply, practice);
  const here = { rcdPlace: place, rcdBoard: BOARD, place, board: BOARD };
  drawGroup(sketch, taps(), { side: 'mains', n: 1, label: 'Mains ways', ratingA, icn, ...here });
  const patch = withPlaces(doc, diff(doc, sketch.finish()));
  return { label: 'Place the supply', patch, next: sketch.nextOn(groupIds('mains', 1).lineBar) };
}

/** The service line alone, for who draws the origin piece by piece. */
export function placeSupplyAlone(doc: Installation): Command {
  const sketch = new Sketch(doc, practices[doc.practice]);
  sketch.part({ id: HOUSE.supply, kind: 'supply', place: drawPlaces(sketch, []) }, null);
  const patch = withPlaces(doc, diff(doc, sketch.finish()));
  return { label: 'Place the service line', patch, next: [HOUSE.supply, 'L'] };
}
