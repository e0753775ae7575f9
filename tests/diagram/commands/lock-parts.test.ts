import { describe, expect, it } from 'vitest';
import { copyParts, pasteClip } from '@/diagram/commands/copy';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import { editRating } from '@/diagram/commands/edit-in-place';
import { moveOnPlan, putOnPlan, takeOffPlan, turnOnPlan } from '@/diagram/commands/floor-plan';
import { isLocked, lockParts } from '@/diagram/commands/lock-parts';
import { alignParts, distributeParts, moveParts, placeExactly, turnParts, unpinParts } from '@/diagram/commands/move-parts';
import { tidyByBands } from '@/diagram/commands/tidy';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { applyPatch, invert } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { counter } from './counter';
import { draftedHome } from './drafted';

const drafted = draftedHome(2);
const lamps = drafted.parts.filter(({ kind }) => kind === 'lamp').map(({ id }) => id);
const [held, other, third] = lamps as [string, string, string];
const patchOf = (outcome: Command | Refusal) => (isRefusal(outcome) ? {} : outcome.patch);
const done = (doc: Installation, outcome: Command | Refusal) => applyPatch(doc, patchOf(outcome));
const locked = done(drafted, lockParts(drafted, 'overview', [held], true));

describe('a part that is locked in place', () => {
  it('stands where it stood before, and the file says so', () => {
    expect(isLocked(locked, 'overview', held)).toBe(true);
    const at = (doc: Installation) => buildScene(doc, 'overview').parts.map(({ id, x, y }) => ({ id, x, y }));
    expect(at(locked)).toEqual(at(drafted));
    expect(readDocument(JSON.parse(JSON.stringify(locked)))).toMatchObject({ ok: true, document: locked });
  });

  it.each<[string, (doc: Installation) => Command | Refusal]>([
    ['a move', (doc) => moveParts(doc, 'overview', [held, other], 2500, 500)],
    ['aligning', (doc) => alignParts(doc, 'overview', [other, held], 'row')],
    ['spacing', (doc) => distributeParts(doc, 'overview', [other, held, third], 'column')],
    ['a place in mm', (doc) => placeExactly(doc, 'overview', held, '10, 10')],
    ['a turn', (doc) => turnParts(doc, 'overview', [held, other])],
    ['letting it be placed again', (doc) => unpinParts(doc, 'overview', [held])],
    ['a tidy of all', (doc) => tidyByBands(doc, 'overview', null)],
  ])('is not moved by %s', (_, act) => {
    const before = locked.sheet!.overview![held];
    expect(done(locked, act(locked)).sheet!.overview![held]).toEqual(before);
  });

  it('is moved by the same acts on the other face, and may be edited, deleted and copied', () => {
    const moved = done(locked, moveParts(locked, 'connections', [held], 2500, 0));
    expect(moved.sheet!.connections![held]).not.toEqual(locked.sheet!.connections?.[held]);
    expect(done(locked, editRating(locked, held, '5 W'))).not.toEqual(locked);
    expect(done(locked, deleteSelection(locked, [held], [])).parts.some(({ id }) => id === held)).toBe(false);
    const pasted = done(locked, pasteClip(locked, copyParts(locked, [held])!, counter('c')));
    const copies = pasted.parts.filter(({ id }) => !locked.parts.some((part) => part.id === id));
    expect(copies.length).toBeGreaterThan(0);
    for (const { id } of copies) expect(isLocked(pasted, 'overview', id)).toBe(false);
  });

  it('moves again once it is let go, and one undo locks it again', () => {
    const unlock = lockParts(locked, 'overview', [held], false);
    const free = done(locked, unlock);
    const moved = done(free, moveParts(free, 'overview', [held], 2500, 0));
    expect(moved.sheet!.overview![held]!.x).toBe(free.sheet!.overview![held]!.x + 2500);
    expect(applyPatch(free, invert(locked, unlock.patch))).toEqual(locked);
    expect(unlock.label).toBe(`Unlock ${drafted.parts.find(({ id }) => id === held)!.ref}`);
  });

  it('stays on the plan as well', () => {
    const plan = { id: 'ground', name: 'Ground floor', picture: 'p', width: 32_000, height: 24_000 };
    const on = { ...drafted, plans: [plan] };
    const placed = done(on, putOnPlan(on, 'ground', [held, other], { x: 1000, y: 1000 }));
    const kept = done(placed, lockParts(placed, 'plan', [held], true));
    const before = kept.sheet!.plan![held];
    for (const act of [moveOnPlan(kept, 'ground', [held, other], 500, 0), turnOnPlan(kept, [held, other]), takeOffPlan(kept, [held, other])]) {
      const after = done(kept, act);
      expect(after.sheet!.plan![held]).toEqual(before);
      expect(after.sheet!.plan![other]).not.toEqual(kept.sheet!.plan![other]);
    }
  });
});
