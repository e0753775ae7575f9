import { describe, expect, it } from 'vitest';
import { routeAll } from '@/diagram/layout/route';
import type { Obstacle, RouteEnd, RouteRequest } from '@/diagram/layout/route-grid';
import { findDots, findHops } from '@/diagram/layout/route-marks';
import type { Side } from '@/diagram/symbols/types';

/** The router alone, on grounds small enough to judge by eye. */
const end = (x: number, y: number, side: Side, part = 'none'): RouteEnd => ({ part, x, y, sides: [side] });
const run = (id: string, from: RouteEnd, to: RouteEnd, strand = id): RouteRequest => ({
  id,
  strand,
  family: strand,
  net: strand,
  from,
  to,
});
const box = (id: string, x: number, y: number, width: number, height: number): Obstacle => ({
  id,
  x,
  y,
  width,
  height,
});

describe('the router', () => {
  it('goes straight where nothing is in the way', () => {
    const { points, forced } = routeAll([run('a', end(0, 0, 'down'), end(0, 3000, 'up'))], []);
    expect(points.get('a')).toEqual([
      { x: 0, y: 0 },
      { x: 0, y: 3000 },
    ]);
    expect(forced).toEqual([]);
  });

  it('joins terminals of parts that touch', () => {
    const parts = [box('p', -250, -1000, 500, 1000), box('q', -250, 250, 500, 1000)];
    const { points } = routeAll([run('a', end(0, 0, 'down', 'p'), end(0, 250, 'up', 'q'))], parts);
    expect(points.get('a')).toEqual([
      { x: 0, y: 0 },
      { x: 0, y: 250 },
    ]);
  });

  it('goes round a part with as few bends as it takes', () => {
    const wall = box('wall', -500, 1000, 1000, 500);
    const path = routeAll([run('a', end(0, 0, 'down'), end(0, 3000, 'up'))], [wall]).points.get('a')!;
    expect(path[0]).toEqual({ x: 0, y: 0 });
    expect(path.at(-1)).toEqual({ x: 0, y: 3000 });
    expect(path).toHaveLength(6);
    for (const { x, y } of path) expect(x >= -500 && x <= 500 && y >= 1000 && y <= 1500).toBe(false);
  });

  it('keeps different conductors apart and lets those of one strand share their way', () => {
    const crossed = routeAll(
      [run('a', end(0, 2000, 'right'), end(4000, 2000, 'left')), run('b', end(2000, 0, 'down'), end(2000, 4000, 'up'))],
      [],
    ).points;
    expect([...findHops([...crossed].map(([id, points]) => ({ id, net: id, points })))]).toEqual([
      ['a', [{ x: 2000, y: 2000 }]],
    ]);
    // two that ask for the same stretch get one each
    const beside = routeAll(
      [run('a', end(0, 0, 'right'), end(0, 4000, 'right')), run('b', end(0, 1000, 'right'), end(0, 3000, 'right'))],
      [],
    ).points;
    expect(Math.max(...beside.get('a')!.map((p) => p.x))).not.toBe(Math.max(...beside.get('b')!.map((p) => p.x)));
    const branch = routeAll(
      [run('a', end(0, 0, 'down'), end(0, 4000, 'up'), 's'), run('b', end(0, 0, 'down'), end(2000, 4000, 'up'), 's')],
      [],
    ).points;
    const dots = findDots(
      [...branch].map(([id, points]) => ({ id, net: 's', points })),
      () => false,
    );
    expect(dots).toHaveLength(1);
  });

  it('crosses a bar squarely and never over its terminals', () => {
    const bar: Obstacle = { ...box('bar', -3000, 1000, 6000, 1000), crossable: true };
    const over = routeAll([run('a', end(0, 0, 'down'), end(0, 3000, 'up'))], [bar]).points.get('a')!;
    expect(over).toEqual([
      { x: 0, y: 0 },
      { x: 0, y: 3000 },
    ]);
    const pinned = routeAll([run('a', end(0, 0, 'down'), end(0, 3000, 'up'))], [bar], [], {
      pins: [{ x: 0, y: 1500 }],
    }).points.get('a')!;
    expect(
      pinned.some(
        (p, i) =>
          i > 0 &&
          p.x === 0 &&
          pinned[i - 1]!.x === 0 &&
          Math.min(p.y, pinned[i - 1]!.y) < 1500 &&
          Math.max(p.y, pinned[i - 1]!.y) > 1500,
      ),
    ).toBe(false);
    for (let i = 0; i + 1 < pinned.length; i++)
      if (pinned[i]!.y === pinned[i + 1]!.y) expect(pinned[i]!.y <= 1000 || pinned[i]!.y >= 2000).toBe(true);
  });

  it('reaches terminals that stand off the module', () => {
    const path = routeAll([run('a', end(13, 7, 'down'), end(3011, 2999, 'up'))], []).points.get('a')!;
    expect(path[0]).toEqual({ x: 13, y: 7 });
    expect(path.at(-1)).toEqual({ x: 3011, y: 2999 });
    expect(path.slice(1).every((p, i) => p.x === path[i]!.x || p.y === path[i]!.y)).toBe(true);
  });

  it('says which runs found no free way, and draws them all the same', () => {
    const cage = [
      box('n', -1000, -1000, 2000, 500),
      box('s', -1000, 500, 2000, 500),
      box('w', -1000, -1000, 500, 2000),
      box('e', 500, -1000, 500, 2000),
    ];
    const { points, forced } = routeAll([run('a', end(0, 0, 'down'), end(5000, 5000, 'up'))], cage);
    expect(forced).toEqual(['a']);
    expect(points.get('a')!.length).toBeGreaterThan(1);
  });

  it('gives the same ways whatever the order it is asked in', () => {
    const requests = Array.from({ length: 12 }, (_, i) =>
      run(`r${i}`, end(i * 500, 0, 'down'), end(((i * 7) % 12) * 500, 6000, 'up')),
    );
    const parts = [box('p', 1000, 2000, 1500, 500), box('q', 3500, 3000, 1000, 500)];
    const asked = (list: RouteRequest[], obstacles: Obstacle[]) =>
      JSON.stringify([...routeAll(list, obstacles).points].sort(([a], [b]) => (a < b ? -1 : 1)));
    expect(asked([...requests].reverse(), [...parts].reverse())).toBe(asked(requests, parts));
  });
});

