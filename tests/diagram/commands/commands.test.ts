import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { copyParts, pasteClip, readClip } from '@/diagram/commands/copy';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import { editCable, editName, editRating } from '@/diagram/commands/edit-in-place';
import { allowedFrom, joinTerminals } from '@/diagram/commands/join-terminals';
import { alignParts, moveParts, unpinParts } from '@/diagram/commands/move-parts';
import { readCable, readRating, ratingText } from '@/diagram/commands/rating-text';
import { renumber } from '@/diagram/commands/renumber';
import { tidyByBands } from '@/diagram/commands/tidy';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { applyPatch, invert } from '@/diagram/document/patch';
import { readDocument, type End, type Installation, type Part } from '@/diagram/document/schema';
import { positionsOn } from '@/diagram/layout/place';
import { examine } from '@/diagram/rules/examine';
import { counter } from './counter';
import { chance, randomCommand } from './random-commands';

function load(name: string): Installation {
  const read = readDocument(JSON.parse(readFileSync(`tests/fixtures/homes/${name}.json`, 'utf8')));
  if (!read.ok) throw new Error(`${name} is no document`);
  return read.document;
}

const flat = load('clean-flat');
const home = load('clean-backup-home');
const after = (doc: Installation, outcome: Command | Refusal): Installation => {
  if (isRefusal(outcome)) throw new Error(outcome.refused);
  return applyPatch(doc, outcome.patch);
};
const part = (doc: Installation, id: string): Part => doc.parts.find((candidate) => candidate.id === id)!;
const rules = (doc: Installation) =>
  examine(doc)
    .findings.filter((finding) => finding.severity !== 'advice')
    .map((finding) => finding.rule);

describe('deleting', () => {
  it('takes a part with its wires, and a cable with its last wire', () => {
    const next = after(home, deleteSelection(home, ['E1'], []));
    expect(part(next, 'E1')).toBeUndefined();
    expect(next.wires.some((wire) => wire.from[0] === 'E1' || wire.to[0] === 'E1')).toBe(false);
    expect(next.cables.some((cable) => cable.id === 'cE1')).toBe(false);
    expect(next.cables).toHaveLength(home.cables.length - 1);
  });

  it('takes a wire and leaves the cable to its other cores', () => {
    const next = after(home, deleteSelection(home, [], ['w041']));
    expect(next.cables).toEqual(home.cables);
    expect(rules(next)).toContain('missing-earth');
  });

  it('pulls a plug out of a socket that goes, and drops what somebody answered for at it', () => {
    const doc: Installation = {
      ...home,
      parts: [...home.parts, { id: 'PL', kind: 'plug', in: 'X1' }],
      silenced: [{ rule: 'no-rcd', at: 'X1', reason: 'r', by: 'T. B.' }],
    };
    const next = after(doc, deleteSelection(doc, ['X1'], []));
    expect(part(next, 'PL')).toEqual({ id: 'PL', kind: 'plug' });
    expect(next.silenced).toBeUndefined();
  });
});

