import { isDatabaseUp } from '@/lib/server/health';

/** GET /api/health says whether the app and its database answer; nothing of what is in it. */
export async function GET(): Promise<Response> {
  const ok = await isDatabaseUp();
  return Response.json({ ok }, { status: ok ? 200 : 503, headers: { 'cache-control': 'no-store' } });
}
