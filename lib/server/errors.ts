import 'server-only';
import type { ErrorAnswer } from '@/lib/shared/errors';

type Code = ErrorAnswer['error'];

/** The one map from what went wrong to HTTP. */
export const STATUS: Record<Code, number> = {
  invalid: 400,
  'signed-out': 401,
  forbidden: 403,
  missing: 404,
  conflict: 409,
  stale: 409,
  'too-many': 429,
  'too-large': 413,
  failed: 500,
};

/** A refusal with words for the person who asked. Anything else that is thrown is a fault of ours and is answered as `failed`. */
export class AppError extends Error {
  constructor(
    readonly code: Code,
    message: string,
    /** further parts of the answer: named fields, the changes since */
    readonly more: Record<string, unknown> = {},
  ) {
    super(message);
  }
}

/** The same words whether a thing is not there or belongs to somebody else. */
export const missing = (what: string) =>
  new AppError('missing', `There is no such ${what}, or it is not yours to see.`);
