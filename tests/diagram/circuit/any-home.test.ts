import fc from 'fast-check';
import { expect, test } from 'vitest';
import { backupHome } from '@/diagram/document/home';
import { DocumentSchema, type Installation, type Wire } from '@/diagram/document/schema';
import { evaluate } from '@/diagram/circuit/evaluate';
import { FAULT_KINDS, FaultError } from '@/diagram/circuit/fault-types';
import { walkFaults } from '@/diagram/circuit/fault-walk';
import { solveStanding, standingsOf } from '@/diagram/circuit/steady';
import { examine } from '@/diagram/rules/examine';
import { buildGraph } from '@/diagram/terminals/graph';
import { terminalsOf } from '@/diagram/document/kinds';

/** A home with everything in it, from which wires are cut, led elsewhere and added at random. */
const BASE = backupHome()
  .fan('M1', 'S8', 'R1', 'Q21')
  .heater('E9', 'S9', 'Q11')
  .twoWay('E5', 'S5', 'S6', 'Q21')
  .document();

const ends = BASE.parts.flatMap((part) => {
  const marks = terminalsOf(part);
  return (marks.length > 0 ? marks : ['1', '2', '3']).map((mark): [string, string] => [part.id, mark]);
});

const edit = fc.record({
  what: fc.constantFrom('cut', 'move', 'add', 'rate'),
  wire: fc.nat({ max: BASE.wires.length - 1 }),
  end: fc.constantFrom(...ends),
  other: fc.constantFrom(...ends),
  role: fc.constantFrom('line', 'neutral', 'earth', 'switched'),
});

function edited(
  edits: readonly { what: string; wire: number; end: [string, string]; other: [string, string]; role: string }[],
  system: 'TN-S' | 'TN-C-S' | 'TT',
): Installation {
  const wires = new Map(BASE.wires.map((wire) => [wire.id, wire]));
  edits.forEach(({ what, wire: at, end, other, role }, i) => {
    const wire = BASE.wires[at]!;
    if (what === 'cut') wires.delete(wire.id);
    else if (what === 'move' && wires.has(wire.id)) wires.set(wire.id, { ...wire, to: end });
    else if (what === 'add') wires.set(`x${i}`, { id: `x${i}`, from: end, to: other, role: role as Wire['role'] });
  });
  const rated = new Set(edits.filter(({ what }) => what === 'rate').map(({ end }) => end[0]));
  const parts = BASE.parts.map((part) =>
    rated.has(part.id)
      ? ({ id: part.id, kind: part.kind, ...(part.place && { place: part.place }) } as typeof part)
      : part,
  );
  return DocumentSchema.parse({
    ...BASE,
    parts,
    wires: [...wires.values()],
    supply: { ...BASE.supply, system, ...(system === 'TT' && { ra: 40 }) },
  });
}

test('whatever is drawn, every figure is a number or null and every walk ends', () => {
  const seen = (value: unknown, path: string): void => {
    if (typeof value === 'number' && !Number.isFinite(value)) throw new Error(`${path} is ${value}`);
    if (typeof value === 'object' && value !== null)
      for (const [key, each] of Object.entries(value)) seen(each, `${path}.${key}`);
  };
  fc.assert(
    fc.property(
      fc.array(edit, { maxLength: 6 }),
      fc.constantFrom('TN-S', 'TN-C-S', 'TT'),
      fc.constantFrom('E1', 'X1', 'E2', 'X2', 'M1', 'E5', 'E9', 'G1'),
      fc.constantFrom(...FAULT_KINDS),
      (edits, system, at, kind) => {
        const doc = edited(edits, system);
        seen(examine(doc), 'examination');
        const graph = buildGraph(doc);
        const evaluation = evaluate(graph);
        for (const each of evaluation.evaluated) {
          for (const { standing } of standingsOf(graph, each)) {
            const { solution } = solveStanding(graph, standing);
            for (const list of [solution.re, solution.im, solution.currentRe, solution.currentIm])
              expect(list.every(Number.isFinite)).toBe(true);
          }
          try {
            seen(walkFaults(graph, evaluation, [{ kind, at }], each.condition.name), 'walk');
          } catch (error) {
            if (!(error instanceof FaultError)) throw error;
          }
        }
      },
    ),
    { numRuns: 100, seed: 11 },
  );
}, 60_000);
