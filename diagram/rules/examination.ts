import type { Finding } from './types';

/** The result of examining a document: what `npm run check` prints and every screen reads. Names and units are a contract. */
export interface WayResult {
  /** id of the outgoing device */
  part: string;
  label: string;
  /** A, design current after diversity */
  ib: number | null;
  /** A, the device's rating */
  in: number | null;
  /** A, corrected capacity of the thinnest cable the way leans on */
  iz: number | null;
  /** A, table value before correction */
  capacity: number | null;
  /** %, from the origin to the worst load */
  dropPercent: number | null;
  /** ohm, at the far end, hot */
  zs: number | null;
  /** ohm */
  zsMax: number | null;
  /** s, in which a fault to earth at the far end is cleared; null when nothing clears it */
  disconnects: number | null;
  /** id of the residual-current device before it on mains */
  rcd: string | null;
  connectedWatts: number;
  demandWatts: number;
  points: number;
}

export interface DemandLine {
  what: string;
  watts: number;
  /** W, after the allowance */
  demand: number;
  /** "66 % of lighting" */
  allowance: string;
  source: string;
}

export interface SupplyResult {
  demandWatts: number;
  demandAmps: number;
  /** A, prospective short-circuit current at the origin, voltage / zln; null without zln */
  ipf: number | null;
  conditions: string[];
  lines: DemandLine[];
}

export interface BackupResult {
  inverter: string;
  watts: number;
  va: number;
  surgeVa: number;
  chargeWatts: number | null;
  autonomyHours: number | null;
  dcAmps: number | null;
  /** assumptions behind the hours */
  dischargeDepth: number;
  ageing: number;
  peukert: number;
}

export interface LoadResult {
  part: string;
  conditions: Record<
    string,
    { fed: boolean; from: string | null; volts: number | null; overcurrent: string | null; rcd: string | null }
  >;
}

export interface Examination {
  schema: 1;
  title: string;
  findings: Finding[];
  ways: WayResult[];
  supply: SupplyResult;
  backup: BackupResult[];
  loads: LoadResult[];
}
