import 'server-only';

/** One line of JSON on the error stream. Never pass a request's body, a token or a password. */
export function log(event: string, detail: Record<string, unknown> = {}): void {
  process.stderr.write(`${JSON.stringify({ at: new Date().toISOString(), event, ...detail })}\n`);
}

/** What a fault says of itself, for the log. */
export const describeFault = (error: unknown) =>
  error instanceof Error
    ? { error: error.message, stack: error.stack?.split('\n').slice(1, 6) }
    : { error: String(error) };
