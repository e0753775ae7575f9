import type { PracticeId, Role } from '../document/schema';

/**
 * A practice is a country's way of wiring, as data: another country is another file of this shape and its tests.
 * Every figure says where it is from; `memory` is true where the text was not open in front of the author.
 */
export interface Sourced<T> {
  value: T;
  source: string;
  memory: boolean;
  /** where sources disagree, or what was decided */
  note?: string;
}

export type Material = 'Cu' | 'Al';
export type Insulation = 'PVC' | 'XLPE';
export type Method = 'A1' | 'A2' | 'B1' | 'B2' | 'C' | 'D1';
export type Curve = 'B' | 'C' | 'D';

/** A printed table with one argument: csa in mm2, degC, a count, mm ... to the digit printed, rising argument. */
export interface Row {
  at: number;
  value: number;
  memory: boolean;
}
export interface Table {
  title: string;
  source: string;
  rows: readonly Row[];
  note?: string;
}

/** Capacity of a table in A against csa in mm2, at the table's reference temperature. */
export interface CapacityTable extends Table {
  material: Material;
  insulation: Insulation;
  method: Method;
  /** degC of the air, or of the ground where the method is D1 */
  referenceC: number;
}

/** Colours that a role may have, IEC 60757 codes; the first is the one a draft uses. */
export interface ColourScheme {
  id: string;
  name: string;
  colours: Record<Role, Sourced<readonly [string, ...string[]]>>;
}

export interface SocketPattern {
  id: string;
  name: string;
  ratingA: number;
  earthed: boolean;
  /**
   * on which side the line contact lies, seen from the front with the earth at the top; absent where it may be either
   */
  lineSide?: 'left' | 'right';
  /** A, the fuse in the plug */
  plugFuseA?: number;
  /** a shaver outlet with a separated winding: allowed in wet places */
  shaver?: boolean;
  source: string;
  memory: boolean;
}

/** What is counted of a group of loads: whole up to `firstA`, the largest by `ranked`, then a share of the rest. */
export interface Allowance {
  /** A counted whole before `rest` applies to what is above */
  firstA?: number;
  /** shares of the largest, the second largest ... before `rest` applies */
  ranked?: readonly number[];
  /** share of the rest, 0 to 1 */
  rest: number;
  /** A added for an outlet in the control unit */
  socketA?: number;
}

export type DemandGroup =
  | 'lighting'
  | 'heating-power'
  | 'cooker'
  | 'instant-water'
  | 'thermostatic-water'
  | 'storage-heating'
  | 'charging'
  | 'sockets';

/** Limits of points and watts of one way, by what it feeds. */
export interface PointsLimit {
  /** lighting: lamps and fans; power: outlets of at least `fromA` */
  of: 'lighting' | 'power';
  fromA?: number;
  points: number;
  watts: number;
}

/** Where the practice asks for an rcd of at most this sensitivity. */
export interface RcdDuty {
  /**
   * sockets: outlets up to `uptoA`; wet: any circuit of a wet place; lighting: luminaires in a dwelling; tt: any
   * circuit on TT
   */
  of: 'sockets' | 'wet' | 'lighting' | 'tt';
  uptoA?: number;
  /** A */
  sensitivityA: number;
}

/** What a draft gives one kind of way. */
export interface DraftWay {
  ratingA: number;
  curve: Curve;
  /** mm2, the smallest cable used for it; the sizing helper may ask for more */
  csaMm2: number;
  poles: 1 | 2;
}

export interface Practice {
  id: PracticeId;
  name: string;
  /** the standard that its clauses name */
  standard: string;
  colourSchemes: readonly [ColourScheme, ...ColourScheme[]];
  sockets: readonly [SocketPattern, ...SocketPattern[]];
  /** percent of nominal from the origin */
  voltDrop: {
    lighting: Sourced<number>;
    other: Sourced<number>;
    longRun: Sourced<{ fromM: number; perMetre: number; atMost: number }>;
  };
  disconnection: {
    /** s */
    finalTN: Sourced<number>;
    finalTT: Sourced<number>;
    distributionTN: Sourced<number>;
    distributionTT: Sourced<number>;
    /** A, final circuits up to which the short times hold */
    withSocketsUpToA: Sourced<number>;
    fixedUpToA: Sourced<number>;
  };
  /** voltage factors of minimum and maximum fault current */
  cMin: Sourced<number>;
  cMax: Sourced<number>;
  /** V, touch voltage that may stand */
  touchVolts: Sourced<number>;
  /** share of the limit that a cold measured loop may reach on the test sheet */
  measuredShare: Sourced<number>;
  diversity: Record<DemandGroup, Sourced<Allowance>>;
  /** groups whose allowance may be taken when one way is sized, too */
  wayDiversity: readonly DemandGroup[];
  capacity: readonly CapacityTable[];
  /** ambient factors by insulation, air and ground */
  ambient: Record<Insulation, { air: Table; ground: Table }>;
  /** by number of loaded circuits together: bunched or enclosed, and side by side on a surface (method C) */
  grouping: { bunched: Table; singleLayer: Table };
  /** factor by mm of the run surrounded by thermal insulation */
  insulated: Table;
  /** mm2, sizes on sale, rising */
  csaMm2: readonly number[];
  /** mm2 of the protective core by mm2 of the line core in a cable on sale */
  cpcMm2: Sourced<Readonly<Record<string, number>>>;
  /** A, rising */
  breakerRatingsA: Sourced<readonly number[]>;
  /** A */
  breakingCapacitiesA: Sourced<readonly number[]>;
  /** A, rated residual currents, rising */
  rcdSensitivitiesA: Sourced<readonly number[]>;
  pointsLimits: readonly Sourced<PointsLimit>[];
  rcdDuties: readonly Sourced<RcdDuty>[];
  /** m from the edge of a bath or shower within which no outlet but a shaver's stands */
  wetSocketDistanceM: Sourced<number>;
  /** ring final circuits, where the practice has them */
  ring?: Sourced<{ deviceA: number; legCsaMm2: number; legIzAtLeastA: number }>;
  /** the output of a backup source is to be cut in both poles */
  backupIsolationPoles: Sourced<1 | 2>;
  draft: {
    method: Method;
    material: Material;
    insulation: Insulation;
    /** loaded circuits assumed together in a drafted run */
    grouped: number;
    lighting: DraftWay;
    outlets: DraftWay;
    /** device and cable follow from the watts: these are the least */
    heavy: DraftWay;
    backup: DraftWay;
    /** A, icn of a drafted mcb */
    icnA: number;
    rcdType: 'AC' | 'A' | 'F' | 'B';
    /** id of the pattern of an ordinary outlet, and of one for a heavy appliance */
    socket: string;
    heavySocket: string;
    /** rating A of a light switch */
    switchA: number;
    source: string;
    memory: boolean;
  };
}