describe('hops and dots', () => {
  const paths = [
    {
      id: 'level',
      net: 'a',
      points: [
        { x: 0, y: 500 },
        { x: 1000, y: 500 },
      ],
    },
    {
      id: 'upright',
      net: 'b',
      points: [
        { x: 500, y: 0 },
        { x: 500, y: 1000 },
      ],
    },
  ];

  it('lets the level run hop, in whatever order they are drawn', () => {
    for (const list of [paths, [...paths].reverse()])
      expect([...findHops(list)]).toEqual([['level', [{ x: 500, y: 500 }]]]);
  });

  it('marks a joint where conductors of one net meet, not a crossing', () => {
    const joined = paths.map((path) => ({ ...path, net: 'a' }));
    expect(findHops(joined).size).toBe(0);
    expect(findDots(joined, () => false)).toEqual([{ x: 500, y: 500, net: 'a' }]);
    expect(findDots(paths, () => false)).toEqual([]);
    expect(findDots(joined, () => true)).toEqual([]);
  });

  it('needs three arms for a dot: a corner has two', () => {
    const corner = [
      {
        id: 'c',
        net: 'a',
        points: [
          { x: 0, y: 0 },
          { x: 500, y: 0 },
          { x: 500, y: 500 },
        ],
      },
    ];
    expect(findDots(corner, () => false)).toEqual([]);
  });
});
