/** What can be wrong at a place. */
export type FaultKind = 'line-to-case' | 'line-to-neutral' | 'neutral-open' | 'neutral-to-earth';

export const FAULT_KINDS: readonly FaultKind[] = [
  'line-to-case',
  'line-to-neutral',
  'neutral-open',
  'neutral-to-earth',
];

export interface Fault {
  kind: FaultKind;
  /** id of the part at which it is */
  at: string;
  /**
   * id of the wire that opens, of `neutral-open`; all wires at the part's N where not given, the supplier's at a supply
   */
  wire?: string;
}

/** The home after one event of a walk, as the sheet shows it. */
export interface FaultStep {
  /** s from the first fault; a device is taken to open as late as it may */
  t: number;
  /** s, as early as it may; equal to `t` where nothing is in doubt */
  earliest: number;
  event: string;
  /** the part at which it happens */
  part?: string;
  /** of a device that opens: A in its line, A by which its poles do not cancel */
  amps?: number;
  astrayAmps?: number;
  /** true where an inverter begins to run from its battery */
  takesOver?: true;
  /** other devices that may open first, as their bands overlap */
  orElse: string[];
  /** after the event: V of the faulted part's case to true earth, A in the fault */
  touchVolts: number;
  faultAmps: number;
  /** V to true earth of every case and earth contact, by part */
  caseVolts: Record<string, number>;
  /** V to true earth of the greatest of the neutrals of the sources: what a floating source's neutral stands at */
  neutralVolts: number;
  /** V across each load */
  loadVolts: Record<string, number>;
  /** A in each wire that carries a milliampere or more */
  wireAmps: Record<string, number>;
  /** parts with a terminal above 50 V to true earth */
  live: string[];
  /** loads that have lost their supply */
  dark: string[];
}

/**
 * The course of one fault or of several in sequence; the fields that `npm run fault` prints keep their names and units.
 */
export interface FaultWalk {
  condition: string;
  /** in the order in which they were put in */
  faults: readonly Fault[];
  steps: FaultStep[];
  /** V, the greatest that stands at the faulted part's case before anything opens */
  touchVolts: number;
  /** A in the last fault before anything opens */
  faultAmps: number;
  cleared: boolean;
  /** s after the last fault, at the latest; null when it is not cleared */
  clearedAfter: number | null;
  /** id of the device that clears it */
  by: string | null;
  live: string[];
  dark: string[];
  /** values without which a device was left out of it: "the sensitivity of Q2" */
  lacks: string[];
  /**
   * what the drawing does not tell and the walk takes for granted: the wave of a residual current, by the type of each
   * rcd that it moves
   */
  assumes: string[];
}

/** A fault that cannot be walked: why, for the person who asked. */
export class FaultError extends Error {}
