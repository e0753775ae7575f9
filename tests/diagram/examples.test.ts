import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import type { Finding } from '@/diagram/rules/types';

/** The example documents: each but the two clean ones has one fault. */
const folder = path.resolve(import.meta.dirname, '../fixtures/examples');

interface Expected {
  must?: { rules: string[]; at?: string[]; on?: string; severity?: Finding['severity'] };
  /** rule ids; `rule in condition` where only that condition is excluded */
  not: string[];
}

const EXAMPLES: Record<string, Expected> = {
  'clean-flat': { not: ['danger', 'defect', 'missing-data'] },
  'clean-backup-home': { must: { rules: ['live-after-main-off'], severity: 'advice' }, not: ['danger', 'defect'] },
  'switched-neutral': {
    must: { rules: ['switched-neutral'], at: ['S2'] },
    not: ['open-neutral', 'short-circuit', 'missing-earth'],
  },
  'missing-earth': { must: { rules: ['missing-earth'], at: ['E5', 'JEE5'] }, not: ['no-main-earth', 'open-neutral'] },
  'mixed-feeds': { must: { rules: ['mixed-feeds'], at: ['Q11', 'Q12', 'w043'] }, not: ['backfeed', 'short-circuit'] },
  'borrowed-neutral': {
    must: { rules: ['borrowed-neutral'], at: ['E1', 'w023'] },
    not: ['residual-imbalance', 'open-neutral'],
  },
  'backup-neutral-other-rcd': {
    must: {
      rules: ['backup-neutral-behind-other-rcd', 'backup-neutral-lost'],
      at: ['Q12', 'w051', 'E2', 'E3', 'X2'],
      on: 'outage',
    },
    not: ['open-line', 'missing-earth', 'backfeed'],
  },
  'backfeed-plug': { must: { rules: ['backfeed'], on: 'outage' }, not: ['missing-earth', 'no-main-earth'] },
  'undersized-cable': {
    must: { rules: ['undersized-cable'], at: ['Q13', 'w037', 'w038', 'w041'] },
    not: ['overloaded-way'],
  },
  'lost-earth-reference': {
    must: { rules: ['no-earth-reference-on-backup'], on: 'main-off' },
    not: ['backup-neutral-lost', 'earth-neutral-joined', 'no-earth-reference-on-backup in outage'],
  },
};

function load(name: string): Installation {
  const read = readDocument(JSON.parse(readFileSync(path.join(folder, `${name}.json`), 'utf8')));
  if (!read.ok) throw new Error(JSON.stringify(read.errors));
  return read.document;
}

/** What a finding counts as in the column of what must not appear. */
const excludes = (finding: Finding): string[] => [
  finding.rule,
  finding.severity,
  ...finding.conditions.map((name) => `${finding.rule} in ${name}`),
];

describe('the example documents', () => {
  it('are all here', () => {
    expect(
      readdirSync(folder)
        .filter((name) => name.endsWith('.json'))
        .sort(),
    ).toEqual(
      Object.keys(EXAMPLES)
        .map((name) => `${name}.json`)
        .sort(),
    );
  });

  describe.each(Object.entries(EXAMPLES))('%s', (name, { must, not }) => {
    const { findings } = examine(load(name));

    it(must ? 'has what must appear' : 'need not have anything', () => {
      if (!must) return expect(findings).toEqual([]);
      const { rules, at, on, severity } = must;
      const found = findings.filter(({ rule }) => rules.includes(rule));
      expect(found).toHaveLength(1);
      if (at) expect([...found[0]!.parts, ...found[0]!.wires].some((id) => at.includes(id))).toBe(true);
      if (on) expect(found[0]!.conditions).toContain(on);
      if (severity) expect(found[0]!.severity).toBe(severity);
    });

    it('has nothing that must not appear', () => {
      expect(findings.flatMap(excludes).filter((what) => not.includes(what))).toEqual([]);
    });
  });

  it('have no other danger or defect than their one fault', () => {
    const others = Object.entries(EXAMPLES).flatMap(([name, { must }]) =>
      examine(load(name))
        .findings.filter(({ rule, severity }) => severity !== 'advice' && !must?.rules.includes(rule))
        .map(({ rule }) => `${name}: ${rule}`),
    );
    // The plug whose lead feeds back has bare live pins as well: a second danger of the same plug.
    expect(others).toEqual(['backfeed-plug: live-pins']);
  });

  it('give the same answer, byte for byte, whatever the order of the file', () => {
    for (const name of Object.keys(EXAMPLES)) {
      const document = load(name);
      const turned = {
        ...document,
        parts: [...document.parts].reverse(),
        wires: [...document.wires].reverse(),
        cables: [...document.cables].reverse(),
        places: [...document.places].reverse(),
      };
      expect(JSON.stringify(examine(turned))).toBe(JSON.stringify(examine(document)));
    }
  });

  it('give the same answer without positions', () => {
    for (const name of Object.keys(EXAMPLES)) {
      const document = load(name);
      const placed = { ...document, sheet: { overview: { Q1: { x: 100, y: 100 } } } };
      expect(examine(placed)).toEqual(examine(document));
    }
  });
});
