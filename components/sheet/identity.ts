/** A v4 uuid. `crypto.randomUUID` is absent where a firm serves the product over plain http; random values are not. */
export function newUuid(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  bytes[6] = (bytes[6]! & 0x0f) | 0x40;
  bytes[8] = (bytes[8]! & 0x3f) | 0x80;
  const hex = [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join('-');
}

const KEY = 'ohmstead-window';
const lockOf = (windowId: string) => `ohmstead-window ${windowId}`;

/** Takes a lock that lives as long as this window; false when another window holds it. */
function hold(windowId: string): Promise<boolean> {
  return new Promise((resolve) => {
    void navigator.locks.request(lockOf(windowId), { ifAvailable: true }, (lock) => {
      resolve(lock !== null);
      return lock === null ? undefined : new Promise<never>(() => undefined);
    });
  });
}

/**
 * The id of this window: the same after a reload, another in a duplicated tab. Its history and its unsent changes carry
 * it.
 */
export async function claimWindow(): Promise<string> {
  const kept = sessionStorage.getItem(KEY);
  if (kept && (!navigator.locks || (await hold(kept)))) return kept;
  const fresh = newUuid();
  sessionStorage.setItem(KEY, fresh);
  if (navigator.locks) await hold(fresh);
  return fresh;
}

/** Ids of the windows of this browser that are open now; null where the browser cannot tell. */
export async function openWindows(): Promise<Set<string> | null> {
  if (!navigator.locks) return null;
  const { held = [] } = await navigator.locks.query();
  const prefix = lockOf('');
  return new Set(held.flatMap((lock) => (lock.name?.startsWith(prefix) ? [lock.name.slice(prefix.length)] : [])));
}
