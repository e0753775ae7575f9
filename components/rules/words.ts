import type { Clause, RuleMeta, Severity } from '@/diagram/rules/types';
import type { StampShape } from '@/components/ui/stamp';

export const GROUPS: Record<RuleMeta['group'], string> = {
  polarity: 'Polarity and continuity',
  separation: 'Separation of circuits and sources',
  shock: 'Protection against shock',
  overload: 'Overload and short circuit',
  backup: 'Backup',
  drawing: 'Drawing and file',
};
/** The same where there is room for one word. */
export const GROUP_WORD: Record<RuleMeta['group'], string> = {
  polarity: 'Polarity',
  separation: 'Sources',
  shock: 'Shock',
  overload: 'Overload',
  backup: 'Backup',
  drawing: 'Drawing',
};
export const GROUP_ORDER = Object.keys(GROUPS) as RuleMeta['group'][];

export const SEVERITY: Record<Severity, { shape: StampShape; means: string }> = {
  danger: { shape: 'red', means: 'can hurt someone or start a fire as drawn' },
  defect: { shape: 'outlined', means: 'does not work, or breaks a rule of the standard' },
  advice: { shape: 'dashed', means: 'good practice' },
};
export const SEVERITIES = Object.keys(SEVERITY) as Severity[];

export const clauseWords = ({ document, clause }: Clause): string => (clause === '' ? document : `${document}, ${clause}`);

/** "IEC, IN, GB" or "all practices". */
export const practiceWords = ({ practices }: RuleMeta): string => practices?.join(', ') ?? 'all practices';

/** The first sentence of a lesson, for the list. */
export const opening = (lesson: string): string => /^.*?[.!?](?=\s|$)/.exec(lesson)?.[0] ?? lesson;
