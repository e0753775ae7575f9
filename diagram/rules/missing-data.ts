import { listNames } from '../document/names';
import { COMMON_PRACTICE } from './clauses';
import type { Context } from './context';
import type { Lack, Rule } from './types';
import { capital } from './readings/words';

/** What the drawing leaves out, with the rules that wait for it; the same value is named once. */
function lacking(context: Context, rules: readonly Rule[]): { lack: Lack; waiting: string[] }[] {
  const found = new Map<string, { lack: Lack; waiting: string[] }>();
  for (const rule of rules) {
    if (rule.meta.practices && !rule.meta.practices.includes(context.practice)) continue;
    for (const lack of rule.lacks?.(context) ?? []) {
      const key = [lack.what, ...lack.parts, ...(lack.wires ?? [])].join(' ');
      const entry = found.get(key) ?? { lack, waiting: [] };
      if (!entry.waiting.includes(rule.meta.id)) entry.waiting.push(rule.meta.id);
      found.set(key, entry);
    }
  }
  return [...found.values()];
}

/** A value without which a judgement could not be made. */
export const missingData: Rule = {
  meta: {
    id: 'missing-data',
    severity: 'advice',
    group: 'drawing',
    title: 'A value is missing, so something is not judged',
    clauses: [COMMON_PRACTICE],
    lesson:
      'What is not known is not guessed. A rule that lacks a value says nothing, and silence looks like approval; so the lack itself is said.',
    remedy: 'Type the value, measured or from the plate.',
  },
  *check(context, all) {
    for (const { lack, waiting } of lacking(context, all)) {
      yield {
        heading: `${capital(lack.what)} is missing`,
        message: `${listNames(waiting)} cannot be judged without ${lack.what}.`,
        parts: lack.parts,
        wires: lack.wires ?? [],
      };
    }
  },
};
