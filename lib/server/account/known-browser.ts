import 'server-only';
import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { cookies } from 'next/headers';
import { env, isHttps } from '@/lib/server/env';

/**
 * A mark left on a browser on which a person has signed in. It lets nobody in; it only lets that browser's tries be
 * counted apart from those of strangers (see `sign-in-limit.ts`).
 */
const NAME = 'ohmstead-known';
const KEEP_S = 180 * 24 * 3600;

const seal = (email: string, salt: string) =>
  createHmac('sha256', env().NEXTAUTH_SECRET).update(`known browser\n${email}\n${salt}`).digest('base64url');

export async function isKnownBrowser(email: string): Promise<boolean> {
  const [salt, given] = ((await cookies()).get(NAME)?.value ?? '').split('.');
  if (!salt || !given) return false;
  const right = Buffer.from(seal(email, salt));
  const offered = Buffer.from(given);
  return right.length === offered.length && timingSafeEqual(right, offered);
}

export async function markBrowser(email: string): Promise<void> {
  const salt = randomBytes(16).toString('base64url');
  (await cookies()).set(NAME, `${salt}.${seal(email, salt)}`, {
    httpOnly: true,
    sameSite: 'lax',
    secure: isHttps(),
    path: '/api/auth',
    maxAge: KEEP_S,
  });
}
