import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import type { Installation } from '@/diagram/document/schema';
import { buildContext } from '@/diagram/rules/context';
import { rules } from '@/diagram/rules/index';
import { runRules } from '@/diagram/rules/run';
import type { Finding, Rule } from '@/diagram/rules/types';

/** What a finding must be; a field left out is not looked at. Lists are compared as sets. */
export interface Expected {
  parts?: string[];
  wires?: string[];
  conditions?: string[];
  severity?: Finding['severity'];
  message?: RegExp;
}

interface Near {
  drawing: Drawing;
  /** other rules that may speak here; every other danger or defect fails the test */
  also?: string[];
}

interface Wrong extends Near {
  findings: Expected[];
}

export interface Cases {
  /** drawings that the rule must leave alone: near misses, mostly */
  valid: Record<string, Drawing | Near>;
  /** drawings in which it must find exactly this */
  invalid: Record<string, Wrong>;
}

const deepFreeze = <T>(value: T): T => {
  if (typeof value === 'object' && value !== null) Object.values(Object.freeze(value)).forEach(deepFreeze);
  return value;
};

/** Every finding of a drawing, having proved that looking did not change it. */
export function findingsOf(document: Installation): Finding[] {
  const before = JSON.stringify(document);
  const findings = runRules(buildContext(deepFreeze(document)), rules);
  expect(JSON.stringify(document)).toBe(before);
  return findings;
}

const describeFinding = ({ rule, severity, parts, wires, conditions }: Finding): string =>
  `${severity} ${rule} at ${[...parts, ...wires].join(' ')} in ${conditions.join(' ')}`;

function others(findings: Finding[], rule: Rule, also: string[] = []): string[] {
  return findings
    .filter((finding) => finding.rule !== rule.meta.id && finding.severity !== 'advice' && !also.includes(finding.rule))
    .map(describeFinding);
}

const sorted = (ids: readonly string[]): string[] => [...ids].sort();

function matches(finding: Finding, expected: Expected): void {
  if (expected.parts) expect(sorted(finding.parts)).toEqual(sorted(expected.parts));
  if (expected.wires) expect(sorted(finding.wires)).toEqual(sorted(expected.wires));
  if (expected.conditions) expect(finding.conditions).toEqual(expected.conditions);
  if (expected.severity) expect(finding.severity).toBe(expected.severity);
  if (expected.message) expect(finding.message).toMatch(expected.message);
}

/** Proves a rule in both directions: silent on near misses, and exactly the expected findings where it must speak. */
export function testRule(rule: Rule, { valid, invalid }: Cases): void {
  describe(rule.meta.id, () => {
    for (const [name, entry] of Object.entries(valid)) {
      it(`leaves alone: ${name}`, () => {
        const near = 'drawing' in entry ? entry : { drawing: entry, also: [] };
        const findings = findingsOf(near.drawing.document());
        expect(findings.filter((finding) => finding.rule === rule.meta.id).map(describeFinding)).toEqual([]);
        expect(others(findings, rule, near.also)).toEqual([]);
      });
    }
    for (const [name, { drawing, findings: expected, also }] of Object.entries(invalid)) {
      it(`finds: ${name}`, () => {
        const findings = findingsOf(drawing.document());
        const own = findings.filter((finding) => finding.rule === rule.meta.id);
        expect(own.map(describeFinding)).toHaveLength(expected.length);
        own.forEach((finding, i) => matches(finding, expected[i]!));
        expect(others(findings, rule, also)).toEqual([]);
        for (const { message, heading } of own) expect(`${heading} ${message}`).not.toMatch(/undefined|NaN|\[object/);
      });
    }
  });
}
