import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Home } from '@/diagram/document/home';
import { readDocument, type End, type Installation } from '@/diagram/document/schema';
import { buildContext } from '@/diagram/rules/context';
import { examine } from '@/diagram/rules/examine';
import { rules } from '@/diagram/rules/index';
import { runRules } from '@/diagram/rules/run';
import type { Finding } from '@/diagram/rules/types';
import { randomDocument } from './random-document';

const findingsOf = (document: Installation) => runRules(buildContext(document), rules);

/** Every number in a result, with its path. */
function* numbersIn(value: unknown, path = ''): Iterable<[string, number]> {
  if (typeof value === 'number') yield [path, value];
  else if (typeof value === 'object' && value !== null)
    for (const [key, each] of Object.entries(value)) yield* numbersIn(each, `${path}.${key}`);
}

interface Shape {
  lamps: number;
  sockets: number;
  fans: number;
  twoWays: number;
  heaters: number;
}

const shape: fc.Arbitrary<Shape> = fc.record({
  lamps: fc.nat(3),
  sockets: fc.nat(2),
  fans: fc.nat(1),
  twoWays: fc.nat(1),
  heaters: fc.nat(1),
});

/** A way of its own from the mains bars, or the backup bars where `backup` is asked. */
function addWay(home: Home, n: number, { lamps, sockets, fans, twoWays, heaters }: Shape, backup: boolean): string[] {
  const way = `Q${n}`;
  const points: string[] = [];
  const name = (letter: string, i: number) => {
    points.push(`${letter}${n}${i}`);
    return `${letter}${n}${i}`;
  };
  home.place(`room${n}`, 'room').way(way, `room${n}`, { rating: 10 }, { bars: backup ? '2' : '', csa: 2.5 });
  for (let i = 0; i < lamps; i++) home.lamp(name('E', i), `S${n}${i}`, way);
  for (let i = 0; i < fans; i++) home.fan(name('M', i), `SF${n}${i}`, `R${n}${i}`, way);
  for (let i = 0; i < sockets; i++) home.socket(name('X', i), way);
  for (let i = 0; i < twoWays; i++) home.twoWay(name('ET', i), `SA${n}${i}`, `SB${n}${i}`, way);
  if (!backup) for (let i = 0; i < heaters; i++) home.heater(name('EH', i), `SH${n}${i}`, way);
  return points;
}

type Plan = { system: 'TN-S' | 'TN-C-S' | 'TT'; backup: boolean; ways: Shape[]; backupWays: Shape[] };

const homes: fc.Arbitrary<Plan> = fc.record({
  system: fc.constantFrom<Plan['system']>('TN-S', 'TN-C-S', 'TT'),
  backup: fc.boolean(),
  ways: fc.array(shape, { minLength: 1, maxLength: 4 }),
  backupWays: fc.array(shape, { maxLength: 2 }),
});

function draw({ system, backup, ways, backupWays }: Plan) {
  const home = new Home({ supply: { system, ...(system === 'TT' && { ra: 40 }) } });
  if (backup) home.backup();
  const points = ways.flatMap((each, i) => addWay(home, 11 + i, each, false));
  if (backup) points.push(...backupWays.flatMap((each, i) => addWay(home, 31 + i, each, true)));
  return { home, points };
}

const serious = (findings: Finding[]) => findings.filter(({ severity }) => severity !== 'advice');
const told = ({ rule, parts, wires, conditions }: Finding) =>
  `${rule} at ${parts.join(' ')} ${wires.join(' ')} in ${conditions.join(' ')}`;

