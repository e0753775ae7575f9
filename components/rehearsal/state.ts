'use client';

import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import { createStore, type StoreApi } from 'zustand/vanilla';
import type { Fault } from '@/diagram/circuit/fault-types';
import type { Rehearsed } from '@/diagram/rehearsal/rehearse';
import { withSettings, type ConditionName, type Stance } from '@/diagram/rehearsal/stance';
import type { Setting } from '@/diagram/rehearsal/settings';
import type { Station, Walk } from '@/diagram/rehearsal/walk';
import type { Address } from './address';

/** The rehearsal as one person has put it in this window. */
export interface RehearsalState extends Address {
  /** the newest answer; null before the first */
  answer: Rehearsed | null;
  failure: string | null;
  /** the list of faults is open at the part in hand */
  choosing: boolean;
  /** what changed last, for the live region */
  said: string;
  /** the walk goes from station to station by itself */
  playing: boolean;

  /** asks for the home in a condition: the supply, the main switch and the battery's devices as it wants them */
  setCondition: (name: ConditionName) => void;
  /** puts a part into a position */
  operate: (id: string, setting: Setting) => void;
  /** all as it stands before anybody has touched it; faults stay */
  putBack: () => void;
  take: (id: string | null) => void;
  insert: (fault: Fault) => void;
  clearFaults: () => void;
  step: (to: number) => void;
  set: (
    state: Partial<
      Pick<RehearsalState, 'answer' | 'failure' | 'choosing' | 'said' | 'playing' | 'place' | 'stance' | 'condition' | 'station'>
    >,
  ) => void;
}

export type RehearsalStore = StoreApi<RehearsalState>;

export const walkIn = (state: Pick<RehearsalState, 'answer' | 'faults'>): Walk | null =>
  state.faults.length > 0 && state.answer?.outcome && 'walk' in state.answer.outcome ? state.answer.outcome.walk : null;

/** The station shown: a walk begins at the moment its last fault is put in. */
export function stationIndex(state: Pick<RehearsalState, 'answer' | 'faults' | 'station'>): number {
  const walk = walkIn(state);
  if (!walk) return 0;
  const begins = walk.stations.findLastIndex(({ kind }) => kind === 'fault');
  return Math.min(walk.stations.length - 1, Math.max(0, state.station ?? begins));
}

export const stationIn = (state: Pick<RehearsalState, 'answer' | 'faults' | 'station'>): Station | null =>
  walkIn(state)?.stations[stationIndex(state)] ?? null;

/** The condition that is asked for, else the one that is answered. */
export const conditionShown = ({ condition, answer }: Pick<RehearsalState, 'condition' | 'answer'>): ConditionName =>
  (condition?.split('/')[0] as ConditionName | undefined) ?? answer?.condition ?? 'mains';

export const createRehearsalStore = (address: Address): RehearsalStore =>
  createStore<RehearsalState>((set, get) => {
    const stanceNow = (): Stance => get().stance ?? get().answer?.stance ?? { supply: 'live', moved: {} };
    return {
      ...address,
      answer: null,
      failure: null,
      choosing: false,
      said: '',
      playing: false,
      setCondition: (name) => set({ condition: name, station: null }),
      operate: (id, setting) =>
        set({
          stance: withSettings(stanceNow(), get().answer?.rest ?? {}, { [id]: setting }),
          hand: id,
          choosing: false,
          station: null,
        }),
      putBack: () => set({ stance: { supply: 'live', moved: {} }, condition: null, station: null }),
      take: (id) => set({ hand: id, choosing: false }),
      insert: (fault) => set({ faults: [...get().faults, fault], station: null, choosing: false }),
      clearFaults: () => set({ faults: [], station: null, choosing: false }),
      step(to) {
        const last = (walkIn(get())?.stations.length ?? 1) - 1;
        set({ station: Math.min(last, Math.max(0, to)) });
      },
      set,
    };
  });

const Context = createContext<RehearsalStore | null>(null);
export const RehearsalProvider = Context.Provider;

export function useRehearsalStore(): RehearsalStore {
  const store = useContext(Context);
  if (!store) throw new Error('this component stands on the rehearsal sheet');
  return store;
}

/** Reads one thing of the rehearsal; the component draws again only when that thing changes. */
export const useRehearsal = <T>(read: (state: RehearsalState) => T): T => useStore(useRehearsalStore(), read);
