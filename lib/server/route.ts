import 'server-only';
import type { z } from 'zod';
import type { Actor } from '@/lib/server/actor';
import { AppError, STATUS, missing } from '@/lib/server/errors';
import { describeFault, log } from '@/lib/server/log';
import { readBytes, readJson } from '@/lib/server/read-body';
import { checkJsonType, checkSameOrigin } from '@/lib/server/same-origin';
import { currentActor } from '@/lib/server/session';
import { throttle } from '@/lib/server/throttle';

const MAX_BYTES = 64 * 1024;
const SAFE = new Set(['GET', 'HEAD']);

interface Spec<P, Q, B> {
  params?: z.ZodType<P>;
  query?: z.ZodType<Q>;
  body?: z.ZodType<B>;
  /** the body is a file as it is; a form of another site cannot send its type */
  file?: boolean;
  /** of the body; 64 kB where not given */
  maxBytes?: number;
  /** of a good answer; 200 where not given */
  status?: number;
  /** held back when asked for often */
  costly?: boolean;
}
interface Input<P, Q, B> {
  params: P;
  query: Q;
  body: B;
  /** present where the spec asks for one */
  file: { bytes: Buffer; type: string };
}
type Context = { params: Promise<unknown> };

const HEADERS = { 'cache-control': 'no-store', 'x-content-type-options': 'nosniff' };

/** The names of the fields that are wrong, each with its first reason. */
function invalid(error: z.ZodError): AppError {
  const fields: Record<string, string> = {};
  for (const { path, message } of error.issues) fields[path.join('.') || '(all)'] ??= message;
  return new AppError('invalid', 'Something in what was sent is not right; nothing was changed.', { fields });
}

function parse<T>(schema: z.ZodType<T> | undefined, data: unknown): T {
  if (!schema) return undefined as T;
  const result = schema.safeParse(data);
  if (!result.success) throw invalid(result.error);
  return result.data;
}

function parseQuery(url: string): Record<string, string> {
  const query: Record<string, string> = {};
  for (const [name, value] of new URL(url).searchParams) {
    if (Object.hasOwn(query, name)) throw new AppError('invalid', `"${name}" is given twice in the address.`);
    query[name] = value;
  }
  return query;
}

/** Types that a form of another site can send without asking. */
const FORM_TYPES = new Set(['', 'text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data']);

async function readFile(request: Request, maxBytes: number): Promise<{ bytes: Buffer; type: string }> {
  const type = (request.headers.get('content-type') ?? '').split(';')[0]!.trim().toLowerCase();
  if (FORM_TYPES.has(type)) throw new AppError('invalid', 'The file has to be sent as it is, with its own type.');
  return { bytes: await readBytes(request, maxBytes), type };
}

function answerFault(error: unknown, request: Request): Response {
  const known = error instanceof AppError;
  if (!known)
    log('route.failed', { method: request.method, path: new URL(request.url).pathname, ...describeFault(error) });
  const answer = known ? error : new AppError('failed', 'The server could not do this. Nothing was lost; try again.');
  const wait = answer.more.wait;
  return Response.json(
    { error: answer.code, message: answer.message, ...answer.more },
    {
      status: STATUS[answer.code],
      headers: { ...HEADERS, ...(typeof wait === 'number' && { 'retry-after': String(wait) }) },
    },
  );
}

function build<P, Q, B>(
  { params, query, body, file, maxBytes = MAX_BYTES, status = 200 }: Spec<P, Q, B>,
  admit: () => Promise<(input: Input<P, Q, B>) => Promise<unknown>>,
) {
  return async (request: Request, context: Context): Promise<Response> => {
    try {
      if (!SAFE.has(request.method)) checkSameOrigin(request);
      const handle = await admit();
      const where = params?.safeParse(await context.params);
      if (where && !where.success) throw missing('thing');
      if (body) checkJsonType(request);
      const result = await handle({
        params: where?.data as P,
        query: parse(query, query && parseQuery(request.url)),
        body: parse(body, body && (await readJson(request, maxBytes))),
        file: file ? await readFile(request, maxBytes) : { bytes: Buffer.alloc(0), type: '' },
      });
      return result instanceof Response ? result : Response.json(result, { status, headers: HEADERS });
    } catch (error) {
      return answerFault(error, request);
    }
  };
}

/**
 * A route for people who are signed in: refuses what another site sent, signs in, parses, calls, and maps what is thrown
 * to the one shape of refusals. What the actor may do is decided in the function that is called, never here.
 */
export function route<P = undefined, Q = undefined, B = undefined>(
  spec: Spec<P, Q, B>,
  handle: (input: Input<P, Q, B> & { actor: Actor }) => Promise<unknown>,
) {
  return build(spec, async () => {
    const actor = await currentActor();
    if (!actor) throw new AppError('signed-out', 'You are not signed in, or your sign-in has ended.');
    if (spec.costly) throttle(actor);
    return (input) => handle({ ...input, actor });
  });
}

/** A route that needs no sign-in, because what is sent proves the right (a one-time token). */
export function openRoute<P = undefined, Q = undefined, B = undefined>(
  spec: Spec<P, Q, B>,
  handle: (input: Input<P, Q, B>) => Promise<unknown>,
) {
  return build(spec, async () => handle);
}
