import { describe, expect, it } from 'vitest';
import { conflicts, disown, ownOnly, settle, valueAt, valueIn, without } from '@/diagram/commands/merge';
import { applyPatch, invert, type Patch } from '@/diagram/document/patch';
import { emptyDocument, type Installation, type Part, type Wire } from '@/diagram/document/schema';

const lamp = (id: string, watts = 9): Part => ({ id, kind: 'lamp', watts });
const wire = (id: string, from: string, to: string): Wire => ({
  id,
  from: [from, '2'],
  to: [to, 'L'],
  role: 'switched',
});
const home: Installation = {
  ...emptyDocument('Kiln Row 3', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 }),
  parts: [lamp('E1'), lamp('E2'), { id: 'S1', kind: 'switch' }],
  sheet: { overview: { E1: { x: 0, y: 0 } } },
};
const set = (...parts: Part[]): Patch => ({ set: { parts } });

describe('keys', () => {
  it('reads what a document holds and what a change leaves', () => {
    expect(valueAt(home, 'parts:E1')).toEqual(lamp('E1'));
    expect(valueAt(home, 'overview:E1')).toEqual({ x: 0, y: 0 });
    expect(valueAt(home, 'title')).toBe('Kiln Row 3');
    expect(valueAt(home, 'parts:none')).toBeUndefined();
    expect(valueIn(set(lamp('E1', 5)), 'parts:E1')).toEqual(lamp('E1', 5));
    expect(valueIn({ remove: { parts: ['E1'] } }, 'parts:E1')).toBeUndefined();
    expect(valueIn({ set: { overview: { E1: { x: 1, y: 2 } } } }, 'overview:E1')).toEqual({ x: 1, y: 2 });
  });

  it('takes single keys out of a change', () => {
    const patch: Patch = {
      set: { parts: [lamp('E1'), lamp('E2')], title: 'T', overview: { E1: { x: 1, y: 1 } } },
      remove: { wires: ['w1'], notices: true },
    };
    expect(without(patch, new Set(['parts:E1', 'title', 'overview:E1', 'wires:w1', 'notices']))).toEqual({
      set: { parts: [lamp('E2')] },
    });
    expect(without(patch, new Set())).toEqual(patch);
    expect(without(set(lamp('E1')), new Set(['parts:E1']))).toEqual({});
  });
});

describe('two writers', () => {
  it('agree when they touch other things, or do the same', () => {
    expect(conflicts(set(lamp('E1', 5)), set(lamp('E2', 5)))).toEqual([]);
    expect(conflicts(set(lamp('E1', 5)), set(lamp('E1', 5)))).toEqual([]);
  });

  it('clash where both change one thing, or one removes what the other wires', () => {
    expect(conflicts(set(lamp('E1', 5)), set(lamp('E1', 7)))).toEqual(['parts:E1']);
    expect(conflicts({ set: { wires: [wire('w1', 'S1', 'E1')] } }, { remove: { parts: ['S1'] } })).toEqual([
      'parts:S1',
    ]);
    expect(conflicts({ remove: { parts: ['S1'] } }, { set: { wires: [wire('w1', 'S1', 'E1')] } })).toEqual([
      'parts:S1',
    ]);
    expect(conflicts({ set: { title: 'a' } }, { set: { title: 'b' } })).toEqual(['title']);
  });

  it('are settled key by key', () => {
    const mine: Patch = { set: { parts: [lamp('E1', 5), lamp('E2', 5)] } };
    expect(settle(mine, home, ['parts:E1'], new Set(['parts:E1']))).toEqual(set(lamp('E2', 5)));
    expect(settle(mine, home, ['parts:E1'], new Set())).toEqual(mine);
  });

  it('lose my wires to a part that stays removed, or bring the part back', () => {
    const mine: Patch = { set: { wires: [wire('w1', 'S1', 'E1')] } };
    expect(settle(mine, home, ['parts:S1'], new Set(['parts:S1']))).toEqual({});
    expect(settle(mine, home, ['parts:S1'], new Set())).toEqual({
      set: { wires: [wire('w1', 'S1', 'E1')], parts: [{ id: 'S1', kind: 'switch' }] },
    });
  });
});

describe('taking back only my own', () => {
  it('leaves what somebody has changed since', () => {
    const step: Patch = set(lamp('E1', 5), lamp('E2', 5));
    const back = invert(home, step);
    const since = applyPatch(applyPatch(home, step), set(lamp('E1', 7)));
    expect(applyPatch(since, ownOnly(since, back, step)).parts).toEqual([
      lamp('E1', 7),
      lamp('E2'),
      { id: 'S1', kind: 'switch' },
    ]);
  });

  it('knows a value again whatever the order of its fields', () => {
    const step: Patch = set({ id: 'E3', kind: 'lamp', watts: 9, class: 1 });
    const back = invert(home, step);
    const read = applyPatch(home, set({ class: 1, watts: 9, kind: 'lamp', id: 'E3' }));
    expect(applyPatch(read, ownOnly(read, back, step))).toEqual(home);
  });

  it('leaves a part of mine that somebody has wired since', () => {
    const step: Patch = { set: { parts: [lamp('E3')], overview: { E3: { x: 1, y: 1 } } } };
    const back = invert(home, step);
    const since = applyPatch(applyPatch(home, step), { set: { wires: [wire('w9', 'S1', 'E3')] } });
    expect(ownOnly(since, back, step)).toEqual({});
    const untouched = applyPatch(home, step);
    expect(applyPatch(untouched, ownOnly(untouched, back, step))).toEqual(home);
  });

  it('leaves a place of mine in which somebody has put a part since, and a cable into which they have laid a core', () => {
    const cable = { id: 'c9', csa: 1.5, material: 'Cu', insulation: 'PVC', method: 'B1', length: 4 } as const;
    const step: Patch = { set: { places: [{ id: 'loft', name: 'Loft', kind: 'room' }], cables: [cable] } };
    const back = invert(home, step);
    const since = applyPatch(applyPatch(home, step), {
      set: { parts: [{ ...lamp('E9'), place: 'loft' }], wires: [{ ...wire('w9', 'S1', 'E1'), cable: 'c9' }] },
    });
    expect(ownOnly(since, back, step)).toEqual({});
  });

  it('takes what somebody else wrote for theirs, though it is what I had left', () => {
    const step = set(lamp('E1', 5), lamp('E2', 5));
    const history = [{ label: 'mine', step, back: invert(home, step) }];
    const [mine] = disown(history, set(lamp('E1', 5)));
    expect(mine).toEqual({ label: 'mine', step: set(lamp('E2', 5)), back: set(lamp('E2')) });
    expect(disown(history, set(lamp('E9')))[0]).toBe(history[0]);
  });

  it('brings no wire back to what somebody has removed', () => {
    const back: Patch = { set: { wires: [wire('w1', 'S1', 'E1'), wire('w2', 'S1', 'E2')] } };
    const step: Patch = { remove: { wires: ['w1', 'w2'] } };
    const [mine] = disown([{ step, back }], { remove: { parts: ['E1'] } });
    expect(mine).toEqual({
      step: { remove: { wires: ['w2'] } },
      back: { set: { wires: [wire('w2', 'S1', 'E2')] } },
    });
  });
});
