'use client';

import { useEffect, useState } from 'react';
import { useStore } from 'zustand';
import type { DrawingView } from '@/lib/shared/drawings';
import { drawingApi } from './drawing-api';
import { claimWindow, openWindows } from './identity';
import { Keeper } from './keeper';
import { followDrawing, type Live } from './live';
import { openOutbox } from './outbox';
import { createDrawingStore, type DrawingState, type DrawingStore } from './store';

/** The person at this browser, as far as the sheets need to know. */
export interface Me {
  id: string;
  initials: string;
}

export interface OpenDrawing {
  store: DrawingStore;
  keeper: Keeper;
  /** absent on the server */
  live?: Live;
}

/** ms between two questions for changes of others while the event stream does not stand, and while it does */
const POLL_EVERY = 8000;
const POLL_RARELY = 60_000;
const CHANNEL = 'ohmstead-saved';

/** One window works on one drawing at a time; the three sheets of its job share it. */
let current: (OpenDrawing & { key: string; close: () => void }) | null = null;
let windowId: Promise<string> | undefined;

function open(view: DrawingView, me: Me): OpenDrawing & { close: () => void } {
  windowId ??= claimWindow();
  const channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(CHANNEL);
  const store: DrawingStore = createDrawingStore(view, (label, patch) => keeper.keep(label, patch));
  const keeper: Keeper = new Keeper(view, () => store, {
    api: drawingApi,
    outbox: openOutbox(),
    drawer: windowId.then((id) => ({ personId: me.id, windowId: id })),
    openWindows,
    announce: (rev) => channel?.postMessage({ drawingId: view.id, rev }),
  });
  void keeper.pump();

  const look = () => {
    if (document.visibilityState === 'visible') void keeper.poll();
    else void keeper.writeHistory();
  };
  const online = () => keeper.retry();
  const beforeUnload = (event: BeforeUnloadEvent) => {
    if (keeper.wouldLose) event.preventDefault();
  };
  let stands = false;
  let asked = Date.now();
  const live = followDrawing(view.id, {
    rev: (rev) => keeper.hear(rev),
    people: (people) => {
      const peers = people.filter(({ id }) => id !== me.id);
      if (peers.length > 0 || store.getState().peers.length > 0) store.setState({ peers });
    },
    standing(now) {
      const { saveState } = store.getState();
      // The network is back with the stream: what waits for a later try is sent at once.
      if (now && !stands && saveState.kind === 'kept' && saveState.why === 'offline') keeper.retry();
      stands = now;
    },
  });
  const timer = setInterval(() => {
    if (document.visibilityState !== 'visible' || (stands && Date.now() - asked < POLL_RARELY)) return;
    asked = Date.now();
    void keeper.poll();
  }, POLL_EVERY);
  if (channel)
    channel.onmessage = (event) => event.data?.drawingId === view.id && keeper.hear(Number(event.data.rev) || 0);
  document.addEventListener('visibilitychange', look);
  window.addEventListener('online', online);
  window.addEventListener('beforeunload', beforeUnload);
  return {
    store,
    keeper,
    live,
    close() {
      keeper.stop();
      live.close();
      clearInterval(timer);
      channel?.close();
      document.removeEventListener('visibilitychange', look);
      window.removeEventListener('online', online);
      window.removeEventListener('beforeunload', beforeUnload);
    },
  };
}

function openOnce(view: DrawingView, me: Me): OpenDrawing {
  // On the server nothing is shared between requests and nothing is kept.
  if (typeof window === 'undefined') {
    const store = createDrawingStore(view, () => undefined);
    return { store, keeper: null as never };
  }
  const key = `${view.id} ${me.id}`;
  if (current?.key !== key) {
    current?.close();
    current = { key, ...open(view, me) };
  }
  return current;
}

/** The drawing of a job, shared by its sheets: `const { store, keeper } = useDrawing(view, me)`. */
export function useDrawing(view: DrawingView, me: Me): OpenDrawing {
  const [drawing] = useState(() => openOnce(view, me));
  useEffect(() => {
    // A sheet turned to later brings fresher rights and title block; its newer changes come by asking.
    drawing.store.setState({ rights: view.rights, titleBlock: view.titleBlock });
    if (view.rev > drawing.store.getState().rev) void drawing.keeper.poll();
  }, [drawing, view]);
  useEffect(() => drawing.live?.attend(), [drawing]);
  return drawing;
}

/** Reads one thing of the drawing; the component draws again only when that thing changes. */
export const useSheet = <T>(store: DrawingStore, read: (state: DrawingState) => T): T => useStore(store, read);

/** For sign-out: what was sent leaves this browser; what is not saved stays for the same person's next sign-in. */
export async function forgetOnSignOut(personId: string): Promise<void> {
  current?.close();
  current = null;
  const outbox = await openOutbox();
  await outbox.forgetSent(personId);
  outbox.close();
}
