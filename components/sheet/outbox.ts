import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { Patch } from '@/diagram/document/patch';

/**
 * What has been drawn and is not yet saved, kept on this device. A command is written here before it goes to the network,
 * so that a closed tab, a dead server or a lost network loses nothing.
 */
export interface QueuedChange {
  saveId: string;
  drawingId: string;
  personId: string;
  /** the window that drew it: another window leaves it alone while that one lives */
  windowId: string;
  /** grows with each command; changes are sent in this order */
  order: number;
  label: string;
  patch: Patch;
  /** the revision it was drawn on */
  base: number;
}

/** One step of the history: what it left and what takes it back. */
export interface HistoryStep {
  label: string;
  step: Patch;
  back: Patch;
  /** ms since 1970 */
  at: number;
}

export interface KeptHistory {
  undo: HistoryStep[];
  redo: HistoryStep[];
  /** one's own work that gave way to somebody else's: kept until it is brought back or thrown away */
  aside: HistoryStep[];
}

interface HistoryRow extends KeptHistory {
  key: string;
  personId: string;
  at: number;
}

interface Tables extends DBSchema {
  changes: { key: string; value: QueuedChange; indexes: { drawing: [string, string] } };
  histories: { key: string; value: HistoryRow };
}

export interface Outbox {
  add(change: QueuedChange): Promise<void>;
  /** Writes changes again after they were rebased; those in `gone` are taken out in the same step. */
  replace(changes: readonly QueuedChange[], gone?: readonly string[]): Promise<void>;
  remove(saveIds: readonly string[]): Promise<void>;
  /** What was drawn in a drawing by a person and not saved, in the order of drawing. */
  unsent(drawingId: string, personId: string): Promise<QueuedChange[]>;
  readHistory(drawingId: string, personId: string, windowId: string): Promise<KeptHistory | undefined>;
  writeHistory(drawingId: string, personId: string, windowId: string, history: KeptHistory): Promise<void>;
  /** For sign-out: the histories of a person go; what is not saved yet stays for the next sign-in. */
  forgetSent(personId: string): Promise<void>;
  close(): void;
}

export const OUTBOX_NAME = 'ohmstead-outbox';
const HISTORY_DAYS = 14;
const historyKey = (drawingId: string, personId: string, windowId: string) => `${drawingId} ${personId} ${windowId}`;

async function dropOldHistories(db: IDBPDatabase<Tables>): Promise<void> {
  const tx = db.transaction('histories', 'readwrite');
  const oldest = Date.now() - HISTORY_DAYS * 86_400_000;
  for (const row of await tx.store.getAll()) if (row.at < oldest) await tx.store.delete(row.key);
  await tx.done;
}

/**
 * Opens the outbox of this browser.
 * @throws when the browser refuses storage; the caller says so aloud and offers the drawing as a file
 */
export async function openOutbox(name = OUTBOX_NAME): Promise<Outbox> {
  const db = await openDB<Tables>(name, 1, {
    upgrade(fresh) {
      fresh.createObjectStore('changes', { keyPath: 'saveId' }).createIndex('drawing', ['drawingId', 'personId']);
      fresh.createObjectStore('histories', { keyPath: 'key' });
    },
    blocking: () => db.close(),
  });
  await dropOldHistories(db);
  const strict = { durability: 'strict' } as const;
  return {
    async add(change) {
      const tx = db.transaction('changes', 'readwrite', strict);
      await Promise.all([tx.store.put(change), tx.done]);
    },
    async replace(changes, gone = []) {
      const tx = db.transaction('changes', 'readwrite', strict);
      await Promise.all([
        ...gone.map((id) => tx.store.delete(id)),
        ...changes.map((change) => tx.store.put(change)),
        tx.done,
      ]);
    },
    async remove(saveIds) {
      const tx = db.transaction('changes', 'readwrite');
      await Promise.all([...saveIds.map((id) => tx.store.delete(id)), tx.done]);
    },
    async unsent(drawingId, personId) {
      const rows = await db.getAllFromIndex('changes', 'drawing', [drawingId, personId]);
      return rows.sort((a, b) => a.order - b.order);
    },
    async readHistory(...of) {
      const row = await db.get('histories', historyKey(...of));
      return row && { undo: row.undo, redo: row.redo, aside: row.aside };
    },
    async writeHistory(drawingId, personId, windowId, history) {
      await db.put('histories', {
        ...history,
        personId,
        key: historyKey(drawingId, personId, windowId),
        at: Date.now(),
      });
    },
    async forgetSent(personId) {
      const tx = db.transaction('histories', 'readwrite');
      for (const row of await tx.store.getAll()) if (row.personId === personId) await tx.store.delete(row.key);
      await tx.done;
    },
    close: () => db.close(),
  };
}
