import { encode } from 'next-auth/jwt';
import { beginSession } from '@/lib/server/account/sign-in';
import { sessionCookie } from '@/lib/server/session';
import type { Person } from '@/models';
import { Jar, withJar } from './jar';

export const ORIGIN = 'http://127.0.0.1:3000';

type Handler = (request: Request, context: { params: Promise<never> }) => Promise<Response>;
export interface Asked {
  method?: string;
  path?: string;
  params?: Record<string, string>;
  body?: unknown;
  /** sent as it is, instead of `body` */
  raw?: BodyInit;
  /** a header given as null is left out */
  headers?: Record<string, string | null>;
}
export interface Answer {
  status: number;
  // The tests look into answers of many shapes.
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  body: any;
  headers: Headers;
}

/** A browser of the tests: its cookies, and requests as a page of the app would send them. */
export class Browser {
  constructor(readonly jar = new Jar()) {}

  async ask(handler: unknown, asked: Asked = {}): Promise<Answer> {
    const response = await this.open(handler, asked);
    if (response.headers.get('content-type')?.startsWith('text/event-stream')) {
      // A stream has no end to wait for: that it began is the answer.
      await response.body?.cancel();
      return { status: response.status, body: '', headers: response.headers };
    }
    const text = await response.text();
    const isJson = response.headers.get('content-type')?.includes('json') ?? false;
    return { status: response.status, body: isJson && text ? JSON.parse(text) : text, headers: response.headers };
  }

  /** The answer as it comes, for bodies that are read piece by piece or as bytes. */
  async open(
    handler: unknown,
    { method = 'GET', path = '/', params = {}, body, raw, headers = {} }: Asked = {},
  ): Promise<Response> {
    const sends = method !== 'GET' && method !== 'HEAD';
    const given = {
      ...(sends && { origin: ORIGIN, 'sec-fetch-site': 'same-origin', 'content-type': 'application/json' }),
      ...headers,
    };
    const kept = Object.entries(given).filter((pair): pair is [string, string] => pair[1] !== null);
    const request = new Request(ORIGIN + path, {
      method,
      headers: kept,
      body: raw ?? (sends && body !== undefined ? JSON.stringify(body) : undefined),
    });
    const context = { params: Promise.resolve(params) } as { params: Promise<never> };
    return withJar(this.jar, () => (handler as Handler)(request, context));
  }

  post(handler: unknown, params: Record<string, string>, body?: unknown): Promise<Answer> {
    return this.ask(handler, { method: 'POST', params, body });
  }
}

/** A browser on which the person has just signed in. */
export async function signedIn(person: Pick<Person, 'teamId' | 'id'>): Promise<Browser> {
  const token = await beginSession({ teamId: person.teamId, personId: person.id });
  const jar = new Jar();
  jar.set(sessionCookie(), await encode({ token: { ...token }, secret: process.env.NEXTAUTH_SECRET!, maxAge: 3600 }));
  return new Browser(jar);
}
