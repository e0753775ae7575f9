import { Keeper } from '@/components/sheet/keeper';
import { openOutbox, type Outbox } from '@/components/sheet/outbox';
import { createDrawingStore, type DrawingStore } from '@/components/sheet/store';
import { emptyDocument, type Installation, type Part } from '@/diagram/document/schema';
import type { Patch } from '@/diagram/document/patch';
import { ANNA, type FakeServer } from './fake-server';

export const home = (): Installation =>
  emptyDocument('Kiln Row 3', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 });

export const setPart = (part: Part): Patch => ({ set: { parts: [part] } });
export const lamp = (id: string, watts = 9): Part => ({ id, kind: 'lamp', watts });

export interface TestWindow {
  store: DrawingStore;
  keeper: Keeper;
  outbox: Outbox;
  /** ends the window as a killed tab ends: nothing more is written or sent */
  kill(): void;
}

interface Options {
  windowId?: string;
  personId?: string;
  outbox?: Promise<Outbox>;
  alive?: Set<string> | null;
  database?: string;
}

/** A window of a browser on the fake server, with IndexedDB in memory. */
export async function openWindow(server: FakeServer, options: Options = {}): Promise<TestWindow> {
  const { windowId = 'w1', personId = ANNA.id, database = 'test', alive = new Set([windowId]) } = options;
  const opening = options.outbox ?? openOutbox(database);
  const store: DrawingStore = createDrawingStore(server.view(), (label, patch) => keeper.keep(label, patch));
  const keeper: Keeper = new Keeper(server.view(), () => store, {
    api: server.api,
    outbox: opening,
    drawer: Promise.resolve({ personId, windowId }),
    openWindows: async () => alive,
    announce: () => undefined,
  });
  await keeper.ready;
  void keeper.pump();
  const outbox = await opening.catch(() => null as never);
  return {
    store,
    keeper,
    outbox,
    kill() {
      keeper.stop();
      outbox?.close();
    },
  };
}
