import ELK from 'elkjs/lib/elk.bundled.js';
import { describe, expect, it } from 'vitest';
import { ELK_OPTIONS, PORT_OPTIONS, elkCommand, elkGraph } from '@/components/sheet/tidy/elk-graph';
import { placeSupply } from '@/diagram/commands/place-supply';
import { suggest } from '@/diagram/commands/extend/catalogue';
import { withPlaces } from '@/diagram/commands/place-new';
import { applyPatch } from '@/diagram/document/patch';
import { buildScene } from '@/diagram/layout/build-scene';
import { MODULE } from '@/diagram/symbols/types';
import { counter } from '../../diagram/commands/counter';
import { home } from './window';

function room() {
  const start = placeSupply(home());
  const doc = applyPatch(home(), start.patch);
  const line = suggest(doc, start.next!, { newId: counter(), typed: 'study lamps' }).fitting[0]!;
  const drawn = applyPatch(doc, line.place({ lamps: 3, fans: 1 }).patch);
  return applyPatch(drawn, withPlaces(drawn, {}));
}

describe('tidying by elkjs', () => {
  it('is asked for by names that it knows', async () => {
    const known = new Set((await new ELK().knownLayoutOptions()).map((option) => option.id));
    for (const name of [...Object.keys(ELK_OPTIONS), ...Object.keys(PORT_OPTIONS)])
      expect(known).toContain(`org.eclipse.${name}`);
  });

  it('moves only what it was given, to whole modules, and no two parts onto each other', async () => {
    const doc = room();
    const place = doc.places.find((candidate) => candidate.name === 'Study')!.id;
    const scene = buildScene(doc, 'connections', { place });
    const ids = new Set(scene.parts.slice(1).map((part) => part.id));
    const command = elkCommand(doc, scene, await new ELK().layout(elkGraph(scene, ids)));
    const next = applyPatch(doc, command.patch);
    const after = buildScene(next, 'connections', { place });
    const fixed = scene.parts[0]!;
    expect(after.parts.find((part) => part.id === fixed.id)).toMatchObject({ x: fixed.x, y: fixed.y });
    const moved = after.parts.filter((part) => ids.has(part.id));
    for (const part of moved) {
      expect([part.x % MODULE, part.y % MODULE]).toEqual([0, 0]);
      for (const other of moved) {
        if (other.id <= part.id) continue;
        const apart =
          part.x + part.width <= other.x ||
          other.x + other.width <= part.x ||
          part.y + part.height <= other.y ||
          other.y + other.height <= part.y;
        expect(apart, `${part.id} and ${other.id}`).toBe(true);
      }
    }
  });

  it('gives the same drawing for the same sheet', async () => {
    const doc = room();
    const scene = buildScene(doc, 'connections');
    const ids = new Set(scene.parts.map((part) => part.id));
    const [first, second] = await Promise.all([0, 1].map(() => new ELK().layout(elkGraph(scene, ids))));
    expect(elkCommand(doc, scene, first!)).toEqual(elkCommand(doc, scene, second!));
  });
});
