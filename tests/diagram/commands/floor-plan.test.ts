import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import {
  addPlan,
  changePlan,
  moveOnPlan,
  notPlaced,
  placedOn,
  planSize,
  putOnPlan,
  removePlan,
  takeOffPlan,
  turnOnPlan,
} from '@/diagram/commands/floor-plan';
import { conflicts, ownOnly } from '@/diagram/commands/merge';
import { moveParts } from '@/diagram/commands/move-parts';
import { tidyByBands } from '@/diagram/commands/tidy';
import { applyPatch, diff, invert, touched } from '@/diagram/document/patch';
import { readDocument, type FloorPlan, type Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { examine } from '@/diagram/rules/examine';
import { symbolFor } from '@/diagram/symbols';
import { demoHomes } from '@/lib/server/demo/homes';
import type { Command } from '@/diagram/commands/types';

const home = demoHomes()[0]!.document;
const plan: FloorPlan = { id: 'ground', name: 'Ground floor', picture: 'p-1', ...planSize(1200, 900) };
const done = (doc: Installation, ...commands: ((doc: Installation) => Command)[]) =>
  commands.reduce((now, command) => applyPatch(now, command(now).patch), doc);
const planned = done(home, (doc) => addPlan(doc, plan));
const lamps = home.parts.filter((part) => part.kind === 'lamp').map((part) => part.id);
const sockets = home.parts.filter((part) => part.kind === 'socket').map((part) => part.id);

describe('a floor plan', () => {
  it('is part of the document and reaches no result and neither face', () => {
    const placed = done(planned, (doc) => putOnPlan(doc, 'ground', [...lamps, ...sockets], { x: 0, y: 0 }));
    expect(placedOn(placed, 'ground').size).toBe(lamps.length + sockets.length);
    expect(examine(placed)).toEqual(examine(home));
    for (const face of ['overview', 'connections'] as const)
      expect(buildScene(placed, face)).toEqual(buildScene(home, face));
    const read = readDocument(JSON.parse(JSON.stringify(placed)));
    expect(read.ok && read.document).toEqual(placed);
  });

  it('keeps its places whatever happens on the faces, and the faces theirs', () => {
    const placed = done(planned, (doc) => putOnPlan(doc, 'ground', lamps, { x: 1000, y: 1000 }));
    const after = done(
      placed,
      (doc) => moveParts(doc, 'overview', [lamps[0]!], 2500, 0),
      (doc) => tidyByBands(doc, 'connections', null),
    );
    expect(after.sheet?.plan).toEqual(placed.sheet?.plan);
    const moved = done(after, (doc) => moveOnPlan(doc, 'ground', [lamps[0]!], 500, 250));
    expect([moved.sheet?.overview, moved.sheet?.connections]).toEqual([after.sheet?.overview, after.sheet?.connections]);
    const at = after.sheet!.plan![lamps[0]!]!;
    expect(moved.sheet?.plan?.[lamps[0]!]).toEqual({ ...at, x: at.x + 500, y: at.y + 250 });
  });

  it('has every part of the home once: on a plan or among those not placed, by room', () => {
    const all = notPlaced(planned).flatMap(({ parts }) => parts.map(({ id }) => id));
    expect(all).toEqual(expect.arrayContaining([...lamps, ...sockets]));
    expect(new Set(all).size).toBe(all.length);
    const room = notPlaced(planned).find(({ parts }) => parts.some(({ id }) => id === lamps[0]))!;
    expect(home.parts.find(({ id }) => id === lamps[0])!.place).toBe(room.place);
    const placed = done(planned, (doc) => putOnPlan(doc, 'ground', [lamps[0]!], { x: 0, y: 0 }));
    const left = notPlaced(placed).flatMap(({ parts }) => parts.map(({ id }) => id));
    expect([...left, lamps[0]!].sort()).toEqual([...all].sort());
    const gone = done(placed, (doc) => removePlan(doc, 'ground'));
    expect(notPlaced(gone).flatMap(({ parts }) => parts.map(({ id }) => id))).toEqual(all);
    expect([gone.plans, gone.sheet?.plan]).toEqual([undefined, undefined]);
  });

  it('keeps parts where they were in proportion when another picture is laid behind', () => {
    const placed = done(planned, (doc) => putOnPlan(doc, 'ground', [lamps[0]!], { x: 16_000, y: 12_000 }));
    const other = done(placed, (doc) => changePlan(doc, 'ground', { picture: 'p-2', ...planSize(1200, 1200) }));
    expect(other.plans).toEqual([{ ...plan, picture: 'p-2', width: 32_000, height: 32_000 }]);
    expect(other.sheet?.plan?.[lamps[0]!]).toMatchObject({ x: 16_000, y: 16_000 });
  });

  it('forgets the place of a part that is deleted, and undo brings it back', () => {
    const placed = done(planned, (doc) => putOnPlan(doc, 'ground', [lamps[0]!], { x: 0, y: 0 }));
    const { patch } = deleteSelection(placed, [lamps[0]!], []);
    expect(applyPatch(placed, patch).sheet?.plan).toBeUndefined();
    expect(applyPatch(applyPatch(placed, patch), invert(placed, patch))).toEqual(placed);
  });

  it('turns a part round in four steps', () => {
    const placed = done(planned, (doc) => putOnPlan(doc, 'ground', [lamps[0]!], { x: 0, y: 0 }));
    let now = placed;
    const turns = [];
    for (let n = 0; n < 4; n++) {
      now = done(now, (doc) => turnOnPlan(doc, [lamps[0]!]));
      turns.push(now.sheet!.plan![lamps[0]!]!.turn);
    }
    expect(turns).toEqual([1, 2, 3, undefined]);
    expect(now).toEqual(placed);
  });

  it('lets two people place different parts, and asks for the same', () => {
    const put = (id: string, x: number) => putOnPlan(planned, 'ground', [id], { x, y: 0 }).patch;
    expect(conflicts(put(lamps[0]!, 0), put(sockets[0]!, 0))).toEqual([]);
    expect(conflicts(put(lamps[0]!, 0), put(lamps[0]!, 2500))).toEqual([`plan:${lamps[0]}`]);
    const mine = put(lamps[0]!, 0);
    const theirs = applyPatch(applyPatch(planned, mine), put(lamps[0]!, 2500));
    expect(ownOnly(theirs, invert(planned, mine), mine)).toEqual({});
  });

  it('keeps what is put or moved on its paper, each step taken back to the same bytes', () => {
    const ids = [...lamps, ...sockets];
    const step = fc.record({
      kind: fc.constantFrom('put', 'move', 'off', 'turn'),
      some: fc.subarray(ids, { minLength: 1 }),
      x: fc.integer({ min: -50_000, max: 50_000 }),
      y: fc.integer({ min: -50_000, max: 50_000 }),
    });
    fc.assert(
      fc.property(fc.array(step, { maxLength: 12 }), (steps) => {
        const history: { before: Installation; after: Installation; back: ReturnType<typeof invert> }[] = [];
        let now = planned;
        for (const { kind, some, x, y } of steps) {
          const { patch, label } =
            kind === 'put'
              ? putOnPlan(now, 'ground', some, { x, y })
              : kind === 'move'
                ? moveOnPlan(now, 'ground', some, x, y)
                : kind === 'turn'
                  ? turnOnPlan(now, some)
                  : takeOffPlan(now, some);
          expect(label.length).toBeLessThanOrEqual(160);
          for (const key of touched(patch)) expect(key).toMatch(/^plan:/);
          const after = applyPatch(now, patch);
          history.push({ before: now, after, back: invert(now, patch) });
          now = after;
        }
        for (const [id, at] of placedOn(now, 'ground')) {
          const { width, height } = symbolFor(now.parts.find((part) => part.id === id)!, 'overview');
          expect([at.x >= 0, at.y >= 0, at.x + width <= plan.width, at.y + height <= plan.height]).toEqual(
            Array(4).fill(true),
          );
          expect([at.x % 250, at.y % 250]).toEqual([0, 0]);
        }
        for (const { before, after, back } of history.reverse()) {
          const again = applyPatch(after, back);
          expect(JSON.stringify(again)).toBe(JSON.stringify(before));
          expect(diff(again, before)).toEqual({});
        }
      }),
      { numRuns: 60 },
    );
  });
});
