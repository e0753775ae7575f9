import { describe, expect, it } from 'vitest';
import { buildScene } from '@/diagram/layout/build-scene';
import { guide, type Box } from '@/diagram/layout/guides';
import { MODULE } from '@/diagram/symbols/types';
import { draftedHome } from '../commands/drafted';

const box = (x: number, y: number, width = 1000, height = 1000): Box => ({ x, y, width, height });

describe('guides for a part that is moved', () => {
  it('draws it to a line that is near, and tells through what the line runs', () => {
    const { dx, dy, lines } = guide([box(0, 0)], box(0, 4000), 300, 40, true);
    expect([dx, dy]).toEqual([0, 0]);
    expect(lines).toEqual([{ upright: true, at: 500, from: 0, to: 5000 }]);
  });

  it('puts the middle first, where runs go straight, and edges where the middles differ', () => {
    const wide = guide([box(0, 0, 2000)], box(500, 4000), 0, 0, true);
    expect(wide.lines).toEqual([{ upright: true, at: 1000, from: 0, to: 5000 }]);
    const left = guide([box(0, 0, 2000)], box(0, 4000), 0, 0, true);
    expect(left.lines).toEqual([{ upright: true, at: 0, from: 0, to: 5000 }]);
  });

  it('goes to the plain module and is drawn to nothing while the guides are suspended', () => {
    const { dx, lines } = guide([box(0, 0)], box(0, 4000), 300, 0, false);
    expect(dx).toBe(MODULE);
    expect(lines).toEqual([]);
  });

  it('shows equal gaps: midway between two, and as far from the next as that from the one after', () => {
    const gapsOf = (still: Box[], x: number, dx: number) => {
      const found = guide(still, box(x, 0), dx, 0, true);
      return { dx: found.dx, gaps: found.gaps.filter(({ upright }) => !upright).map(({ from, to }) => [from, to]) };
    };
    // 1000 to 8000 is free, the part is 1000 wide: 3000 on either side of it.
    expect(gapsOf([box(0, 0), box(8000, 0)], 3000, 1200)).toEqual({ dx: 1000, gaps: [[1000, 4000], [5000, 8000]] });
    expect(gapsOf([box(0, 0), box(3000, 0)], 9000, -3100)).toEqual({ dx: -3000, gaps: [[1000, 3000], [4000, 6000]] });
    expect(gapsOf([box(9000, 0), box(6000, 0)], 1000, 1800)).toEqual({ dx: 2000, gaps: [[4000, 6000], [7000, 9000]] });
  });

  it('never leaves the module, and draws nothing farther than a module and a half, in a whole home', () => {
    for (const face of ['overview', 'connections'] as const) {
      const scene = buildScene(draftedHome(3), face, face === 'connections' ? { place: 'room0' } : {});
      let inLine = 0;
      for (const [i, part] of scene.parts.entries()) {
        const still = scene.parts.filter((other) => other !== part);
        const [wantX, wantY] = [37 * i - 400, 911 - 53 * i];
        for (const pull of [true, false]) {
          const { dx, dy, lines } = guide(still, part, wantX, wantY, pull);
          expect([(part.x + dx) % MODULE, (part.y + dy) % MODULE].map(Math.abs)).toEqual([0, 0]);
          expect(Math.max(Math.abs(dx - wantX), Math.abs(dy - wantY))).toBeLessThanOrEqual(pull ? 1.5 * MODULE : MODULE / 2);
          if (pull) inLine += lines.length;
        }
      }
      expect(inLine, face).toBeGreaterThan(scene.parts.length / 4);
    }
  });
});
