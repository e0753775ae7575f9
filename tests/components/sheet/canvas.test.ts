import { describe, expect, it } from 'vitest';
import { endsNear, meant, REACH } from '@/components/sheet/canvas/pick';
import { joinedStrokes } from '@/components/sheet/canvas/symbol-strokes';
import { stripScale, STRIP } from '@/components/sheet/foot/strip-scale';
import { leaderPath, type Rect } from '@/components/sheet/margin/leader-path';
import type { Scene, ScenePart } from '@/diagram/layout/scene';
import { legend } from '@/diagram/symbols';

const part = (id: string, x: number, terminals: { mark: string; x: number; y: number }[]): ScenePart => ({
  ...{ id, kind: 'lamp', symbol: 'lamp', x, y: 0, width: 500, height: 500, turn: 0, feed: 'mains', texts: [] },
  terminals: terminals.map((terminal) => ({ ...terminal, side: 'up' })),
});
const sceneOf = (...parts: ScenePart[]) => ({ parts }) as unknown as Scene;

describe('what a finger means', () => {
  const scene = sceneOf(
    part('a', 0, [
      { mark: 'L', x: 250, y: 0 },
      { mark: 'N', x: 250, y: 0 },
    ]),
    part('b', 600, [{ mark: '1', x: 700, y: 0 }]),
  );

  it('is one terminal where they lie apart on the screen', () => {
    // 450 of the drawing are 45 px at this scale: more than a finger needs
    expect(meant(scene, { x: 300, y: 0 }, 0.1).map(({ ends }) => ends[0]![0])).toEqual(['a']);
  });

  it('is two to choose from where they lie closer than 24 px', () => {
    expect(meant(scene, { x: 400, y: 0 }, 0.05).map(({ ends }) => ends[0]![0])).toEqual(['a', 'b']);
  });

  it('is nothing out of reach, or the nearest of the part that is under it', () => {
    const far = { x: 250, y: (REACH + 4) / 0.1 };
    expect(meant(scene, far, 0.1)).toEqual([]);
    expect(meant(scene, far, 0.1, 'b').map(({ ends }) => ends)).toEqual([[['b', '1']]]);
  });

  it('counts terminals that are drawn at one point as one target', () => {
    expect(endsNear(scene, { x: 250, y: 0 }, 10)[0]!.ends).toEqual([
      ['a', 'L'],
      ['a', 'N'],
    ]);
  });

  it('has a target of 44 px whatever the zoom', () => {
    for (const scale of [0.01, 0.036, 0.1, 0.3]) {
      const edge = { x: 250 - 20 / scale, y: 0 };
      expect(meant(sceneOf(scene.parts[0]!), edge, scale)).toHaveLength(1);
      expect(meant(sceneOf(scene.parts[0]!), { x: 250 - 24 / scale, y: 0 }, scale)).toHaveLength(0);
    }
  });
});

describe('strokes that are drawn as one path', () => {
  it('keep all that a symbol draws, and every fill a path of its own', () => {
    for (const symbol of legend()) {
      const joined = joinedStrokes(symbol);
      const all = symbol.strokes.map(({ d }) => d.replace(/^m/, 'M')).join('');
      expect(joined.map(({ d }) => d).join('')).toBe(all);
      const fills = (strokes: readonly { fill?: string }[]) => strokes.filter(({ fill }) => (fill ?? 'none') !== 'none').length;
      expect(fills(joined)).toBe(fills(symbol.strokes));
      expect(joined.every(({ d }) => d.startsWith('M'))).toBe(true);
    }
  });
});

describe('the strip', () => {
  const frames = [{ kind: 'room', y: 10_000, height: 6000 }] as unknown as Scene['frames'];

  it('gives the rooms the most of its height, and keeps the order of what lies above each other', () => {
    const scale = stripScale({ frames, height: 20_000 });
    expect([scale(0), scale(10_000), scale(16_000), scale(20_000)]).toEqual([0, STRIP.rooms, STRIP.roomsEnd, STRIP.height]);
    const heights = [0, 3000, 9999, 10_001, 15_999, 16_001, 19_000, 25_000].map(scale);
    expect(heights).toEqual([...heights].sort((a, b) => a - b));
  });
});

describe('a leader', () => {
  const circle: Rect = { x: 100, y: 200, width: 40, height: 30 };
  const crossed = (points: { x: number; y: number }[], rect: Rect) =>
    points.some((b, i) => {
      const a = points[i - 1];
      return a && a.y === b.y && a.y > rect.y && a.y < rect.y + rect.height && Math.min(a.x, b.x) < rect.x + rect.width && Math.max(a.x, b.x) > rect.x;
    });

  it('goes straight where nothing is in the way', () => {
    expect(leaderPath({ x: 500, y: 50 }, circle, [])).toEqual([
      { x: 500, y: 50 },
      { x: 486, y: 50 },
      { x: 486, y: 215 },
      { x: 140, y: 215 },
    ]);
  });

  it('goes round what lies between, at right angles, and ends at the circle', () => {
    const part: Rect = { x: 250, y: 190, width: 30, height: 50 };
    const points = leaderPath({ x: 500, y: 50 }, circle, [part]);
    expect(crossed(points, part)).toBe(false);
    for (const [i, b] of points.entries()) if (i > 0) expect(points[i - 1]!.x === b.x || points[i - 1]!.y === b.y).toBe(true);
    expect([circle.y, circle.y + circle.height]).toContain(points.at(-1)!.y);
  });
});
