import type { PersonRole } from '@/lib/shared/people';
import type { Tab } from './types';

const jobs: Tab = { id: 'jobs', label: 'Jobs', href: '/jobs', apart: true };

/** The sheets of one job's set. */
export const jobTabs = (jobId: string): Tab[] => [
  jobs,
  { id: 'survey', number: 1, label: 'Survey', href: `/jobs/${jobId}/survey` },
  { id: 'overview', number: 2, label: 'Overview', href: `/jobs/${jobId}/overview` },
  { id: 'connections', number: 3, label: 'Connections', href: `/jobs/${jobId}/connections` },
  { id: 'schedules', number: 4, label: 'Schedules', href: `/jobs/${jobId}/schedules` },
  { id: 'rehearsal', number: 5, label: 'Rehearsal', href: `/jobs/${jobId}/rehearsal` },
  { id: 'plan', label: 'Plan', href: `/jobs/${jobId}/plan` },
  { id: 'photographs', label: 'Photographs', href: `/jobs/${jobId}/photographs` },
];

/** The team's own sheets, shown when no job is open: only those that this person may turn to. */
export const teamTabs = (roles: readonly PersonRole[]): Tab[] => [
  jobs,
  ...(roles.some((role) => role !== 'apprentice') ? [{ id: 'people', label: 'People', href: '/people' }] : []),
  { id: 'rules', label: 'Rules', href: '/rules' },
];
