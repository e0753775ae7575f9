import type { ErrorAnswer } from '@/lib/shared/errors';
import type { Change, SaveAnswer, SavedChange, StaleAnswer } from '@/lib/shared/drawings';

/** What became of a change that was sent. */
export type SaveResult =
  | { kind: 'saved'; rev: number }
  /** somebody saved meanwhile */
  | { kind: 'stale'; since: SavedChange[] }
  | { kind: 'signed-out' }
  /** it will never be taken as it is */
  | { kind: 'refused'; message: string }
  /** no answer, or one that says to try again */
  | { kind: 'unreachable' };

export interface DrawingApi {
  save(drawingId: string, change: Change): Promise<SaveResult>;
  /** The changes after a revision; null when there is no answer. */
  since(drawingId: string, rev: number): Promise<SavedChange[] | null>;
}

const REFUSALS: ReadonlySet<number> = new Set([400, 403, 404, 410, 413, 422]);

async function readBody<T>(response: Response): Promise<T | null> {
  // A proxy in between may answer with a page of its own: that is no answer of ours.
  return response.json().catch(() => null) as Promise<T | null>;
}

/** The drawing routes over the network. A lost connection is an answer here, not an exception: the outbox tries again. */
export const drawingApi: DrawingApi = {
  async save(drawingId, change) {
    let response: Response;
    try {
      response = await fetch(`/api/drawings/${drawingId}/changes`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(change),
      });
    } catch {
      return { kind: 'unreachable' };
    }
    if (response.status === 401) return { kind: 'signed-out' };
    const body = await readBody<SaveAnswer | StaleAnswer | ErrorAnswer>(response);
    if (!body) return { kind: 'unreachable' };
    if (response.ok && 'rev' in body) return { kind: 'saved', rev: body.rev };
    if (response.status === 409 && 'since' in body) return { kind: 'stale', since: body.since };
    if (REFUSALS.has(response.status) || response.status === 409)
      return { kind: 'refused', message: 'message' in body ? body.message : 'The change was refused.' };
    return { kind: 'unreachable' };
  },
  async since(drawingId, rev) {
    try {
      const response = await fetch(`/api/drawings/${drawingId}/changes?since=${rev}`);
      if (!response.ok) return null;
      return (await readBody<{ changes: SavedChange[] }>(response))?.changes ?? null;
    } catch {
      return null;
    }
  },
};
