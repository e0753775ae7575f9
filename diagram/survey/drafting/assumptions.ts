/**
 * What a draft takes for granted where the survey does not say it. All of it is common practice, no source; a person changes
 * the drawing where the home is otherwise.
 */

/** m, one way */
export const LENGTH = {
  /** from the switchboard of a room to that of the next room on the same way */
  roomToRoom: 6,
  /** from a switchboard to a lamp or fan */
  boxToPoint: 5,
  /** from a lamp to the next one on the same switch */
  pointToPoint: 3,
  outletToOutlet: 4,
  switchToAppliance: 2,
  boardToInverter: 4,
  mainBond: 4,
  batteryToFuse: 0.3,
  fuseToInverter: 0.9,
} as const;

/** displacement power factor of a load */
export const POWER_FACTOR = { lamp: 0.9, fan: 0.9, motor: 0.85, heater: 1 } as const;

/** start current as a multiple of the running one */
export const START = { fan: 2, motor: 3 } as const;

/** W, assumed at an outlet of the mains */
export const OUTLET_WATTS = 100;

/** ways behind one 30 mA rcd, so that their standing leakage stays well below what it trips at */
export const WAYS_PER_RCD = 9;

/** rooms that one way of lamps may serve */
export const ROOMS_PER_WAY = 2;

/** points of a way of lamps, and outlets of a radial one, where the practice names no limit */
export const POINTS_PER_WAY = 12;
export const OUTLETS_PER_RADIAL = 10;

/** outlets of a room from which a ring is drawn, and the most it serves, where the practice has rings */
export const RING_FROM = 6;
export const OUTLETS_PER_RING = 20;

/** share of a device's rating that a way of lamps is filled to */
export const WAY_FILL = 0.8;

/** A, ratings on sale, rising */
export const SERVICE_RATINGS = [63, 80, 100] as const;
export const RCD_RATINGS = [25, 40, 63, 80, 100] as const;
export const SWITCH_RATINGS = [6, 10, 16, 20] as const;
export const TWO_POLE_RATINGS = [20, 32, 45, 63, 100] as const;
export const REGULATOR_RATINGS = [2, 5, 10] as const;

/** The smallest rating on sale that is at least `amps`; the largest where none is. */
export const ratingFor = (amps: number, ratings: readonly number[], atLeast = 0): number =>
  ratings.find((rating) => rating >= amps && rating >= atLeast) ?? ratings[ratings.length - 1]!;

const MOTORS = /pump|air|condition|fridge|freez|wash|dish|compress|motor|lift|mill|grind/i;

/** True for an appliance whose name says that a motor starts in it. */
export const startsMotor = (what: string): boolean => MOTORS.test(what);
