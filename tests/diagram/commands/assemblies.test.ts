import { describe, expect, it } from 'vitest';
import { marksOf } from '@/diagram/commands/ends';
import { suggest } from '@/diagram/commands/extend/catalogue';
import type { Suggestion } from '@/diagram/commands/extend/types';
import { placeSupplyAlone } from '@/diagram/commands/place-supply';
import { applyPatch } from '@/diagram/document/patch';
import { emptyDocument, type End, type Installation, type Kind } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { counter } from './counter';
import { TN, TT, draftedHome } from './drafted';

const offered = (doc: Installation, end: End, typed = ''): Suggestion[] =>
  suggest(doc, end, { newId: counter('a'), typed, hoursWanted: 3 }).fitting;

/** True of the load itself, wherever it is hung: more to feed leaves fewer hours. */
const OF_THE_LOAD = new Set(['short-autonomy']);

/** Findings of every severity, by what they are first about: one that stood before may name more parts after. */
const said = (doc: Installation): Set<string> =>
  new Set(
    examine(doc)
      .findings.filter(({ rule }) => !OF_THE_LOAD.has(rule))
      .map(({ rule, parts, wires }) => `${rule} ${parts[0] ?? wires[0] ?? ''}`),
  );

/** The first terminal of a kind at which something is offered under these words, with its line; the others are alike. */
function lineAt(doc: Installation, kind: Kind, what: string): { end: End; line: Suggestion } | undefined {
  for (const part of doc.parts)
    if (part.kind === kind)
      for (const mark of marksOf(doc, part)) {
        const line = offered(doc, [part.id, mark], what).find((candidate) => candidate.what === what);
        if (line) return { end: [part.id, mark], line };
      }
  return undefined;
}

const ASSEMBLIES = [
  ['switch and lamp', ['switch', 'socket']],
  ['fan with regulator', ['switch', 'socket']],
  ['two-way landing light', ['switch', 'socket']],
  ['backed-up way to this room', ['switch', 'socket', 'lamp', 'joint']],
] as const;

describe.each([
  ['IEC', TN],
  ['IEC', TT],
  ['IN', TN],
  ['GB', TN],
] as const)('whole assemblies, %s %o', (practice, supply) => {
  const home = draftedHome(2, practice, supply);
  const before = said(home);

  it.each(ASSEMBLIES)('"%s" is offered from accessories of each kind and brings no finding', (what, kinds) => {
    const lines = kinds.flatMap((kind) => lineAt(home, kind, what) ?? []);
    expect(lines.length).toBeGreaterThan(1);
    for (const { end, line } of lines) {
      expect(line.assembly).toBe(true);
      const after = applyPatch(home, line.place({}).patch);
      const fresh = [...said(after)].filter((finding) => !before.has(finding));
      expect(fresh, `${what} at ${end.join(':')}`).toEqual([]);
    }
  });
});

describe('a backed-up way to this room', () => {
  it('stays on in an outage and marks the box that now holds two sources', () => {
    const home = draftedHome(4);
    const lamp = home.parts.find((part) => part.kind === 'lamp' && part.place === 'room3')!;
    const line = offered(home, [lamp.id, 'L'], 'backed-up way').find((each) => each.what === 'backed-up way to this room')!;
    const command = line.place({ lamps: 2, fans: 1 });
    expect(command.label).toBe('Place a backed-up way to the room 4');
    const after = applyPatch(home, command.patch);
    const fresh = after.parts.filter((part) => !home.parts.some((old) => old.id === part.id));
    const loads = fresh.filter((part) => part.kind === 'lamp' || part.kind === 'fan');
    expect(loads).toHaveLength(3);
    const { loads: fed } = examine(after);
    for (const load of loads)
      expect(fed.find((each) => each.part === load.id)!.conditions.outage).toMatchObject({ fed: true });
    expect(after.notices!.some((notice) => notice.place === 'room3')).toBe(true);
  });

  it('is not offered where no backup source stands, nor at the intake', () => {
    const without = draftedHome(1);
    const bare: Installation = { ...without, parts: without.parts.filter((part) => part.kind !== 'inverter') };
    const lamp = bare.parts.find((part) => part.kind === 'lamp')!;
    expect(offered(bare, [lamp.id, 'L'], 'backed-up')).toEqual([]);
    const breaker = without.parts.find((part) => part.kind === 'mcb')!;
    expect(offered(without, [breaker.id, '2'], 'backed-up')).toEqual([]);
  });
});

describe('a backup source on an origin that was drawn piece by piece', () => {
  it('is offered whatever the earth bar is called, and brings no danger and no defect', () => {
    const begin = placeSupplyAlone(emptyDocument('Kiln Row 3', 'IEC', TN));
    const newId = counter();
    let doc = applyPatch(emptyDocument('Kiln Row 3', 'IEC', TN), begin.patch);
    let at = begin.next!;
    for (const typed of ['service fuse', 'meter', 'main switch', 'rcd bars', 'hall lamps']) {
      const [line] = suggest(doc, at, { newId, typed }).fitting;
      const command = line!.place({});
      doc = applyPatch(doc, command.patch);
      at = command.next ?? at;
    }
    const earthBar = doc.parts.find((part) => part.kind === 'earth-bar')!;
    expect(earthBar.id).not.toBe('earth-bar');
    const earth = { id: 'w.e', from: ['supply', 'E'] as End, to: [earthBar.id, '9'] as End, role: 'earth' as const };
    doc = applyPatch(doc, { set: { wires: [earth] } });
    const bar = doc.parts.find((part) => part.kind === 'line-bar')!;
    const [line] = suggest(doc, [bar.id, '7'], { newId, typed: 'backup source', hoursWanted: 3 }).fitting;
    expect(line?.what).toBe('backup source, with its own ways');
    const after = applyPatch(doc, line!.place({}).patch);
    const grave = examine(after).findings.filter((finding) => finding.severity !== 'advice');
    expect(grave.map((finding) => `${finding.rule}: ${finding.message}`)).toEqual([]);
    // Taken away but for its battery, it is not offered again on top of what is left.
    const left: Installation = { ...after, parts: after.parts.filter((part) => part.kind !== 'inverter') };
    const again = suggest(left, [bar.id, '7'], { newId, typed: 'backup source' }).fitting.map((each) => each.what);
    expect(again).not.toContain('backup source, with its own ways');
  });
});
