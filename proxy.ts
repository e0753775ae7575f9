import { NextResponse, type NextRequest } from 'next/server';
import { FILE_POLICY } from '@/lib/shared/file-policy';
import { sessionCookieName } from '@/lib/shared/session-cookie';

/**
 * Headers for every answer, and a kindness: whoever has no session cookie is shown the sign-in sheet at once. It is no
 * wall. Who may see what is decided in the server functions, which read the session row themselves; with this file gone
 * every page and route still refuses.
 */
const OPEN = ['/signin', '/invitation', '/rules'];
const isOpen = (path: string) => path === '/' || OPEN.some((open) => path === open || path.startsWith(`${open}/`));

const isDevelopment = process.env.NODE_ENV === 'development';
const isHttps = (process.env.NEXTAUTH_URL ?? '').startsWith('https:');

/** Here the headers of the file's own answer would be written over. */
const FILES = /^\/api\/(drawings|uploads)\//;

/** Scripts run only with the nonce of this answer; the sheet's symbols and the canvas set style attributes. */
function contentPolicy(nonce: string): string {
  return [
    `default-src 'self'`,
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDevelopment ? ` 'unsafe-eval'` : ''}`,
    `style-src 'self' 'unsafe-inline'`,
    `img-src 'self' data: blob:`,
    `font-src 'self' data:`,
    `connect-src 'self'`,
    `worker-src 'self' blob:`,
    `object-src 'none'`,
    `base-uri 'none'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
  ].join('; ');
}

function withHeaders(response: NextResponse, policy: string): NextResponse {
  const { headers } = response;
  headers.set('content-security-policy', policy);
  headers.set('x-content-type-options', 'nosniff');
  headers.set('x-frame-options', 'DENY');
  headers.set('referrer-policy', 'same-origin');
  headers.set('permissions-policy', 'camera=(), microphone=(), geolocation=()');
  headers.set('cross-origin-opener-policy', 'same-origin');
  headers.set('cross-origin-resource-policy', 'same-origin');
  if (isHttps) headers.set('strict-transport-security', 'max-age=63072000; includeSubDomains');
  return response;
}

export function proxy(request: NextRequest): NextResponse {
  const { pathname, search } = request.nextUrl;
  const policy = FILES.test(pathname) ? FILE_POLICY : contentPolicy(Buffer.from(crypto.randomUUID()).toString('base64'));
  const hasCookie = request.cookies.has(sessionCookieName(isHttps));
  const isPage = !pathname.startsWith('/api/') && !pathname.startsWith('/_next/') && !/\.[a-z0-9]+$/i.test(pathname);
  if (isPage && !isOpen(pathname) && !hasCookie) {
    const signin = new URL('/signin', process.env.NEXTAUTH_URL ?? request.url);
    signin.searchParams.set('next', pathname + search);
    return withHeaders(NextResponse.redirect(signin), policy);
  }
  // The framework reads the nonce from the request's own copy of the header.
  const headers = new Headers(request.headers);
  headers.set('content-security-policy', policy);
  return withHeaders(NextResponse.next({ request: { headers } }), policy);
}