describe('joining two terminals', () => {
  const newId = counter();

  it('finds an earth by the terminal and puts it into the cable that lacks it', () => {
    const cut = applyPatch(home, { remove: { wires: ['w041'] } });
    const next = after(cut, joinTerminals(cut, ['E1', 'E'], ['JE11', '9'], newId));
    const wire = next.wires.find((candidate) => candidate.to[0] === 'E1' && candidate.to[1] === 'E')!;
    expect(wire).toMatchObject({ role: 'earth', from: ['JE11', '9'], colour: 'GN' });
    expect(rules(next)).toEqual([]);
  });

  it('says switched behind a switch, strapper between two-way switches', () => {
    const cut = applyPatch(home, { remove: { wires: ['w039', 'w058'] } });
    const lamp = after(cut, joinTerminals(cut, ['S1', '2'], ['E1', 'L'], newId));
    expect(lamp.wires.find((wire) => wire.to[0] === 'E1' && wire.to[1] === 'L')?.role).toBe('switched');
    const strap = after(cut, joinTerminals(cut, ['S4', '1'], ['S5', '1'], newId));
    const drawn = strap.wires.find((wire) => !cut.wires.some((old) => old.id === wire.id))!;
    expect(drawn).toMatchObject({ role: 'strapper', cable: 'cE3' });
  });

  it('takes a new cable between places where none runs yet', () => {
    const next = after(home, joinTerminals(home, ['NB1', '9'], ['X2', 'N'], newId));
    const wire = next.wires.find((candidate) => !home.wires.some((old) => old.id === candidate.id))!;
    expect(wire.role).toBe('neutral');
    expect(next.cables.find((cable) => cable.id === wire.cable)).toMatchObject({ length: 12, cores: 1 });
  });

  it('takes the next free screw of a bar', () => {
    const next = after(home, joinTerminals(home, ['NB1', '1'], ['X3', 'N'], newId));
    const wire = next.wires.find((candidate) => !home.wires.some((old) => old.id === candidate.id))!;
    expect([wire.from, wire.to]).toContainEqual(['NB1', '3']);
  });

  it.each<[string, End, End, string]>([
    ['a full terminal', ['S1', '1'], ['S1', '1'], 'two terminals'],
    ['a terminal that is gone', ['none', '1'], ['S1', '1'], 'no longer drawn'],
    ['what is joined already', ['S1', '2'], ['E1', 'L'], 'joined already'],
  ])('refuses %s', (_, a, b, words) => {
    expect(joinTerminals(home, a, b, newId)).toEqual({ refused: expect.stringContaining(words) });
  });

  it('refuses a third conductor at an accessory', () => {
    const two = after(home, joinTerminals(home, ['E1', 'N'], ['E2', 'N'], newId));
    expect(joinTerminals(two, ['E1', 'N'], ['E3', 'N'], newId)).toEqual({
      refused: expect.stringContaining('a joint?'),
    });
  });

  it('offers only terminals of the same conductor that have room', () => {
    const ends: End[] = [
      ['NB1', '1'],
      ['EB1', '1'],
      ['LB1', '1'],
      ['E1', 'N'],
      ['E1', 'L'],
      ['X3', 'N'],
    ];
    expect(allowedFrom(home, ['E2', 'N'], ends)).toEqual([
      ['NB1', '1'],
      ['E1', 'N'],
      ['X3', 'N'],
    ]);
  });
});

