import { stationIndex, walkIn, type RehearsalStore } from './state';

/** ms at a station: long enough to read what it says */
const STAY = 2600;

export interface Player {
  /** plays, or stops where it plays */
  toggle(): void;
  stop(): void;
}

/** Plays a walk from station to station; stops at its end, or as soon as anything else is done. */
export function createPlayer(store: RehearsalStore): Player {
  let timer: ReturnType<typeof setTimeout> | null = null;
  let forget = () => {};
  const stop = () => {
    if (!timer) return;
    clearTimeout(timer);
    timer = null;
    forget();
    store.getState().set({ playing: false });
  };
  const toggle = () => {
    if (timer) return stop();
    const walk = walkIn(store.getState());
    if (!walk) return;
    if (matchMedia('(prefers-reduced-motion: reduce)').matches)
      return store
        .getState()
        .set({ said: 'Nothing plays by itself here: your system asks for less motion. Step with the arrows.' });
    const last = walk.stations.length - 1;
    if (stationIndex(store.getState()) === last) store.getState().step(0);
    let expected = stationIndex(store.getState());
    const next = () => {
      expected++;
      store.getState().step(expected);
      if (expected === last) stop();
      else timer = setTimeout(next, STAY);
    };
    timer = setTimeout(next, STAY);
    store.getState().set({ playing: true });
    // Somebody has stepped by hand, or the walk is another one.
    forget = store.subscribe((state) => {
      if (walkIn(state) !== walk || stationIndex(state) !== expected) stop();
    });
  };
  return { toggle, stop };
}
