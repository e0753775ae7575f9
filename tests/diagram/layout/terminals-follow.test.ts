import { describe, expect, it } from 'vitest';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import { copyParts, pasteClip } from '@/diagram/commands/copy';
import { moveParts, turnParts } from '@/diagram/commands/move-parts';
import { isRefusal } from '@/diagram/commands/types';
import { isBar } from '@/diagram/document/kinds';
import { applyPatch } from '@/diagram/document/patch';
import type { Face, Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import type { Scene } from '@/diagram/layout/scene';
import { symbolById } from '@/diagram/symbols';
import { turnedTerminal } from '@/diagram/symbols/turn';
import { counter } from '../commands/counter';
import { draftedHome } from '../commands/drafted';
import { slanted, throughParts } from './checks';

const home = draftedHome(2);
const sceneOf = (doc: Installation, face: Face): Scene =>
  buildScene(doc, face, face === 'connections' ? { place: 'room0' } : {});

/** 1/100 mm: how near a run has to end to its terminal */
const NEAR = 1;

/** Ends of runs that do not lie at a terminal of the symbol as it is turned, where it stands. */
function astray(scene: Scene): string[] {
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  return scene.runs.flatMap((run) =>
    ([[run.from, run.points[0]!], [run.to, run.points.at(-1)!]] as const).flatMap(([[id, mark], at]) => {
      const part = parts.get(id);
      // a bar is met anywhere along it; what stands on another page has its end at the brace
      if (!part || isBar(part.kind)) return [];
      const symbol = symbolById(part.symbol, part.turn % 2 === 1 ? part.height : part.width);
      const own = Object.values(symbol.terminals).map((place) => turnedTerminal(place, symbol, part.turn));
      const hit = own.some(({ x, y }) => Math.hypot(part.x + x - at.x, part.y + y - at.y) <= NEAR);
      return hit ? [] : [`${run.id} at ${id}.${mark}`];
    }),
  );
}

describe.each(['overview', 'connections'] as const)('ends of runs on the %s', (face) => {
  const before = sceneOf(home, face);
  const single = before.parts.filter(({ kind }) => kind === 'lamp' || kind === 'switch' || kind === 'socket').map(({ id }) => id);

  it.each([1, 2, 3, 4])('lie at the terminals after %i quarter turns of every point', (turns) => {
    let doc = home;
    for (let i = 0; i < turns; i++) doc = applyPatch(doc, turnParts(doc, face, single).patch);
    const scene = sceneOf(doc, face);
    expect(scene.parts.filter(({ id }) => single.includes(id)).every(({ turn }) => turn === turns % 4)).toBe(true);
    expect(astray(scene)).toEqual([]);
    expect(slanted(scene)).toEqual([]);
    expect(throughParts(doc, scene)).toEqual([]);
  });

  it('lie at the terminals after a part is moved, another taken in its place, and one added', () => {
    expect(astray(before)).toEqual([]);
    const [first, second] = single as [string, string];
    const moved = applyPatch(home, moveParts(home, face, [first], 2500, 1250).patch);
    expect(astray(sceneOf(moved, face))).toEqual([]);
    const swapped = applyPatch(moved, deleteSelection(moved, [second], []).patch);
    const pasted = pasteClip(swapped, copyParts(swapped, [first])!, counter('p'));
    if (isRefusal(pasted)) throw new Error(pasted.refused);
    expect(astray(sceneOf(applyPatch(swapped, pasted.patch), face))).toEqual([]);
  });
});
