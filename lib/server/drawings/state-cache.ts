import 'server-only';
import type { Installation } from '@/diagram/document/schema';

/** A drawing as it stands at a revision. */
export interface DrawingState {
  rev: number;
  /** of the newest change */
  hash: string;
  document: Installation;
}

const MOST_DRAWINGS = 60;
const MOST_BYTES = 60_000_000;

const entries = new Map<string, { state: DrawingState; bytes: number }>();
let total = 0;

const key = (teamId: string, drawingId: string) => `${teamId}/${drawingId}`;

/** A wide guess, so that the cache is bounded by memory and not only by number. */
const weigh = ({ parts, wires, cables }: Installation) => 2_000 + 400 * (parts.length + wires.length + cables.length);

export function forget(teamId: string, drawingId: string): void {
  const entry = entries.get(key(teamId, drawingId));
  if (!entry) return;
  total -= entry.bytes;
  entries.delete(key(teamId, drawingId));
}

/** The state kept from an earlier save or reading; any loss is made good from the log. */
export function recall(teamId: string, drawingId: string): DrawingState | undefined {
  const entry = entries.get(key(teamId, drawingId));
  if (!entry) return undefined;
  entries.delete(key(teamId, drawingId));
  entries.set(key(teamId, drawingId), entry); // newest last
  return entry.state;
}

/** Keeps a state that is in the database; an older one never replaces a newer one. */
export function keep(teamId: string, drawingId: string, state: DrawingState): void {
  const known = entries.get(key(teamId, drawingId));
  if (known && known.state.rev > state.rev) return;
  forget(teamId, drawingId);
  const bytes = weigh(state.document);
  entries.set(key(teamId, drawingId), { state, bytes });
  total += bytes;
  for (const [oldest, entry] of entries) {
    if (entries.size <= MOST_DRAWINGS && total <= MOST_BYTES) break;
    entries.delete(oldest);
    total -= entry.bytes;
  }
}
