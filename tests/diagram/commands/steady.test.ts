import { describe, expect, it } from 'vitest';
import { editRatings, sharedRating } from '@/diagram/commands/edit-in-place';
import { marksOf } from '@/diagram/commands/ends';
import { suggest } from '@/diagram/commands/extend/catalogue';
import { joinTerminals } from '@/diagram/commands/join-terminals';
import { distributeParts, moveParts, placeExactly, placeText } from '@/diagram/commands/move-parts';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { applyPatch } from '@/diagram/document/patch';
import type { End, Installation } from '@/diagram/document/schema';
import { positionsOn } from '@/diagram/layout/place';
import { MODULE } from '@/diagram/symbols/types';
import { counter } from './counter';
import { draftedHome } from './drafted';
import { chance } from './random-commands';

const FACES = ['overview', 'connections'] as const;
const home = draftedHome(4);
const after = (doc: Installation, outcome: Command | Refusal): Installation => {
  if (isRefusal(outcome)) throw new Error(outcome.refused);
  return applyPatch(doc, outcome.patch);
};

describe('what stands on the sheet', () => {
  it('stays where it is when something is added: no part moves by anything, on either face', () => {
    const pick = chance(17);
    const newId = counter('s');
    let doc = home;
    let added = 0;
    for (let n = 0; added < 12 && n < 200; n++) {
      const part = doc.parts[pick(doc.parts.length)]!;
      const marks = marksOf(doc, part);
      const end: End = [part.id, marks[pick(marks.length)]!];
      const lines = suggest(doc, end, { newId, hoursWanted: 2 }).all;
      const line = lines[pick(lines.length)];
      if (!line) continue;
      const next = applyPatch(doc, line.place({}).patch);
      for (const face of FACES) {
        const now = positionsOn(next, face);
        for (const [id, at] of positionsOn(doc, face)) expect(now.get(id), `${line.what}: ${id} on ${face}`).toEqual(at);
      }
      doc = next;
      added++;
    }
    expect(added).toBe(12);
  });

  it('stays where it is when a wire is drawn', () => {
    const lamp = home.parts.find((part) => part.kind === 'lamp')!;
    const other = home.parts.filter((part) => part.kind === 'lamp').at(-1)!;
    const next = after(home, joinTerminals(home, [lamp.id, 'N'], [other.id, 'N'], counter()));
    for (const face of FACES) expect(positionsOn(next, face)).toEqual(positionsOn(home, face));
  });
});

describe('places in millimetres', () => {
  const lamps = home.parts.filter((part) => part.kind === 'lamp').map((part) => part.id);

  it('read exactly a whole number of modules after any move', () => {
    const pick = chance(23);
    let doc = home;
    for (let n = 0; n < 60; n++) {
      const id = lamps[pick(lamps.length)]!;
      doc = after(doc, moveParts(doc, 'overview', [id], pick(4000) - 2000, pick(4000) - 2000));
      const at = positionsOn(doc, 'overview').get(id)!;
      expect([at.x % MODULE, at.y % MODULE].map(Math.abs)).toEqual([0, 0]);
      const [x, y] = placeText(doc, 'overview', id).split(', ').map(Number);
      expect([x! / 2.5, y! / 2.5]).toEqual([at.x / MODULE, at.y / MODULE]);
    }
  });

  it('are written as they are read: back to the same place, or to the next module', () => {
    const [id] = lamps;
    const text = placeText(home, 'overview', id!);
    const same = after(home, placeExactly(home, 'overview', id!, text));
    expect(placeText(same, 'overview', id!)).toBe(text);
    const next = after(home, placeExactly(home, 'overview', id!, '126.1; 62,4 mm'));
    expect(placeText(next, 'overview', id!)).toBe('125, 62.5');
    expect(positionsOn(next, 'overview').get(id!)).toMatchObject({ x: 12_500, y: 6_250, pinned: true });
    for (const bad of ['', '12', 'a, b', '1, 2, 3', '99999, 0'])
      expect(placeExactly(home, 'overview', id!, bad), bad).toHaveProperty('refused');
  });

  it('are spaced evenly between the outermost, which stay', () => {
    const ids = lamps.slice(0, 4);
    const spread = [0, 700, 900, 3000].reduce(
      (doc, x, i) => after(doc, placeExactly(doc, 'overview', ids[i]!, `${x / 10}, 100`)),
      home,
    );
    const even = after(spread, distributeParts(spread, 'overview', ids, 'row'));
    const xs = ids.map((id) => positionsOn(even, 'overview').get(id)!.x);
    expect(xs).toEqual([0, 10_000, 20_000, 30_000]);
    expect(ids.map((id) => positionsOn(even, 'overview').get(id)!.y)).toEqual([10_000, 10_000, 10_000, 10_000]);
    const others = [...positionsOn(spread, 'overview')].filter(([id]) => !ids.includes(id));
    for (const [id, at] of others) expect(positionsOn(even, 'overview').get(id)).toEqual(at);
  });
});

describe('changing many at once', () => {
  const lamps = home.parts.filter((part) => part.kind === 'lamp').map((part) => part.id);

  it('is one step for all of them, and says whose', () => {
    const outcome = editRatings(home, lamps, '12 W');
    expect(outcome).toMatchObject({ label: expect.stringMatching(/^E1, E2, E3 and \d+ more: 12 W$/), parts: lamps });
    const next = after(home, outcome);
    for (const id of lamps) expect(next.parts.find((part) => part.id === id)).toMatchObject({ watts: 12 });
    expect(sharedRating(next, lamps)).toBe('12 W');
    expect(sharedRating(next, [lamps[0]!, home.parts.find((part) => part.kind === 'mcb')!.id])).toBe('');
  });

  it('is refused whole where one of them has no such rating', () => {
    const breaker = home.parts.find((part) => part.kind === 'mcb')!;
    expect(editRatings(home, [breaker.id, lamps[0]!], 'B16')).toEqual({
      refused: expect.stringContaining('is no rating of a lamp'),
    });
    expect(editRatings(home, ['none'], 'B16')).toHaveProperty('refused');
    expect(editRatings(home, ['none', 'nor this'], 'B16')).toHaveProperty('refused');
  });
});
