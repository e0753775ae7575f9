import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readAddress, rehearsalHref, writeAddress } from '@/components/rehearsal/address';
import { figurePlaces, obstaclesOf } from '@/components/rehearsal/canvas/figure-places';
import { pencilStrokes } from '@/components/rehearsal/canvas/pencil';
import { aside, cleaned, merged } from '@/components/rehearsal/canvas/pencil-lines';
import { tightAmps } from '@/components/rehearsal/looks';
import { decades, shareOf, stationPlaces } from '@/components/rehearsal/time-scale';
import { buildScene } from '@/diagram/layout/build-scene';
import type { Point } from '@/diagram/layout/scene';
import { createRehearsal } from '@/diagram/rehearsal/rehearse';
import type { Walk } from '@/diagram/rehearsal/walk';
import { draftDocument } from '@/diagram/survey/draft';
import { readExample } from '../../diagram/example-homes';
import { optionsOf, room } from '../../diagram/survey/surveys';

describe('the address of a rehearsal', () => {
  const id = fc.stringMatching(/^[A-Za-z0-9_.:-]{1,12}$/);
  it('gives back what was written, whatever it was', () => {
    const settings = fc.dictionary(id, fc.constantFrom('open', 'closed', 'A', '0', 'B', 'out', 'crossed'), {
      maxKeys: 4,
    });
    const faults = fc.array(fc.record({ kind: fc.constantFrom('line-to-case', 'neutral-open' as const), at: id }), {
      maxLength: 2,
    });
    fc.assert(
      fc.property(
        settings,
        faults,
        fc.boolean(),
        fc.option(id),
        fc.option(id),
        fc.nat(9),
        (moved, wanted, dead, hand, place, step) => {
          const list = wanted as { kind: 'line-to-case' | 'neutral-open'; at: string }[];
          const stance = { supply: dead ? ('dead' as const) : ('live' as const), moved };
          const station = list.length > 0 ? step : null;
          const read = readAddress(new URLSearchParams(writeAddress({ stance, faults: list, station, hand, place })));
          const plain = !dead && Object.keys(moved).length === 0;
          expect(read).toEqual({ stance: plain ? null : stance, condition: null, faults: list, station, hand, place });
        },
      ),
    );
  });

  it('leaves out what is foreign, and is empty for a home as it stands', () => {
    const foreign = readAddress(new URLSearchParams('set=<b>~open,Q1&fault=boom~E1&step=-4&hand=%20&condition=storm'));
    expect(foreign).toEqual({ stance: null, condition: null, faults: [], station: null, hand: null, place: null });
    expect(
      writeAddress({ stance: { supply: 'live', moved: {} }, faults: [], station: null, hand: null, place: null }),
    ).toBe('');
  });

  it('of a finding names its condition and its faults', () => {
    const href = rehearsalHref('j1', [{ kind: 'line-to-case', at: 'E1' }], 'outage/B');
    expect(href).toBe('/jobs/j1/rehearsal?condition=outage%2FB&fault=line-to-case~E1');
    expect(readAddress(new URLSearchParams(href.split('?')[1])).condition).toBe('outage/B');
  });
});

