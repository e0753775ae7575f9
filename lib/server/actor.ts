import 'server-only';
import type { PersonRole } from '@/lib/shared/people';

/** Whoever asks, as read from the database for this very request. Every server function takes one first. */
export interface Actor {
  teamId: string;
  team: string;
  personId: string;
  sessionId: string;
  name: string;
  initials: string;
  roles: readonly PersonRole[];
}

/** "T. B." of "Tessa van den Brand": the first and the last name. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/);
  const letters = [words[0], words.length > 1 ? words.at(-1) : undefined].flatMap((word) => word && [...word][0]!);
  return letters.map((letter) => `${letter!.toLocaleUpperCase('en')}.`).join(' ');
}
