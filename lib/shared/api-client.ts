import type { ErrorAnswer } from './errors';

/** What became of a request: the answer, or a refusal in words for the person who asked. */
export type Answer<T> = { ok: true; data: T } | { ok: false; offline: boolean; refusal: ErrorAnswer };

type Method = 'GET' | 'POST' | 'PATCH' | 'PUT' | 'DELETE';

const UNREACHED: ErrorAnswer = {
  error: 'failed',
  message: 'Not saved: the server did not answer. What you typed is still here; try again when the network is back.',
};
const UNREADABLE: ErrorAnswer = {
  error: 'failed',
  message: 'Not saved: the server answered with something else than was asked. Try again in a moment.',
};

const isRefusal = (body: unknown): body is ErrorAnswer =>
  typeof body === 'object' && body !== null && typeof (body as ErrorAnswer).error === 'string' && typeof (body as ErrorAnswer).message === 'string';

/**
 * Asks a route of the product. A lost network and a refusal are answers, not exceptions, so that a form can say them
 * and keep what was typed.
 */
export async function callApi<T>(method: Method, path: string, body?: unknown, signal?: AbortSignal): Promise<Answer<T>> {
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      signal,
      ...(body !== undefined && { headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) }),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    return { ok: false, offline: true, refusal: UNREACHED };
  }
  // A proxy in between may answer with a page of its own: that is no answer of ours.
  const data: unknown = response.status === 204 ? undefined : await response.json().catch(() => null);
  if (response.ok && data !== null) return { ok: true, data: data as T };
  return { ok: false, offline: false, refusal: isRefusal(data) ? data : UNREADABLE };
}