describe('the line of time', () => {
  const walk = (times: (number | null)[]): Walk =>
    ({
      stations: times.map((t, i) => ({ kind: i === 0 ? 'before' : i === times.length - 1 ? 'still' : 'opens', t })),
    }) as unknown as Walk;

  it('gives every station room for a finger, in order, within the line, wherever the events lie', () => {
    const times = fc.array(fc.double({ min: 0, max: 3600, noNaN: true }), { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(times, (list) => {
        const sorted = [null, ...list.sort((a, b) => a - b), list.at(-1)!];
        const places = stationPlaces(walk(sorted), 3600, 56, 400, 44);
        expect(places[0]).toBe(0);
        places.slice(1).forEach((x, i) => expect(x - places[i]!).toBeGreaterThanOrEqual(43.99));
        expect(places.at(-1)!).toBeLessThanOrEqual(456);
      }),
    );
  });

  it('is logarithmic: each decade as wide as the next', () => {
    const shares = [0.001, 0.01, 0.1, 1].map((seconds) => shareOf(seconds, 1));
    shares.forEach((share, i) => expect(share).toBeCloseTo(i / 3, 12));
    expect(decades(1)).toEqual([0.001, 0.01, 0.1, 1]);
    expect(decades(10000).length).toBeLessThanOrEqual(5);
  });
});

describe('figures on the sheet', () => {
  it('have four characters at most beneath a symbol', () => {
    expect([0.043, 0.097, 0.24, 0.996, 2.61, 11.4].map(tightAmps)).toEqual([
      '43mA',
      '97mA',
      '.24A',
      '1.0A',
      '2.6A',
      '11A',
    ]);
    for (let amps = 0.001; amps < 99; amps *= 1.07) expect(tightAmps(amps).length).toBeLessThanOrEqual(4);
  });

  it('stand on no lettering, part or ring, and not on each other', () => {
    const scene = buildScene(readExample('clean-backup-home'), 'overview');
    const places = [...figurePlaces(scene).values()];
    expect(places.length).toBeGreaterThanOrEqual(scene.rings.length);
    const solid = [
      ...scene.parts,
      ...scene.rings.map(({ x, y, radius }) => ({
        x: x - radius,
        y: y - radius,
        width: 2 * radius,
        height: 2 * radius,
      })),
    ];
    expect(obstaclesOf(scene).length).toBeGreaterThan(solid.length);
    for (const { x, y, anchor, lines } of places) {
      const box = { width: lines === 2 ? 1000 : 2400, height: lines === 2 ? 540 : 220 };
      const left = anchor === 'start' ? x : x - box.width;
      const meets = solid.filter(
        (each) =>
          left < each.x + each.width &&
          each.x < left + box.width &&
          y < each.y + each.height &&
          each.y < y + box.height,
      );
      expect(meets).toEqual([]);
    }
  });
});

describe('the pencil', () => {
  it('goes beside a line on its right, at the same distance round corners', () => {
    const line = [
      { x: 0, y: 0 },
      { x: 1000, y: 0 },
      { x: 1000, y: 800 },
    ];
    expect(aside(line, 100)).toEqual([
      { x: 0, y: 100 },
      { x: 900, y: 100 },
      { x: 900, y: 800 },
    ]);
  });

  it('does not retrace itself', () => {
    const up = [
      { x: 0, y: 900 },
      { x: 0, y: 0 },
      { x: -300, y: 0 },
    ];
    const back = [
      { x: -300, y: 0 },
      { x: 500, y: 0 },
    ];
    expect(merged([up, back])).toEqual([
      { x: 0, y: 900 },
      { x: 0, y: 0 },
      { x: 500, y: 0 },
    ]);
    expect(
      cleaned([
        { x: 1, y: 1 },
        { x: 1, y: 1 },
      ]),
    ).toEqual([{ x: 1, y: 1 }]);
  });

  it('draws the way out to the faulted part and the way home from it, dashed', () => {
    const doc = readExample('clean-backup-home');
    const scene = buildScene(doc, 'overview');
    const rehearse = createRehearsal(doc);
    const { outcome } = rehearse({
      stance: null,
      condition: 'outage',
      faults: [{ kind: 'line-to-case', at: 'M1' }],
      hand: null,
    });
    if (!outcome || !('walk' in outcome)) throw new Error('not walked');
    const cableOf = new Map(doc.wires.flatMap(({ id, cable }) => (cable ? [[id, cable] as const] : [])));
    const strokes = pencilStrokes(scene, outcome.walk.stations[1]!.path, cableOf);
    const fan = scene.parts.find(({ id }) => id === 'M1')!;
    const near = ({ x, y }: { x: number; y: number }) =>
      Math.abs(x - fan.x - fan.width / 2) < 800 && Math.abs(y - fan.y) < 800;
    expect(strokes.some(({ out, points }) => out && near(points.at(-1)!))).toBe(true);
    expect(strokes.some(({ out, points }) => !out && near(points[0]!))).toBe(true);
    for (const { points } of strokes)
      points.slice(1).forEach((b, i) => expect(points[i]!.x === b.x || points[i]!.y === b.y).toBe(true));
  });

  it('is set down anew where a core leaves a board and comes in over a room of the same page', () => {
    const rooms = [
      room('Porch', { kind: 'intake', lamps: 2, run: 4 }),
      ...[1, 2, 3, 4, 5].map((n) => room(`Room ${n}`, { outlets: 3, run: 9 })),
    ];
    const doc = draftDocument(
      rooms.map((row, order) => ({ ...row, order })),
      optionsOf(),
    );
    const scene = buildScene(doc, 'connections', { place: 'porch' });
    const lamp = scene.parts.find(({ kind }) => kind === 'lamp')!;
    const { outcome } = createRehearsal(doc)({
      stance: null,
      condition: 'mains',
      faults: [{ kind: 'line-to-case', at: lamp.id }],
      hand: null,
    });
    if (!outcome || !('walk' in outcome)) throw new Error('not walked');
    const { path } = outcome.walk.stations[1]!;
    const strokes = pencilStrokes(scene, path, new Map());
    for (const { points } of strokes)
      points.slice(1).forEach((b, i) => expect(points[i]!.x === b.x || points[i]!.y === b.y).toBe(true));
    const halves = scene.runs.filter(({ cut, wires }) => cut && path.some(({ wire, out }) => out && wires[0] === wire));
    expect(halves).toHaveLength(2);
    // each half is followed from one end to the other, a little beside it
    const beside = (end: Point, line: readonly Point[]): boolean =>
      line.slice(1).some((b, i) => {
        const a = line[i]!;
        const near = (p: number, q: number, at: number) => at > Math.min(p, q) - 700 && at < Math.max(p, q) + 700;
        return near(a.x, b.x, end.x) && near(a.y, b.y, end.y);
      });
    for (const { points } of halves)
      for (const end of [points[0]!, points.at(-1)!])
        expect(strokes.some((stroke) => stroke.out && beside(end, stroke.points))).toBe(true);
  });
});
