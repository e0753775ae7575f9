import fc from 'fast-check';
import { isBar, terminalsOf } from '@/diagram/document/kinds';
import { DocumentSchema, type Installation, type Kind, type Part } from '@/diagram/document/schema';

/** Documents of any shape, joined at random: nothing in them makes sense, and nothing may break. */

const KINDS = DocumentSchema.shape.parts.element.options.map((option) => option.shape.kind.value) as Kind[];
const ROLES = ['line', 'switched', 'strapper', 'neutral', 'earth', 'dc+', 'dc-'] as const;

const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined, freq: 3 });

/** Ratings that some kind or other knows; the schema's own shape says which of them a kind keeps. */
const ratings = fc.record({
  poles: maybe(fc.constantFrom(1, 2)),
  rating: maybe(fc.constantFrom(1, 6, 16, 63)),
  curve: maybe(fc.constantFrom('B', 'C', 'D')),
  icn: maybe(fc.constantFrom(3000, 6000)),
  sensitivity: maybe(fc.constantFrom(0.03, 0.3)),
  spare: maybe(fc.boolean()),
  watts: maybe(fc.constantFrom(0, 9, 2000)),
  pf: maybe(fc.constantFrom(0.5, 1)),
  class: maybe(fc.constantFrom(1, 2)),
  load: maybe(fc.constantFrom(0, 200)),
  neutral: maybe(fc.constantFrom('through', 'separate')),
  bond: maybe(fc.boolean()),
  va: maybe(fc.constantFrom(500, 3000)),
  surge: maybe(fc.constantFrom(1, 6000)),
  charge: maybe(fc.constantFrom(0, 20)),
  volts: maybe(fc.constant(12)),
  ah: maybe(fc.constantFrom(100, 200)),
  cutoff: maybe(fc.constant(10.5)),
  chemistry: maybe(fc.constantFrom('flooded', 'lfp')),
  count: maybe(fc.constantFrom(1, 4)),
  in: maybe(fc.constantFrom('p0', 'p1', 'p2', 'p3', 'nobody')),
});

const partAt = (index: number) =>
  fc
    .tuple(
      fc.constantFrom(...KINDS),
      ratings,
      maybe(fc.constantFrom('hall', 'bath')),
      maybe(fc.constantFrom('Q1', 'X1')),
    )
    .map(([kind, all, place, ref]): Part => {
      const shape = DocumentSchema.shape.parts.element.options.find(
        (option) => option.shape.kind.value === kind,
      )!.shape;
      const known = Object.entries(all).filter(([name, value]) => {
        const field = (shape as Record<string, { safeParse(value: unknown): { success: boolean } }>)[name];
        return value !== undefined && field !== undefined && field.safeParse(value).success;
      });
      return {
        id: `p${index}`,
        kind,
        ...(place && { place }),
        ...(ref && { ref }),
        ...Object.fromEntries(known),
      } as Part;
    });

const markOf = (part: Part, pick: number): string => {
  if (isBar(part.kind)) return String((pick % 6) + 1);
  const marks = terminalsOf(part);
  // One pick in ten names a terminal that does not exist.
  return pick % 10 === 0 ? '9' : marks[pick % marks.length]!;
};

export const randomDocument = (most = 24): fc.Arbitrary<Installation> =>
  fc.integer({ min: 1, max: most }).chain((size) =>
    fc
      .record({
        parts: fc.tuple(...Array.from({ length: size }, (_, i) => partAt(i))),
        wires: fc.array(
          fc.record({
            a: fc.nat(size - 1),
            b: fc.nat(size - 1),
            am: fc.nat(1000),
            bm: fc.nat(1000),
            role: fc.constantFrom(...ROLES),
            cable: maybe(fc.constantFrom('k1', 'k2', 'none')),
            colour: maybe(fc.constantFrom('BN', 'GNYE', 'RD', '?')),
          }),
          { maxLength: 3 * size },
        ),
        practice: fc.constantFrom('IEC', 'IN', 'GB'),
        system: fc.constantFrom('TN-S', 'TN-C-S', 'TT'),
        known: fc.boolean(),
      })
      .map(({ parts, wires, practice, system, known }): Installation => ({
        schema: 1,
        title: 'random',
        practice: practice as Installation['practice'],
        supply: {
          system: system as Installation['supply']['system'],
          voltage: 230,
          frequency: 50,
          ...(known && { ze: 0.4, zln: 0.3, ra: 50 }),
        },
        ambient: 30,
        places: [
          { id: 'hall', name: 'Hall', kind: 'intake' },
          { id: 'bath', name: 'Bath', kind: 'wet' },
        ],
        parts: [...parts],
        wires: wires.map(({ a, b, am, bm, role, cable, colour }, i) => ({
          id: `w${i}`,
          from: [parts[a]!.id, markOf(parts[a]!, am)],
          to: [parts[b]!.id, markOf(parts[b]!, bm)],
          role,
          ...(cable && { cable }),
          ...(colour && { colour }),
        })),
        cables: [
          { id: 'k1', csa: 1.5, material: 'Cu', insulation: 'PVC', method: 'B1', length: 10 },
          { id: 'k2', csa: 2.5, cpc: 1.5, material: 'Cu', insulation: 'XLPE', method: 'C', length: 0 },
        ],
      })),
  );
