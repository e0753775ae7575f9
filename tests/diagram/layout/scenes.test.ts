import { describe, expect, it } from 'vitest';
import type { Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { connectionPages } from '@/diagram/layout/connections-page';
import type { Scene } from '@/diagram/layout/scene';
import * as check from './checks';
import { draftedHomes, examples, toldHome } from './homes';

/** What must hold of the sheet of any home. */
const CHECKS: [name: string, check: (doc: Installation, scene: Scene) => string[]][] = [
  ['every run goes level or upright', (_, scene) => check.slanted(scene)],
  ['no run passes over a part', check.throughParts],
  ['no two conductors lie on each other', check.overlaidRuns],
  ['no part lies on another', (_, scene) => check.overlaidParts(scene)],
  ['no text lies on another', (_, scene) => check.overlaidTexts(scene)],
  ['no text lies on a part', check.textsOnParts],
  ['no text lies on a run', check.textsOnRuns],
  ['no text lies on a stroke of a symbol', check.textsOnStrokes],
  ['bands and lanes hold', check.brokenBands],
  ['every number is whole', (_, scene) => check.fractions(scene)],
  ['every crossing is marked', check.unmarkedCrossings],
];

/** Every broken check of a set of scenes, with where it broke; a few are enough to see what is wrong. */
function broken(docs: readonly [string, Installation][], scenes: (doc: Installation) => Scene[]): string[] {
  const found: string[] = [];
  for (const [name, doc] of docs)
    for (const scene of scenes(doc))
      for (const [what, run] of CHECKS) {
        const where = run(doc, scene);
        if (where.length > 0)
          found.push(`${name} ${scene.place ?? ''}: ${what}: ${where.slice(0, 3).join('; ')} (${where.length})`);
      }
  return found.slice(0, 20);
}

const overview = (doc: Installation): Scene[] => [buildScene(doc, 'overview')];
const connections = (doc: Installation): Scene[] =>
  connectionPages(doc).map(({ place }) => buildScene(doc, 'connections', { place }));

describe('scenes', () => {
  const drafted = draftedHomes(200, 7).map((doc, i): [string, Installation] => [`home ${i}`, doc]);

  it('draws the overview of every example without a fault', () => {
    expect(broken(examples(), overview)).toEqual([]);
  });

  it('draws the connections of every example without a fault', () => {
    expect(broken(examples(), connections)).toEqual([]);
  });

  it('draws both faces of a told home without a fault', () => {
    expect(broken([['six rooms', toldHome()]], (doc) => [...overview(doc), ...connections(doc)])).toEqual([]);
  });

  it('writes beside every wired terminal what it is', () => {
    const homes: [string, Installation][] = [...examples(), ['six rooms', toldHome()]];
    for (const [name, doc] of homes)
      expect([name, ...connections(doc).flatMap((scene) => check.unmarkedTerminals(doc, scene))]).toEqual([name]);
  });

  it('draws the overview of 200 drafted homes without a fault', { timeout: 240_000 }, () => {
    expect(broken(drafted, overview)).toEqual([]);
  });

  it('draws every page of the connections of 200 drafted homes without a fault', { timeout: 240_000 }, () => {
    expect(broken(drafted, connections)).toEqual([]);
  });
});
