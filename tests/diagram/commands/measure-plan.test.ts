import { describe, expect, it } from 'vitest';
import { addPlan, changePlan } from '@/diagram/commands/floor-plan';
import { cablesFor, measureCable, measurePlan } from '@/diagram/commands/measure-plan';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { applyPatch, invert } from '@/diagram/document/patch';
import { metresAlong, metresIn, metresPerUnit, scaleText } from '@/diagram/document/plan-scale';
import { readDocument, type FloorPlan, type Installation } from '@/diagram/document/schema';
import { planPages } from '@/diagram/paper/plan-pages';
import type { TextMark } from '@/diagram/paper/primitives';
import { examine } from '@/diagram/rules/examine';
import { draftedHome } from './drafted';

const plan: FloorPlan = { id: 'ground', name: 'Ground floor', picture: 'p-1', width: 32_000, height: 24_000 };
const done = (doc: Installation, outcome: Command | Refusal): Installation => {
  if (isRefusal(outcome)) throw new Error(outcome.refused);
  return applyPatch(doc, outcome.patch);
};
const drafted = draftedHome(2);
const home = done(drafted, addPlan(drafted, plan));
/** 40 mm on the plan are 4 m in the home: 1 to 100. */
const measured = done(home, measurePlan(home, 'ground', { x: 1000, y: 1000 }, { x: 5000, y: 1000 }, 4));
const ground = measured.plans![0]!;

describe('the scale of a plan', () => {
  it('is a known length between two places: in the file, in the history, one undo, and no result depends on it', () => {
    expect(ground.scale).toEqual({ a: { x: 1000, y: 1000 }, b: { x: 5000, y: 1000 }, metres: 4 });
    expect(metresPerUnit(ground)).toBeCloseTo(0.001, 12);
    expect(scaleText(ground)).toBe('1:100');
    expect(readDocument(JSON.parse(JSON.stringify(measured)))).toEqual({ ok: true, document: measured });
    const command = measurePlan(home, 'ground', { x: 0, y: 0 }, { x: 3000, y: 4000 }, 10) as Command;
    expect(command.label).toBe('Measure the Ground floor: 10 m');
    expect(scaleText(done(home, command).plans![0]!)).toBe('1:200');
    expect(applyPatch(done(home, command), invert(home, command.patch))).toEqual(home);
    expect(examine(measured)).toEqual(examine(drafted));
  });

  it('holds when another picture is laid behind, larger or smaller', () => {
    const wide = done(measured, changePlan(measured, 'ground', { picture: 'p-2', width: 16_000, height: 12_000 })).plans![0]!;
    expect(wide.scale).toMatchObject({ a: { x: 500, y: 500 }, b: { x: 2500, y: 500 }, metres: 4 });
    expect(scaleText(wide)).toBe('1:200');
  });

  it.each([
    [{ x: 1100, y: 1000 }, 4],
    [{ x: 5000, y: 1000 }, 0],
    [{ x: 5000, y: 1000 }, 1001],
    [{ x: 5000, y: 1000 }, NaN],
  ])('is not taken from %o and %d m', (b, metres) => {
    expect(measurePlan(home, 'ground', { x: 1000, y: 1000 }, b, metres)).toHaveProperty('refused');
  });
});

describe('a run measured on a plan', () => {
  it('is as long as its corners are apart, and nothing without a scale', () => {
    const way = [{ x: 0, y: 0 }, { x: 6000, y: 0 }, { x: 6000, y: 2500 }];
    expect(metresAlong(ground, way)).toBeCloseTo(8.5, 9);
    expect(metresAlong(ground, way.slice(0, 1))).toBe(0);
    expect(metresAlong(plan, way)).toBeNull();
  });

  it('is written at its cable to 0.1 m, named, in one undo', () => {
    const [{ cable, name }] = cablesFor(measured, []) as [ReturnType<typeof cablesFor>[number]];
    const command = measureCable(measured, cable.id, 8.4499) as Command;
    const after = done(measured, command);
    expect(after.cables.find(({ id }) => id === cable.id)).toEqual({ ...cable, length: 8.4 });
    expect(command.label).toBe(`Measure ${name} on the plan: 8.4 m`);
    expect(applyPatch(after, invert(measured, command.patch))).toEqual(measured);
    expect(measureCable(measured, cable.id, 0.04)).toHaveProperty('refused');
    expect(measureCable(measured, 'no-such', 4)).toHaveProperty('refused');
  });

  it('is offered for the cables at what is in hand first', () => {
    const wire = measured.wires.find(({ cable }) => cable)!;
    const list = cablesFor(measured, [wire.to[0]]);
    expect(list[0]!.own).toBe(true);
    expect(list.filter(({ own }) => own).map(({ cable }) => cable.id)).toContain(wire.cable);
    expect(list).toHaveLength(measured.cables.length);
  });

  it.each([['4.2', 4.2], [' 4,2 m', 4.2], ['12', 12], ['', null], ['four', null], ['-3', null]])('reads "%s" as %s', (text, metres) => {
    expect(metresIn(text)).toBe(metres);
  });
});

describe('a plan on paper', () => {
  const title = {
    ...{ number: 'OH-1', title: 'T', client: '', address: '', team: '', drawnBy: '', drawnOn: '2026-11-30' },
    ...{ checkedBy: null, revision: '-', state: 'draft' },
  };
  const lamp = measured.parts.find(({ kind }) => kind === 'lamp')!;
  const placed: Installation = { ...measured, sheet: { ...measured.sheet, plan: { [lamp.id]: { x: 8000, y: 6000, on: 'ground' } } } };
  const texts = (page: ReturnType<typeof planPages>[number]): TextMark[] => {
    const all = (groups: typeof page.groups): TextMark[] =>
      groups.flatMap(({ marks, groups: inner = [] }) => [...marks.filter((mark) => mark.kind === 'text'), ...all(inner)]);
    return all(page.groups);
  };

  it('lies over its picture in a scale that a rule has, with a bar of that very length', () => {
    for (const paper of ['A4', 'A3'] as const) {
      const [page] = planPages(placed, { paper, title }) as [ReturnType<typeof planPages>[number]];
      const group = page.groups.find(({ picture }) => picture)!;
      expect(group.picture).toEqual({ name: 'p-1', width: 32_000, height: 24_000 });
      const words = texts(page).map(({ text }) => text);
      const ratio = 100 / group.scale;
      expect([125, 150, 200]).toContain(Math.round(ratio * 1e6) / 1e6);
      expect(words).toContain(`1:${Math.round(ratio)}`);
      expect(words).toContain(lamp.ref);
      const metres = Number(/^([\d.]+) m$/.exec(words.find((word) => /^[\d.]+ m$/.test(word))!)![1]);
      const bar = page.groups.flatMap(({ marks }) => marks).find((mark) => mark.kind === 'path' && mark.width === 35 && /V\d+M/.test(mark.d));
      const [from, to] = /M(\d+) \d+V.*H(\d+)M/.exec((bar as { d: string }).d)!.slice(1).map(Number);
      expect(Math.abs(to! - from! - (metres * 100_000) / ratio)).toBeLessThanOrEqual(1);
    }
  });

  it('says so where it was never measured, and is empty for a storey that is not there', () => {
    const [page] = planPages(home, { paper: 'A3', title }) as [ReturnType<typeof planPages>[number]];
    expect(texts(page).map(({ text }) => text)).toContain('Not measured: take no lengths from it.');
    expect(planPages(home, { paper: 'A3', title, plan: 'attic' })).toEqual([]);
  });
});
