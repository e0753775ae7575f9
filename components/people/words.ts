import type { StampShape } from '@/components/ui/stamp';
import type { PersonRole, PersonRow } from '@/lib/shared/people';

/** What a role may do, in a line. */
export const ROLE_WORDS: Record<PersonRole, string> = {
  apprentice: 'draws in jobs that are given to them',
  electrician: 'draws in all jobs of the team, begins and gives them',
  trainer: 'reads what apprentices draw',
  admin: 'invites people, sets roles, switches off',
};

export const STATUS: Record<PersonRow['status'], { word: string; shape: StampShape }> = {
  active: { word: 'active', shape: 'outlined' },
  waiting: { word: 'invited', shape: 'dashed' },
  off: { word: 'off', shape: 'filled' },
};
