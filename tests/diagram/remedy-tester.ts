import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import { buildContext } from '@/diagram/rules/context';
import { remediesFor } from '@/diagram/rules/remedies-for';
import type { Rule } from '@/diagram/rules/types';
import { findingsOf } from './rule-tester';

/** Proves what is offered for the first finding of a rule: each was tried, lost the finding and brought none. */
export function testRemedies(rule: Rule, cases: Record<string, { drawing: Drawing; offers: string[] }>): void {
  describe(`${rule.meta.id}, remedies`, () => {
    for (const [name, { drawing, offers }] of Object.entries(cases)) {
      it(name, () => {
        const document = drawing.document();
        const finding = findingsOf(document).find((each) => each.rule === rule.meta.id);
        expect(finding).toBeDefined();
        expect(remediesFor(document, finding!).map(({ label }) => label)).toEqual(offers);
      });
    }
  });
}

/** What a rule waits for in a drawing, in its own words. */
export function lacksOf(rule: Rule, drawing: Drawing): string[] {
  return [...(rule.lacks?.(buildContext(drawing.document())) ?? [])].map(({ what }) => what);
}
