import { backup } from './backup';
import { drawing } from './drawing';
import { overload } from './overload';
import { polarity } from './polarity';
import { separation } from './separation';
import { shock } from './shock';
import type { Lesson } from './types';

const lessons: Record<string, () => Lesson> = {
  ...polarity,
  ...separation,
  ...shock,
  ...overload,
  ...backup,
  ...drawing,
};

/** Ids of the rules that have a lesson. */
export const lessonIds: readonly string[] = Object.keys(lessons);

/** The two homes that show what a rule is about, drawn anew; undefined for a rule that is not known. */
export const lessonFor = (ruleId: string): Lesson | undefined =>
  Object.hasOwn(lessons, ruleId) ? lessons[ruleId]!() : undefined;