describe('any document', () => {
  it('is examined without a crash, a NaN or an empty word, and the same way twice', () => {
    fc.assert(
      fc.property(randomDocument(), (document) => {
        const result = examine(document);
        for (const [path, value] of numbersIn(result)) expect(Number.isFinite(value), path).toBe(true);
        for (const { heading, message, parts, wires } of result.findings) {
          expect(`${heading} ${message}`).not.toMatch(/undefined|NaN|\[object|null/);
          for (const id of parts) expect(document.parts.some((part) => part.id === id)).toBe(true);
          for (const id of wires) expect(document.wires.some((wire) => wire.id === id)).toBe(true);
        }
        expect(JSON.stringify(examine(document))).toBe(JSON.stringify(result));
      }),
      { numRuns: 400 },
    );
  });

  it('is a valid file when it comes from the generator', () => {
    fc.assert(
      fc.property(randomDocument(), (document) => readDocument(document).ok),
      { numRuns: 100 },
    );
  });

  it('gives the same bytes whatever the order of its lists', () => {
    fc.assert(
      fc.property(randomDocument(), fc.infiniteStream(fc.nat(1000)), (document, dice) => {
        const shuffle = <T>(list: readonly T[]) =>
          list
            .map((item) => ({ item, at: dice.next().value as number }))
            .sort((a, b) => a.at - b.at)
            .map(({ item }) => item);
        const turned = {
          ...document,
          parts: shuffle(document.parts),
          wires: shuffle(document.wires),
          cables: shuffle(document.cables),
        };
        expect(JSON.stringify(examine(turned))).toBe(JSON.stringify(examine(document)));
      }),
      { numRuns: 100 },
    );
  });

  it('gives the same bytes wherever its parts stand on the sheet', () => {
    const place = fc.record({ x: fc.integer({ min: -9000, max: 9000 }), y: fc.integer({ min: -9000, max: 9000 }) });
    fc.assert(
      fc.property(randomDocument(), fc.infiniteStream(place), fc.boolean(), (document, places, pinned) => {
        const spread = () =>
          Object.fromEntries(
            document.parts.map(({ id }) => [id, { ...places.next().value, turn: 1 as const, ...(pinned && { pinned }) }]),
          );
        const placed = { ...document, sheet: { overview: spread(), connections: spread() } };
        expect(JSON.stringify(examine(placed))).toBe(JSON.stringify(examine(document)));
      }),
      { numRuns: 40 },
    );
  });
});

/** The document with every id of a part, wire and cable written anew; the order of ids turns round. */
function relabel(document: Installation): { document: Installation; back: (id: string) => string } {
  const names = new Map<string, string>();
  const name = (id: string) => names.get(id) ?? id;
  const all = [...document.parts, ...document.wires, ...document.cables].map(({ id }) => id);
  all.forEach((id, i) => names.set(id, `n${String(all.length - i).padStart(5, '0')}`));
  const end = ([part, mark]: End): End => [name(part), mark];
  const back = new Map([...names].map(([from, to]) => [to, from]));
  return {
    document: {
      ...document,
      parts: document.parts.map((part) => ({
        ...part,
        id: name(part.id),
        ...('in' in part && part.in && { in: name(part.in) }),
      })),
      wires: document.wires.map((wire) => ({
        ...wire,
        id: name(wire.id),
        from: end(wire.from),
        to: end(wire.to),
        ...(wire.cable && { cable: name(wire.cable) }),
      })),
      cables: document.cables.map((cable) => ({ ...cable, id: name(cable.id) })),
    },
    back: (id) => back.get(id) ?? id,
  };
}

describe('any right home', () => {
  it('has no danger and no defect', () => {
    fc.assert(
      fc.property(homes, (plan) => {
        expect(serious(findingsOf(draw(plan).home.document())).map(told)).toEqual([]);
      }),
      { numRuns: 150 },
    );
  });

  it('with the two ends of one point changed over has reversed polarity there, and nothing else', () => {
    fc.assert(
      fc.property(homes, fc.nat(100), (plan, pick) => {
        const { home, points } = draw(plan);
        fc.pre(points.length > 0);
        const id = points[pick % points.length]!;
        const document = home.document();
        const swap = ([part, mark]: End): End =>
          part === id && mark !== 'E' ? [part, mark === 'L' ? 'N' : 'L'] : [part, mark];
        const wrong = {
          ...document,
          wires: document.wires.map((wire) => ({ ...wire, from: swap(wire.from), to: swap(wire.to) })),
        };
        const found = serious(findingsOf(wrong));
        expect(found.map(({ rule, parts }) => `${rule} ${parts.join(' ')}`)).toEqual([`reversed-polarity ${id}`]);
      }),
      { numRuns: 150 },
    );
  });

  it('with new ids has the same findings at the same parts, wrong or right', () => {
    fc.assert(
      fc.property(homes, fc.nat(1000), (plan, pick) => {
        const document = draw(plan).home.document();
        const broken = { ...document, wires: document.wires.filter((_, i) => i !== pick % document.wires.length) };
        const { document: renamed, back } = relabel(broken);
        const here = findingsOf(broken)
          .map((finding) => told({ ...finding, parts: [...finding.parts].sort(), wires: [...finding.wires].sort() }))
          .sort();
        const there = findingsOf(renamed)
          .map((finding) =>
            told({ ...finding, parts: finding.parts.map(back).sort(), wires: finding.wires.map(back).sort() }),
          )
          .sort();
        expect(there).toEqual(here);
      }),
      { numRuns: 100 },
    );
  });

  it('with one more right way gains no finding anywhere else', () => {
    fc.assert(
      fc.property(homes, shape, fc.nat(1000), (plan, extra, pick) => {
        const { home, points } = draw(plan);
        // Without any point nothing is starved yet, and the same gap is told at its terminals.
        fc.pre(points.length > 0);
        const document = home.document();
        const missing = document.wires[pick % document.wires.length]!.id;
        const cut = (doc: Installation) => ({ ...doc, wires: doc.wires.filter(({ id }) => id !== missing) });
        const before = serious(findingsOf(cut(document))).map(({ rule, severity }) => `${severity} ${rule}`);
        const added = new Set(addWay(home, 61, extra, false));
        const after = serious(findingsOf(cut(home.document())));
        // What spoils the whole home speaks of the new way too; every finding must still have its cause in the old part.
        const fresh = after.filter(
          ({ parts }) => parts.length > 0 && parts.every((id) => added.has(id) || id === 'Q61'),
        );
        expect(fresh.map(told)).toEqual([]);
        expect(after.map(({ rule, severity }) => `${severity} ${rule}`)).toEqual(before);
      }),
      { numRuns: 100 },
    );
  });
});
