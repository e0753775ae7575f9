import type { SurveyRoom } from '../../document/schema';
import type { Practice } from '../../practices/types';
import { USUAL_RUN } from '../columns';
import type { RunSize } from './size-run';
import type { Wish } from './wish';

/** What of one room hangs on one way. */
export interface Segment {
  room: SurveyRoom;
  lamps: number[];
  fans: number[];
  outlets: number[];
}

export type WayKind = 'lamps' | 'outlets' | 'heavy' | 'backup' | 'backup-outlet';

/** A way before it is drawn. */
export interface WayPlan {
  kind: WayKind;
  /** running number among the ways of this kind that begin in the same room, from 1 */
  number: number;
  label: string;
  segments: Segment[];
  /** of a heavy appliance's own way */
  heavy?: Wish['heavy'][number];
  ring: boolean;
  ratingA: number;
  curve: 'B' | 'C' | 'D';
  /** A, all of it at once */
  amps: number;
  /** null where no cable on sale serves it: the way is too long for its load */
  size: RunSize | null;
}

export const isBackup = ({ kind }: Pick<WayPlan, 'kind'>): boolean => kind === 'backup' || kind === 'backup-outlet';

export interface WaySupply {
  practice: Practice;
  voltage: number;
  ambientC: number;
}

/** m, from the board to a room. */
export const runOf = (room: SurveyRoom): number => room.run ?? USUAL_RUN;

const names = (segments: readonly Segment[]): string => segments.map(({ room }) => room.name.trim()).join(' and ');
/** The name of a way, for the chart: its rooms and what it feeds. */
export const label = (segments: readonly Segment[], what: string): string =>
  `${names(segments).slice(0, 79 - what.length)} ${what}`;