describe('ratings as they are written', () => {
  it.each<[string, Part, string, Partial<Part>]>([
    [
      'a breaker',
      { id: 'q', kind: 'mcb', rating: 10, curve: 'B', icn: 6000 },
      'C16 2P',
      { rating: 16, curve: 'C', poles: 2, icn: 6000 },
    ],
    ['an rcd', { id: 'q', kind: 'rcd' }, '63 A 30 mA A S', { rating: 63, sensitivity: 0.03, type: 'A', delay: 'S' }],
    ['an rcbo', { id: 'q', kind: 'rcbo' }, 'B16 30mA A', { rating: 16, curve: 'B', sensitivity: 0.03, type: 'A' }],
    ['a fuse', { id: 'f', kind: 'fuse' }, '160 a DC', { rating: 160, standard: 'dc' }],
    ['a lamp', { id: 'e', kind: 'lamp', watts: 9 }, '12', { watts: 12 }],
    ['an appliance', { id: 'e', kind: 'appliance' }, '2,4 kW', { watts: 2400 }],
    ['an outlet', { id: 'x', kind: 'socket' }, '16 A 200 W', { rating: 16, load: 200 }],
    [
      'a battery',
      { id: 'g', kind: 'battery' },
      '6 × 2 V 300 Ah series',
      { count: 6, volts: 2, ah: 300, arrangement: 'series' },
    ],
    [
      'an inverter',
      { id: 'g', kind: 'inverter' },
      '1500 VA N through bonds on battery',
      { va: 1500, neutral: 'through', bond: true },
    ],
    ['a bond', { id: 'x', kind: 'bond' }, 'gas', { to: 'gas' }],
    ['a switch', { id: 's', kind: 'switch' }, '10 A', { rating: 10 }],
  ])('reads %s', (_, before, text, fields) => {
    expect(readRating(before, text)).toEqual({ ok: true, value: expect.objectContaining(fields) });
  });

  it('reads back what it writes, for every part of two homes', () => {
    for (const each of [...home.parts, ...flat.parts])
      expect(readRating(each, ratingText(each))).toEqual({ ok: true, value: each });
  });

  it('takes away what stood there and is typed no more, and keeps what the text never shows', () => {
    const before: Part = { id: 'q', kind: 'mcb', rating: 16, curve: 'C', poles: 2, icn: 6000 };
    expect(readRating(before, 'C16')).toEqual({
      ok: true,
      value: { id: 'q', kind: 'mcb', rating: 16, curve: 'C', icn: 6000 },
    });
  });

  it.each([
    [{ id: 'q', kind: 'mcb' }, 'quick', '"quick" is no rating of a mcb'],
    [{ id: 'e', kind: 'lamp' }, '30 mA', 'no rating of a lamp'],
    [{ id: 'q', kind: 'mcb' }, 'B0', 'rating'],
  ] as const)('says what is wrong with %o %s', (before, text, words) => {
    expect(readRating(before as Part, text)).toEqual({ ok: false, message: expect.stringContaining(words) });
  });

  it('reads cables', () => {
    const cable = home.cables.find(({ id }) => id === 'k11')!;
    expect(readCable(cable, '3x4 18 m')).toEqual({
      ok: true,
      value: expect.objectContaining({ csa: 4, cores: 3, length: 18 }),
    });
    expect(readCable(cable, '18')).toEqual({ ok: true, value: { ...cable, length: 18 } });
    expect(readCable(cable, 'B2 XLPE')).toEqual({ ok: true, value: { ...cable, method: 'B2', insulation: 'XLPE' } });
    expect(readCable(cable, 'thick')).toEqual({ ok: false, message: expect.stringContaining('"thick"') });
    expect(readCable(cable, '3x0 18 m').ok).toBe(false);
  });

  it('edits in place, or says why not', () => {
    const next = after(home, editRating(home, 'Q13', 'B20'));
    expect(part(next, 'Q13')).toMatchObject({ curve: 'B', rating: 20 });
    expect(editRating(home, 'Q13', 'none')).toHaveProperty('refused');
    expect(part(after(home, editName(home, 'Q13', 'label', 'Stove')), 'Q13').label).toBe('Stove');
    expect(part(after(home, editName(home, 'Q13', 'ref', '')), 'Q13').ref).toBeUndefined();
    expect(after(home, editCable(home, 'k13', '9 m')).cables.find(({ id }) => id === 'k13')?.length).toBe(9);
  });
});

describe('moving', () => {
  it('moves by whole modules, pins, and moves nothing else', () => {
    const before = positionsOn(home, 'overview');
    const next = after(home, moveParts(home, 'overview', ['Q13'], 510, -240));
    const at = positionsOn(next, 'overview');
    const old = before.get('Q13')!;
    expect(at.get('Q13')).toEqual({ ...old, x: old.x + 500, y: old.y - 250, pinned: true });
    for (const [id, position] of before) if (id !== 'Q13') expect(at.get(id)).toEqual(position);
  });

  it('aligns in a row', () => {
    const next = after(home, alignParts(home, 'overview', ['Q13', 'Q11'], 'row'));
    const at = positionsOn(next, 'overview');
    expect(at.get('Q11')!.y).toBe(at.get('Q13')!.y);
  });

  it('tidies what is not pinned, and lets go of what is', () => {
    const moved = after(
      after(home, moveParts(home, 'overview', ['Q13'], 2500, 0)),
      moveParts(home, 'overview', [], 0, 0),
    );
    const loose = after(moved, moveParts(moved, 'overview', ['E1'], 0, 2500));
    const unpinned = applyPatch(loose, { set: { overview: { E1: { ...loose.sheet!.overview!.E1!, pinned: false } } } });
    const tidy = after(unpinned, tidyByBands(unpinned, 'overview', null));
    expect(tidy.sheet!.overview!.Q13).toEqual(moved.sheet!.overview!.Q13);
    expect(tidy.sheet!.overview!.E1).not.toEqual(unpinned.sheet!.overview!.E1);
    const free = after(tidy, unpinParts(tidy, 'overview', ['Q13']));
    expect(free.sheet!.overview!.Q13?.pinned).toBeUndefined();
  });
});

