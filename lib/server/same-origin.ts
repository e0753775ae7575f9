import 'server-only';
import { env } from '@/lib/server/env';
import { AppError } from '@/lib/server/errors';

const LOOPBACK = ['localhost', '127.0.0.1', '[::1]'];

/** Origins that are this app: the configured one, and the other names of this machine where that is one of them. */
function ownOrigins(): string[] {
  const { origin, protocol, hostname, port } = new URL(env().NEXTAUTH_URL);
  if (!LOOPBACK.includes(hostname)) return [origin];
  return LOOPBACK.map((name) => `${protocol}//${name}${port && `:${port}`}`);
}

/**
 * Refuses a changing request that another site made a browser send: the cookie goes along with it, these headers tell.
 * A missing Origin is refused as well; every browser sends it with such a request.
 * @throws AppError forbidden
 */
export function checkSameOrigin(request: Request): void {
  const origin = request.headers.get('origin');
  const site = request.headers.get('sec-fetch-site');
  if (origin === null || !ownOrigins().includes(origin) || (site !== null && site !== 'same-origin'))
    throw new AppError('forbidden', 'This request did not come from a page of this app, so nothing was changed.');
}

/** A form of another site can send text or form fields, never this type. */
export function checkJsonType(request: Request): void {
  const type = request.headers.get('content-type') ?? '';
  if (type.split(';')[0]!.trim().toLowerCase() !== 'application/json')
    throw new AppError('invalid', 'The request has to be sent as application/json.');
}
