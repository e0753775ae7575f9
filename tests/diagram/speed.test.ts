import { describe, expect, it } from 'vitest';
import { Home } from '@/diagram/document/home';
import type { Installation } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';

/** A home of about so many parts, a room a way, every fourth backed up. */
function homeOf(parts: number): Installation {
  const home = new Home().backup({ va: 100_000, surge: 200_000 });
  for (let n = 11, count = 22; count < parts; n++, count += 17) {
    const way = `Q${n}`;
    home
      .place(`room${n}`, 'room')
      .way(way, `room${n}`, { rating: 10 }, { csa: 2.5, bars: n % 4 === 3 ? '2' : '' })
      .lamp(`E${n}`, `S${n}`, way)
      .lamp(`EB${n}`, `SB${n}`, way)
      .twoWay(`ET${n}`, `SC${n}`, `SD${n}`, way)
      .socket(`X${n}`, way)
      .socket(`XB${n}`, way)
      .fan(`M${n}`, `SF${n}`, `R${n}`, way);
  }
  return home.document();
}

/** ms of processor time, so that what else the machine does is not measured; the median of several. */
function milliseconds(document: Installation, runs = 5): number {
  const times = Array.from({ length: runs }, () => {
    const before = process.cpuUsage();
    examine(document);
    const { user, system } = process.cpuUsage(before);
    return (user + system) / 1000;
  });
  return times.sort((a, b) => a - b)[Math.floor(runs / 2)]!;
}

describe('speed of examining', () => {
  it('takes 1,000 parts in well under a second, and grows nearly in step with the parts', () => {
    const small = homeOf(1000);
    const large = homeOf(5000);
    milliseconds(small, 3);
    const [few, many] = [milliseconds(small), milliseconds(large)];
    expect(few).toBeLessThan(700);
    const exponent = Math.log(many / few) / Math.log(large.parts.length / small.parts.length);
    expect(exponent).toBeLessThan(1.3);
  }, 60_000);
});
