import { existsSync, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { rules } from '@/diagram/rules/index';

const folder = path.resolve(import.meta.dirname, '../../diagram/rules');

/** A rule file is one that exports a rule; the rest of the folder is the machinery around them. */
const source = (name: string) => readFileSync(path.join(folder, name), 'utf8');
const files = readdirSync(folder)
  .filter((name) => name.endsWith('.ts') && /^export const \w+: Rule = \{$/m.test(source(name)))
  .map((name) => name.slice(0, -3));

describe('the catalogue of rules', () => {
  it('has every rule file in its index, in the order of the alphabet', () => {
    expect(rules.map(({ meta }) => meta.id)).toEqual([...files].sort());
  });

  it.each(rules.map((rule) => [rule.meta.id, rule.meta] as const))('%s is told whole', (id, meta) => {
    expect(existsSync(path.resolve(import.meta.dirname, `rules/${id}.test.ts`)), 'has a test').toBe(true);
    expect(meta.title.length).toBeGreaterThan(10);
    expect(meta.lesson.length).toBeGreaterThan(60);
    expect(meta.lesson).not.toContain('\n');
    expect(meta.remedy).toMatch(/\.$/);
    expect(meta.clauses.length, 'names a clause, or says that it is common practice').toBeGreaterThan(0);
    for (const { document, clause } of meta.clauses) expect(`${document} ${clause}`.trim().length).toBeGreaterThan(5);
  });

  it('says of every clause whether it was seen or remembered', () => {
    for (const { meta } of rules) for (const { memory } of meta.clauses) expect(typeof memory).toBe('boolean');
  });

  it('keeps each rule file small', () => {
    for (const name of files) expect(source(`${name}.ts`).split('\n').length, name).toBeLessThan(160);
  });
});
