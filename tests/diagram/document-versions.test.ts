import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { importCommand } from '@/components/sheet/foot/import-file';
import { applyPatch, diff, isEmptyPatch, touched } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';

const FOLDER = 'tests/fixtures/versions';
const text = (name: string): string => readFileSync(`${FOLDER}/${name}`, 'utf8');

function open(name: string): Installation {
  const read = readDocument(JSON.parse(text(name)));
  if (!read.ok) throw new Error(`${name}: ${read.errors[0]?.path} ${read.errors[0]?.message}`);
  return read.document;
}

/** A sample of every version that was ever stored is kept for good: what somebody saved once must always open. */
describe('kept samples of every version of the document', () => {
  const samples = readdirSync(FOLDER).sort();

  it('are there for every version up to the one that is written now', () => {
    const current = open(samples.at(-1)!).schema;
    expect(samples).toEqual(Array.from({ length: current }, (_, n) => `${n + 1}.json`));
  });

  it.each(samples)('%s opens whole, and its home can be examined', (name) => {
    const doc = open(name);
    const stored = JSON.parse(text(name)) as Installation;
    for (const list of ['places', 'parts', 'wires', 'cables', 'survey', 'silenced', 'notices'] as const)
      expect(doc[list]).toHaveLength(stored[list]!.length);
    expect(Object.values(doc.sheet!.overview!).some((at) => at.pinned)).toBe(true);
    expect(examine(doc).findings.every((finding) => finding.heading !== '')).toBe(true);
  });
});

describe('a file', () => {
  const doc = open('1.json');

  it('that is read and written unchanged has the same bytes, and is no change', () => {
    const again = readDocument(JSON.parse(JSON.stringify(doc)));
    if (!again.ok) throw new Error('does not open');
    expect(JSON.stringify(again.document)).toBe(JSON.stringify(doc));
    expect(isEmptyPatch(diff(doc, again.document))).toBe(true);
    expect(importCommand(doc, 'same.json', JSON.stringify(doc))).toEqual({
      errors: [{ path: 'same.json', message: 'The file is the drawing as it stands.' }],
    });
  });

  it('has the same bytes whatever the order in which it was written', () => {
    const reversed = (value: unknown): unknown =>
      Array.isArray(value)
        ? value.map(reversed)
        : value && typeof value === 'object'
          ? Object.fromEntries(Object.entries(value).reverse().map(([key, inner]) => [key, reversed(inner)]))
          : value;
    const shuffled = reversed({ ...doc, parts: [...doc.parts].reverse(), wires: [...doc.wires].reverse() });
    const read = readDocument(shuffled);
    expect(read.ok && JSON.stringify(read.document)).toBe(JSON.stringify(doc));
  });

  it('of which one wire was moved differs in that one record', () => {
    const wire = doc.wires.find((each) => each.role === 'neutral')!;
    const moved = applyPatch(doc, { set: { wires: [{ ...wire, to: [wire.to[0], '99'] }] } });
    expect([...touched(diff(doc, moved))]).toEqual([`wires:${wire.id}`]);
  });

  it.each([
    [{ ...doc, schema: 2 }, 'schema'],
    [{ ...doc, parts: [{ id: 'q', kind: 'warp drive' }] }, 'parts.0.kind'],
  ])('that this version cannot know is refused by its place, and the drawing stays as it is', (data, path) => {
    const outcome = importCommand(doc, 'new.json', JSON.stringify(data));
    expect(outcome).toMatchObject({ errors: [{ path }] });
  });
});