describe('copying', () => {
  it('gives new ids and free designations, keeps inner wires, drops what leaves the selection', () => {
    const clip = copyParts(home, ['S1', 'E1'])!;
    expect(clip.wires.map((wire) => wire.id)).toEqual(['w039']);
    const next = after(home, pasteClip(home, readClip(JSON.stringify(clip))!, counter()));
    const fresh = next.parts.filter((candidate) => !home.parts.some((old) => old.id === candidate.id));
    expect(fresh.map((each) => each.kind).sort()).toEqual(['lamp', 'switch']);
    expect(next.wires).toHaveLength(home.wires.length + 1);
    expect(next.cables).toHaveLength(home.cables.length + 1);
  });

  it('leaves no dangling id in 1,000 random selections', () => {
    const pick = chance(7);
    const newId = counter('c');
    for (let n = 0; n < 1000; n++) {
      const ids = home.parts.filter(() => pick(3) === 0).map((each) => each.id);
      const clip = copyParts(home, ids);
      if (!clip) continue;
      const known = new Set(clip.parts.map((each) => each.id));
      const cables = new Set(clip.cables.map((cable) => cable.id));
      for (const wire of clip.wires) {
        expect(known.has(wire.from[0]) && known.has(wire.to[0])).toBe(true);
        if (wire.cable) expect(cables.has(wire.cable)).toBe(true);
      }
      if (n % 100 !== 0) continue;
      const next = after(home, pasteClip(home, clip, newId));
      expect(readDocument(JSON.parse(JSON.stringify(next))).ok).toBe(true);
      const all = new Set(next.parts.map((each) => each.id));
      for (const wire of next.wires) expect(all.has(wire.from[0]) && all.has(wire.to[0])).toBe(true);
    }
  });

  it.each(['', 'hello', '{"parts":[]}', '[1]'])('does not take %j for a piece of a drawing', (text) => {
    expect(readClip(text)).toBeNull();
  });
});

describe('renumbering', () => {
  it('numbers each letter without gaps and doubles, and changes nothing else', () => {
    const next = after(home, renumber(home));
    const refs = next.parts.flatMap((each) => (each.ref ? [each.ref] : []));
    expect(new Set(refs).size).toBe(refs.length);
    const strip = (doc: Installation) => doc.parts.map(({ ref: _ref, ...rest }) => rest);
    expect(strip(next)).toEqual(strip(home));
    expect(rules(next)).toEqual(rules(home));
    expect(after(next, renumber(next))).toEqual(next);
  });
});

describe('every command', () => {
  it('is a change with an exact inverse that leaves a valid document', () => {
    const pick = chance(11);
    const newId = counter('r');
    let doc = home;
    let done = 0;
    for (let n = 0; n < 200; n++) {
      const command = randomCommand(doc, pick, newId);
      if (!command) continue;
      const next = applyPatch(doc, command.patch);
      expect(JSON.stringify(applyPatch(next, invert(doc, command.patch)))).toBe(JSON.stringify(doc));
      expect(command.label.length).toBeGreaterThan(0);
      doc = next;
      done++;
    }
    expect(done).toBeGreaterThan(80);
    expect(readDocument(JSON.parse(JSON.stringify(doc))).ok).toBe(true);
  }, 60_000);
});
