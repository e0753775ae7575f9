import 'server-only';
import { AppError } from '@/lib/server/errors';

const WINDOW_MS = 60_000;
const PER_PERSON = 30;
const PER_TEAM = 120;

const counts = new Map<string, { ends: number; used: number }>();

function take(key: string, limit: number, now: number): void {
  const entry = counts.get(key);
  if (!entry || entry.ends <= now) {
    counts.set(key, { ends: now + WINDOW_MS, used: 1 });
    return;
  }
  if (entry.used >= limit) {
    const wait = Math.ceil((entry.ends - now) / 1000);
    throw new AppError('too-many', `That was asked for often just now. Wait ${wait} s.`, { wait });
  }
  entry.used += 1;
}

/** Holds back costly answers (PDF, exports): so many a minute for a person and for a team, in this process. */
export function throttle(actor: { teamId: string; personId: string }, now = Date.now()): void {
  if (counts.size > 5_000) for (const [key, { ends }] of counts) if (ends <= now) counts.delete(key);
  take(`person ${actor.teamId} ${actor.personId}`, PER_PERSON, now);
  take(`team ${actor.teamId}`, PER_TEAM, now);
}
