import { describe, expect, it } from 'vitest';
import { readDocument } from '@/diagram/document/schema';
import { findingsOf } from '../rule-tester';
import { BACKUP } from './backup';
import { CIRCUITS } from './circuits';
import { CONDUCTORS } from './conductors';
import { LOADS } from './loads';
import { POLARITY } from './polarity';
import type { Tricky } from './tricky';

const ALL: Record<string, Tricky> = { ...CIRCUITS, ...POLARITY, ...BACKUP, ...LOADS, ...CONDUCTORS };

/**
 * Drawings of a careful electrician who tries to fool the examination: what they must find was decided by hand, before they
 * were examined (common practice, no source).
 */
describe('drawings made to fool', () => {
  it.each(Object.entries(ALL))('%s', (_, { drawing, found, at, conditions, advice = [] }) => {
    const document = drawing.document();
    expect(readDocument(JSON.parse(JSON.stringify(document))).ok).toBe(true);
    const findings = findingsOf(document);
    const serious = findings.filter(({ severity }) => severity !== 'advice');
    expect(serious.map(({ rule }) => rule).sort()).toEqual([...found].sort());
    const [first] = serious.filter(({ rule }) => rule === found[0]);
    if (at) expect([...first!.parts, ...first!.wires].filter((id) => at.includes(id))).not.toEqual([]);
    if (conditions) expect(first!.conditions).toEqual(conditions);
    expect(findings.map(({ rule }) => rule)).toEqual(expect.arrayContaining(advice));
  });

  it('are more than a hundred, a quarter of them right as drawn', () => {
    const all = Object.values(ALL);
    expect(all.length).toBeGreaterThan(100);
    expect(all.filter(({ found }) => found.length === 0).length).toBeGreaterThan(all.length / 4);
  });
});
