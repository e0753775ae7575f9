import type { FaultWalk } from '@/diagram/circuit/fault-types';
import { createPlayer, type Player } from '../player';
import { createRehearsalStore, stationIndex, type RehearsalStore } from '../state';

/** A fault walk that the sheet itself shows: of which finding, where it stands, and what plays it. */
export interface ShownWalk {
  /** key of the finding that it shows */
  finding: string;
  /** in which it was put in, as the engine names it: what the rehearsal sheet is asked for */
  condition: string;
  store: RehearsalStore;
  player: Player;
}

/** Where motion is welcome the walk begins before the fault and plays; else it stands at the fault until somebody steps. */
export const motionIsWelcome = (): boolean => !matchMedia('(prefers-reduced-motion: reduce)').matches;

/** Puts the fault that shows a finding into a rehearsal of its own; nothing of it reaches the drawing. */
export function showWalk(finding: string, { condition, faults }: Pick<FaultWalk, 'condition' | 'faults'>): ShownWalk {
  const station = motionIsWelcome() ? 0 : null;
  const store = createRehearsalStore({ stance: null, condition, faults, station, hand: null, place: null });
  return { finding, condition, store, player: createPlayer(store) };
}

/** One station on or back. */
export const stepWalk = ({ store }: ShownWalk, by: 1 | -1): void => store.getState().step(stationIndex(store.getState()) + by);
