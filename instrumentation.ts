/** Runs once when the server starts: wrong settings stop it here, in words, and not at somebody's first click. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { env } = await import('@/lib/server/env');
  env();
  const { startSweeping } = await import('@/lib/server/drawings/sweep');
  startSweeping();
}
