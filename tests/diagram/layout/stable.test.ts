import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyPatch } from '@/diagram/document/patch';
import { canonical, emptyDocument, type Installation, type Part, type Wire } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { connectionPages } from '@/diagram/layout/connections-page';
import { placeAll, positionsOn } from '@/diagram/layout/place';
import { randomDocument } from '../random-document';
import { supplyOf } from '../survey/surveys';
import { permuted } from './checks';
import { draftedHomes, examples, toldHome } from './homes';

/** A digest: two sheets of a hundred kilobytes say nothing side by side. */
const bytes = (doc: Installation): string => createHash('sha256').update(whole(doc)).digest('hex');
const whole = (doc: Installation): string =>
  JSON.stringify([
    buildScene(doc, 'overview'),
    ...connectionPages(doc).map(({ place }) => buildScene(doc, 'connections', { place })),
  ]);

const placed = (doc: Installation): Installation => applyPatch(doc, placeAll(doc));

describe('the same home is the same sheet', () => {
  it('gives the same bytes for the same document, and in any order of its lists', { timeout: 60_000 }, () => {
    for (const [, doc] of [...examples().slice(0, 3), ['six rooms', toldHome()] as const]) {
      const first = bytes(doc);
      expect(bytes(structuredClone(doc))).toBe(first);
      expect(bytes(permuted(doc, 3))).toBe(first);
      expect(bytes(permuted(doc, 8))).toBe(first);
    }
  });

  it('draws a placed document as it draws it unplaced', { timeout: 60_000 }, () => {
    for (const doc of [...examples().map(([, d]) => d), toldHome()]) expect(bytes(placed(doc))).toBe(bytes(doc));
  });
});

describe('placing', () => {
  it('gives every part a position on each face where it is drawn, once', () => {
    for (const doc of [toldHome(), ...examples().map(([, d]) => d)]) {
      const { set } = placeAll(doc);
      expect(Object.keys(set!.connections!).sort()).toEqual(doc.parts.map(({ id }) => id).sort());
      const drawn = buildScene(doc, 'overview').parts.map(({ id }) => id);
      expect(Object.keys(set!.overview!).sort()).toEqual(drawn.sort());
      expect(placeAll(placed(doc))).toEqual({});
    }
  });

  it('leaves out of the overview only joints of neutral and earth', () => {
    const doc = toldHome();
    const drawn = new Set(buildScene(doc, 'overview').parts.map(({ id }) => id));
    expect([...new Set(doc.parts.filter(({ id }) => !drawn.has(id)).map(({ kind }) => kind))]).toEqual(['joint']);
  });

  it('keeps what has a position', () => {
    const doc = placed(toldHome());
    const lamp = doc.parts.find(({ kind }) => kind === 'lamp')!;
    const moved = applyPatch(doc, { set: { overview: { [lamp.id]: { x: 99_000, y: 4_000, pinned: true } } } });
    expect(positionsOn(moved, 'overview').get(lamp.id)).toEqual({ x: 99_000, y: 4_000, pinned: true });
    const scene = buildScene(moved, 'overview');
    expect(scene.parts.find(({ id }) => id === lamp.id)).toMatchObject({ x: 99_000, y: 4_000 });
  });

  it('moves no other part when one is added, taken away or wired', { timeout: 60_000 }, () => {
    for (const doc of draftedHomes(6, 21)
      .filter((home) => home.parts.some(({ kind }) => kind === 'mcb'))
      .map(placed)) {
      const way = doc.parts.find(({ kind }) => kind === 'mcb')!;
      const place = doc.places.at(-1)!.id;
      const lamp: Part = { id: 'new-lamp', kind: 'lamp', place, watts: 9 };
      const wire: Wire = { id: 'new-wire', from: [way.id, '2'], to: ['new-lamp', 'L'], role: 'line' };
      const more = placed(applyPatch(doc, { set: { parts: [lamp], wires: [wire] } }));
      for (const face of ['overview', 'connections'] as const) {
        for (const [id, at] of Object.entries(doc.sheet![face]!)) expect(more.sheet![face]![id]).toEqual(at);
        expect(more.sheet![face]!['new-lamp']).toBeDefined();
      }
      const box = buildScene(more, 'overview').parts.find(({ id }) => id === 'new-lamp')!;
      const hits = buildScene(more, 'overview').parts.filter(
        (p) =>
          p.id !== box.id &&
          p.x < box.x + box.width &&
          box.x < p.x + p.width &&
          p.y < box.y + box.height &&
          box.y < p.y + p.height,
      );
      expect(hits.map(({ id }) => id)).toEqual([]);
      const fewer = applyPatch(more, {
        remove: { parts: ['new-lamp'], wires: ['new-wire'], overview: ['new-lamp'], connections: ['new-lamp'] },
      });
      expect(fewer).toEqual(canonical(doc));
    }
  });
});

describe('any document', () => {
  it('draws an empty one', () => {
    const doc = emptyDocument('Nothing yet', 'IEC', supplyOf('TT'));
    const scene = buildScene(doc, 'overview');
    expect(scene.parts).toEqual([]);
    expect(scene.bands.map(({ name }) => name)).toEqual(['SUPPLY', 'BOARD', 'ROOMS']);
    expect(buildScene(doc, 'connections').parts).toEqual([]);
    expect(placeAll(doc)).toEqual({});
  });

  it('never fails, and shows every part, whatever is joined to what', { timeout: 120_000 }, () => {
    fc.assert(
      fc.property(randomDocument(), (doc) => {
        const shown = new Set(
          connectionPages(doc).flatMap(({ place }) =>
            buildScene(doc, 'connections', { place }).parts.map(({ id }) => id),
          ),
        );
        expect(shown.size).toBe(doc.parts.length);
        const overview = buildScene(doc, 'overview');
        for (const part of doc.parts)
          if (part.kind !== 'joint') expect(overview.parts.some(({ id }) => id === part.id)).toBe(true);
        for (const run of overview.runs) expect(run.points.length).toBeGreaterThanOrEqual(2);
      }),
      { numRuns: 60, seed: 5 },
    );
  });

  it('puts what hangs in the air in a band of its own', () => {
    const doc: Installation = { ...toldHome(), parts: [...toldHome().parts, { id: 'Q99', kind: 'mcb' }] };
    const scene = buildScene(doc, 'overview');
    const band = scene.bands.find(({ name }) => name === 'NOT PLACED')!;
    const loose = scene.parts.find(({ id }) => id === 'Q99')!;
    expect(loose.y).toBeGreaterThanOrEqual(band.y);
    expect(loose.y + loose.height).toBeLessThanOrEqual(band.y + band.height);
  });

  it('draws positions at the far ends of what a document may hold', () => {
    const doc = placed(toldHome());
    const far = applyPatch(doc, {
      set: {
        overview: {
          [doc.parts[0]!.id]: { x: 1_000_000, y: 1_000_000 },
          [doc.parts[1]!.id]: { x: -1_000_000, y: -1_000_000 },
        },
      },
    });
    expect(buildScene(far, 'overview').runs).toHaveLength(buildScene(doc, 'overview').runs.length);
  });
});
