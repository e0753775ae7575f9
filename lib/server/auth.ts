import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import type { OAuthConfig } from 'next-auth/providers/oauth';
import { beginSession, invitedPerson, signIn } from '@/lib/server/account/sign-in';
import { endSession } from '@/lib/server/account/end-sessions';
import { env, isHttps } from '@/lib/server/env';
import { log } from '@/lib/server/log';
import { LONGEST_H, TokenSchema, actorOf, sessionCookie } from '@/lib/server/session';

/** The one place that knows next-auth: how people prove who they are. What they may do is not its business. */

interface Profile {
  sub: string;
  email?: string;
  email_verified?: boolean;
}

const credentials = CredentialsProvider({
  credentials: { email: { type: 'email' }, password: { type: 'password' } },
  async authorize(typed, request) {
    // The server writes this header itself from the connection (see lib/scripts/trusted-headers.mjs).
    const address = String(request.headers?.['x-forwarded-for'] ?? 'unknown');
    const result = await signIn(String(typed?.email ?? ''), String(typed?.password ?? ''), address);
    if (result === null) return null;
    if ('wait' in result) throw new Error(`wait:${result.wait}`);
    return { id: result.who.personId, teamId: result.who.teamId };
  },
});

function singleSignOn(): OAuthConfig<Profile>[] {
  const { OIDC_ISSUER: issuer, OIDC_CLIENT_ID: clientId, OIDC_CLIENT_SECRET: clientSecret, OIDC_NAME: name } = env();
  if (!issuer) return [];
  return [
    {
      id: 'oidc',
      name,
      type: 'oauth',
      wellKnown: new URL('.well-known/openid-configuration', issuer.replace(/\/*$/, '/')).href,
      clientId,
      clientSecret,
      idToken: true,
      checks: ['pkce', 'state', 'nonce'],
      authorization: { params: { scope: 'openid email' } },
      profile: ({ sub, email }) => ({ id: sub, email }),
    },
  ];
}

const verifiedEmail = (profile: unknown): string | null => {
  const { email, email_verified: verified } = (profile ?? {}) as Profile;
  return verified === true && typeof email === 'string' ? email : null;
};

/** Links lead back into this app only. */
const ownAddress = (url: string, base: string): string => {
  const target = URL.canParse(url, base) ? new URL(url, base) : null;
  return target?.origin === new URL(base).origin ? target.href : base;
};

export function authOptions(): NextAuthOptions {
  const secure = isHttps();
  return {
    secret: env().NEXTAUTH_SECRET,
    providers: [credentials, ...singleSignOn()],
    pages: { signIn: '/signin', signOut: '/signin', error: '/signin' },
    session: { strategy: 'jwt', maxAge: LONGEST_H * 3600 },
    useSecureCookies: secure,
    cookies: {
      sessionToken: { name: sessionCookie(), options: { httpOnly: true, sameSite: 'lax', path: '/', secure } },
    },
    callbacks: {
      redirect: ({ url, baseUrl }) => ownAddress(url, baseUrl),
      async signIn({ account, profile }) {
        if (account?.provider !== 'oidc') return true;
        const email = verifiedEmail(profile);
        return email !== null && (await invitedPerson(email)) !== null ? true : '/signin?error=NotInvited';
      },
      /** At a sign-in the cookie is made anew and only names the session; afterwards it is passed on as it is. */
      async jwt({ token, user, account, profile }) {
        if (!user) return token;
        const email = account?.provider === 'oidc' ? verifiedEmail(profile) : null;
        const who = email
          ? await invitedPerson(email)
          : { teamId: (user as unknown as { teamId: string }).teamId, personId: user.id };
        if (!who) throw new Error('not invited');
        return { ...(await beginSession(who)) };
      },
      /** What the browser may learn of itself; nothing once the session has ended. */
      async session({ session, token }) {
        const opened = TokenSchema.safeParse(token);
        const actor = opened.success ? await actorOf(opened.data) : null;
        return { expires: session.expires, user: actor ? { name: actor.name } : undefined };
      },
    },
    events: {
      async signOut({ token }) {
        const opened = TokenSchema.safeParse(token);
        if (opened.success) await endSession(opened.data);
      },
    },
    logger: {
      error: (code, detail) =>
        log('auth.error', {
          code,
          error: detail instanceof Error ? detail.message : String((detail as { message?: string })?.message ?? ''),
        }),
      warn: () => undefined,
      debug: () => undefined,
    },
  };
}
