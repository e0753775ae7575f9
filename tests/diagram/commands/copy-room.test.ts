import { describe, expect, it } from 'vitest';
import { copyRoom, type RoomFeed } from '@/diagram/commands/copy-room';
import { isRefusal } from '@/diagram/commands/types';
import { hasTerminal } from '@/diagram/document/kinds';
import { applyPatch, invert } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { positionsOn } from '@/diagram/layout/place';
import { examine } from '@/diagram/rules/examine';
import { findWays } from '@/diagram/terminals/ways';
import { counter } from './counter';
import { TN, TT, draftedHome } from './drafted';

function copied(doc: Installation, place: string, feed: RoomFeed, name = 'Garden room'): Installation {
  const outcome = copyRoom(doc, { place, name, feed }, counter('c'));
  if (isRefusal(outcome)) throw new Error(outcome.refused);
  expect(outcome.label).toBe(`Copy ${doc.places.find(({ id }) => id === place)!.name} to ${name}`);
  return applyPatch(doc, outcome.patch);
}

const inPlace = (doc: Installation, place: string) =>
  doc.parts.filter((part) => part.place === place || part.place === `${place}.dry`);
const copyOf = (doc: Installation) => doc.places.find((place) => place.name === 'Garden room')!.id;
const kinds = (doc: Installation, place: string) =>
  inPlace(doc, place)
    .filter((part) => part.kind !== 'joint')
    .map((part) => part.kind)
    .sort();
const bad = (doc: Installation) =>
  examine(doc)
    .findings.filter((finding) => finding.severity !== 'advice')
    .map((finding) => `${finding.rule} at ${finding.parts.join(' ')}: ${finding.message}`);

const HOMES: Record<string, Installation> = {
  IEC: draftedHome(4, 'IEC', TN),
  'IEC on TT': draftedHome(4, 'IEC', TT),
  IN: draftedHome(4, 'IN', TN),
  GB: draftedHome(4, 'GB', TN),
};

describe('a room is copied whole', () => {
  it.each([
    ['IEC', 'room0', 'same'],
    ['IEC', 'room0', 'new'],
    ['IEC', 'room2', 'same'],
    ['IEC', 'room3', 'new'],
    ['IEC on TT', 'room2', 'same'],
    ['IEC on TT', 'room3', 'new'],
    ['IN', 'room0', 'same'],
    ['IN', 'room2', 'new'],
    ['GB', 'room0', 'new'],
    ['GB', 'room2', 'same'],
  ] as const)('%s: %s on the %s ways brings no danger and no defect', (practice, place, feed) => {
    const home = HOMES[practice]!;
    expect(bad(home)).toEqual([]);
    const next = copied(home, place, feed);
    expect(kinds(next, copyOf(next))).toEqual(kinds(home, place));
    expect(bad(next)).toEqual([]);
    const read = readDocument(JSON.parse(JSON.stringify(next)));
    expect(read.ok ? [] : read.errors).toEqual([]);
    const parts = new Map(next.parts.map((part) => [part.id, part]));
    for (const { from, to } of next.wires)
      for (const [id, mark] of [from, to]) expect(hasTerminal(parts.get(id)!, mark)).toBe(true);
    const refs = next.parts.flatMap(({ ref }) => (ref ? [ref] : []));
    expect(new Set(refs).size).toBe(refs.length);
  });
});

describe('a copy of a room', () => {
  const home = HOMES.IEC!;

  it('is on the same ways, or on as many new ones with breakers like the old', () => {
    const before = findWays(home);
    const same = copied(home, 'room0', 'same');
    expect(findWays(same)).toHaveLength(before.length);
    const served = (doc: Installation, place: string) => findWays(doc).filter((way) => way.places.includes(place)).length;
    expect(served(same, copyOf(same))).toBe(served(home, 'room0'));
    const fresh = copied(home, 'room0', 'new');
    expect(findWays(fresh).length).toBe(before.length + served(home, 'room0'));
    expect(findWays(fresh).filter((way) => way.places.includes(copyOf(fresh))).map((way) => way.places)).toEqual(
      Array.from({ length: served(home, 'room0') }, () => [copyOf(fresh)]),
    );
  });

  it('keeps what stays on in an outage on the backup side', () => {
    const next = copied(home, 'room0', 'new');
    const { loads } = examine(next);
    const fed = (place: string) =>
      inPlace(next, place)
        .flatMap((part) => loads.filter((load) => load.part === part.id))
        .map((load) => load.conditions.outage!.fed)
        .sort();
    expect(fed(copyOf(next))).toEqual(fed('room0'));
    expect(fed(copyOf(next))).toContain(true);
  });

  it('has its row in the survey and its notices, and moves nothing that stood before', () => {
    const next = copied(home, 'room0', 'same');
    const to = copyOf(next);
    expect(next.survey!.find((row) => row.id === to)).toMatchObject({ name: 'Garden room', lamps: 2 });
    expect(next.notices!.filter((notice) => notice.place === to)).toHaveLength(
      home.notices!.filter((notice) => notice.place === 'room0').length,
    );
    for (const face of ['overview', 'connections'] as const) {
      const before = positionsOn(home, face);
      const after = positionsOn(next, face);
      for (const [id, at] of before) expect(after.get(id), id).toEqual(at);
    }
  });

  it('is one step: its inverse gives the bytes before', () => {
    const outcome = copyRoom(home, { place: 'room2', name: 'Garden room', feed: 'new' }, counter());
    if (isRefusal(outcome)) throw new Error(outcome.refused);
    const next = applyPatch(home, outcome.patch);
    expect(JSON.stringify(applyPatch(next, invert(home, outcome.patch)))).toBe(JSON.stringify(home));
  });

  it.each([
    ['nowhere', 'Loft', 'no longer drawn'],
    ['room0', '  ', 'needs a name'],
    ['room0', 'room 2', 'There is a room 2 already.'],
    ['house.backup', 'Loft', 'holds a source'],
  ])('refuses %s to %j', (place, name, words) => {
    expect(copyRoom(home, { place, name, feed: 'same' }, counter())).toEqual({ refused: expect.stringContaining(words) });
  });
});
