import type { Allowance, DemandGroup, Practice, Sourced } from '../types';

/** Figures that the three practices share, each with its source. */

export const said = <T>(value: T, source: string, note?: string): Sourced<T> => ({
  value,
  source,
  memory: false,
  ...(note && { note }),
});
export const recalled = <T>(value: T, source: string, note?: string): Sourced<T> => ({
  value,
  source,
  memory: true,
  ...(note && { note }),
});
/** What the trade does and no standard says. */
export const trade = <T>(value: T, what = 'common practice, no source'): Sourced<T> => ({
  value,
  source: what,
  memory: true,
});

const WHITFIELD = 'J. Whitfield, The Electricians Guide, 5th ed., Table 6.2 (= IET GN1 Table H2)';

/**
 * Household allowances. Neither IEC 60364 nor IS 732 prints a table for homes: the British one stands in, and says so.
 */
export const household = (note?: string): Record<DemandGroup, Sourced<Allowance>> => {
  const of = (value: Allowance) => said(value, WHITFIELD, note);
  return {
    lighting: of({ rest: 0.66 }),
    'heating-power': of({ firstA: 10, rest: 0.5 }),
    cooker: of({ firstA: 10, rest: 0.3, socketA: 5 }),
    'instant-water': of({ ranked: [1, 1], rest: 0.25 }),
    'thermostatic-water': of({ rest: 1 }),
    'storage-heating': of({ rest: 1 }),
    charging: trade({ rest: 1 }, 'a charger runs for hours at its set current: counted whole, common practice'),
    sockets: of({ ranked: [1], rest: 0.4 }),
  };
};

export const DISCONNECTION: Practice['disconnection'] = {
  finalTN: said(0.4, 'Table 41.1, TN, 120 V < U0 <= 230 V, copy of 411.3.2.2'),
  finalTT: said(0.2, 'Table 41.1, TT, 120 V < U0 <= 230 V, copy of 411.3.2.2'),
  distributionTN: said(5, '411.3.2.3, electricians blog'),
  distributionTT: said(1, '411.3.2.4, electricians blog'),
  withSocketsUpToA: recalled(63, 'IEC 60364-4-41:2017 and BS 7671:2018 411.3.2.2', 'before 2018: 32 A'),
  fixedUpToA: recalled(32, 'IEC 60364-4-41:2017 and BS 7671:2018 411.3.2.2'),
};

export const LONG_RUN = recalled(
  { fromM: 100, perMetre: 0.005, atMost: 0.5 },
  'BS 7671 Appendix 4 section 6.4; IEC 60364-5-52 Table G.52.1 note',
);

export const CMIN = said(0.95, 'BS 7671 A3:2015 onward, 411.4.4; the-regs blog "Zs values and Cmin"');
export const CMAX = recalled(1.1, 'IEC 60909-0 Table 1, low voltage, tolerance +10 %');
export const TOUCH_VOLTS = said(50, 'RA x IdN <= 50 V, 411.5.3; B. Scaddan, "Earthing and bonding"');
export const MEASURED_SHARE = recalled(0.8, 'IET Guidance Note 3 / BS 7671 Appendix 3: 80 % for a cold measured value');

export const CSA_MM2 = [1, 1.5, 2.5, 4, 6, 10, 16, 25, 35] as const;
export const BREAKER_RATINGS = said(
  [6, 10, 13, 16, 20, 25, 32, 40, 50, 63, 80, 100, 125] as readonly number[],
  'Types of miniature circuit breakers according to IEC 60898-1',
  '8 A is also made (from memory); a draft does not use it',
);
export const BREAKING_CAPACITIES = said(
  [1500, 3000, 4500, 6000, 10000] as readonly number[],
  'Manufacturer FAQ: breaking capacity under IEC 898',
);
export const RCD_SENSITIVITIES = recalled(
  [0.006, 0.01, 0.03, 0.1, 0.3, 0.5] as readonly number[],
  'IEC 61008-1 clause 5.3.3',
);

export const WET_DISTANCE = recalled(
  2.5,
  'BS 7671:2018+A2 701.512.3, socket outlets 2.5 m from the boundary of zone 1; IEC 60364-7-701: outside zone 2, 0.6 m from zone 1',
);
