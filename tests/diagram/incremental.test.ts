import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyPatch } from '@/diagram/document/patch';
import { DocumentSchema, type Installation } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { createExaminer } from '@/diagram/rules/incremental/examiner';
import { BEYOND, WITHIN, type Edit } from './random-edits';
import { cleanHomes } from './mutations/clean-homes';
import { EXAMPLES, readExample } from './example-homes';
import { plantedMistakes } from './planted';

interface Step {
  /** an edit, or a number of edits to take back */
  edit: Edit | 'undo';
  a: number;
  b: number;
  c: number;
}

const number = fc.nat({ max: 100_000 });
const step: fc.Arbitrary<Step> = fc.record({
  edit: fc.oneof(
    { weight: 12, arbitrary: fc.constantFrom<(Edit | 'undo')[]>(...WITHIN) },
    { weight: 3, arbitrary: fc.constantFrom<(Edit | 'undo')[]>(...BEYOND) },
    { weight: 4, arbitrary: fc.constant<Edit | 'undo'>('undo') },
  ),
  a: number,
  b: number,
  c: number,
});

const homes = [...cleanHomes().values(), ...EXAMPLES.map(readExample)];
const seen = { whole: 0, part: 0 };

/** Walks through edits of a home; every examination is held against one from scratch. */
function walk(home: Installation, steps: readonly Step[]): void {
  const examiner = createExaminer();
  examiner.examine(home);
  const past = [home];
  for (const { edit, ...numbers } of steps) {
    const doc = past.at(-1)!;
    if (edit === 'undo') {
      if (past.length > 1) past.pop();
    } else {
      const patch = edit(doc, numbers);
      const next = patch && applyPatch(doc, patch);
      if (next && DocumentSchema.safeParse(next).success) past.push(next);
    }
    const now = past.at(-1)!;
    expect(JSON.stringify(examiner.examine(now))).toBe(JSON.stringify(examine(now)));
  }
  seen.whole += examiner.count.whole - 1;
  seen.part += examiner.count.part;
}

describe('the incremental examiner', () => {
  it('gives the same as an examination from scratch, byte for byte, whatever is edited', () => {
    fc.assert(
      fc.property(fc.constantFrom(...homes), fc.array(step, { minLength: 8, maxLength: 16 }), walk),
      { numRuns: 40, seed: 20260712 },
    );
    // Most steps are told from a part of the home; else this proves nothing.
    expect(seen.part).toBeGreaterThan(100);
  }, 120_000);

  it('gives the same when a mistake is made and taken back, for every mistake of the collection', () => {
    for (const { mistake, clean, wrong } of plantedMistakes(1)) {
      const examiner = createExaminer();
      const first = examiner.examine(clean);
      const made = JSON.stringify(examiner.examine(wrong)) === JSON.stringify(examine(wrong));
      const back = JSON.stringify(examiner.examine(clean)) === JSON.stringify(first);
      expect({ mistake, made, back }).toEqual({ mistake, made: true, back: true });
    }
  }, 120_000);

  it('tells a terminal without its wire as the whole home does, with a stretch that lost a wire elsewhere', () => {
    const home = cleanHomes().get('IEC TT without')!;
    const without = (doc: Installation, id: string) => {
      const wires = doc.wires.filter(({ from, to }) => from[0] === id || to[0] === id).map((wire) => wire.id);
      return applyPatch(doc, { remove: { parts: [id], wires } });
    };
    const examiner = createExaminer();
    examiner.examine(home);
    const first = without(home, 'bath.way-outlets1');
    for (const doc of [first, without(first, 'bedroom.outlet1'), first, home])
      expect(JSON.stringify(examiner.examine(doc))).toBe(JSON.stringify(examine(doc)));
  });

  it('does not look at the home again for a position, or for the label of what another name names', () => {
    const home = readExample('clean-flat');
    const examiner = createExaminer();
    const { ways } = examiner.examine(home);
    const [lamp, way] = [home.parts.find(({ kind }) => kind === 'lamp')!, home.parts.find(({ id }) => id === ways[0]!.part)!];
    const edited = applyPatch(home, {
      set: {
        parts: [
          { ...lamp, label: 'By the window' },
          { ...way, label: 'Lamps of the hall' },
        ],
        overview: { [lamp.id]: { x: 1000, y: 2000 } },
      },
    });
    const result = examiner.examine(edited);
    expect(result.ways[0]!.label).toBe('Lamps of the hall');
    expect(JSON.stringify(result)).toBe(JSON.stringify(examine(edited)));
    expect(examiner.count).toEqual({ whole: 1, part: 0, none: 1 });
  });

  it('tells from a part of the home what has a remedy that reads all of it', () => {
    const clean = readExample('clean-backup-home');
    const inverter = clean.parts.find(({ kind }) => kind === 'inverter')!;
    const home = applyPatch(clean, { set: { parts: [{ ...inverter, hoursWanted: 100 } as typeof inverter] } });
    const examiner = createExaminer();
    const before = examiner.examine(home);
    const lamp = home.parts.find((part) => part.kind === 'lamp' && part.watts !== undefined)!;
    const edited = applyPatch(home, { set: { parts: [{ ...lamp, watts: 17 } as typeof lamp] } });
    const after = examiner.examine(edited);
    for (const { findings } of [before, after]) expect(findings.map(({ rule }) => rule)).toContain('short-autonomy');
    expect(JSON.stringify(after)).toBe(JSON.stringify(examine(edited)));
    expect(examiner.count).toEqual({ whole: 1, part: 1, none: 0 });
  });
});
