import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { marksOf } from '@/diagram/commands/ends';
import { applyPatch } from '@/diagram/document/patch';
import { emptyDocument, readDocument, type Installation } from '@/diagram/document/schema';
import { buildOutline, partKey, terminalKey } from '@/diagram/outline/build-outline';
import { findingsNews } from '@/diagram/outline/findings-news';
import { everyItem, pathTo, rowsOf, treeMove, typeAhead, type OutlineRow } from '@/diagram/outline/rows';
import type { OutlineItem } from '@/diagram/outline/types';
import { colourWord, contentWords, spokenRating } from '@/diagram/outline/words';
import { examine } from '@/diagram/rules/examine';
import type { Finding } from '@/diagram/rules/types';
import { draftedHome } from '../commands/drafted';

function load(name: string): Installation {
  const read = readDocument(JSON.parse(readFileSync(`tests/fixtures/homes/${name}.json`, 'utf8')));
  if (!read.ok) throw new Error(`${name} is no document`);
  return read.document;
}

const home = load('clean-backup-home');
const noEarth = applyPatch(home, { remove: { wires: ['w041'] } });
const items = (root: OutlineItem): OutlineItem[] => [...everyItem(root)];
const byKey = (root: OutlineItem, key: string): OutlineItem => items(root).find((item) => item.key === key)!;

describe.each(['clean-backup-home', 'clean-flat', 'mixed-feeds'])('the outline of %s', (name) => {
  const doc = load(name);
  const root = buildOutline(doc, examine(doc).findings);
  const all = items(root);

  it('has every part once, each of its terminals once, and every wire at both its ends', () => {
    const parts = all.filter((item) => item.kind === 'part' || item.kind === 'way').map((item) => item.key);
    expect([...parts].sort()).toEqual(doc.parts.map((part) => partKey(part.id)).sort());
    const ends = all.filter((item) => item.kind === 'terminal').map((item) => item.key);
    expect([...ends].sort()).toEqual(
      doc.parts.flatMap((part) => marksOf(doc, part).map((mark) => terminalKey(part.id, mark))).sort(),
    );
    for (const wire of doc.wires)
      expect(all.filter((item) => item.kind === 'wire' && item.wires[0] === wire.id)).toHaveLength(2);
  });

  it('names every item, each by its own key', () => {
    expect(new Set(all.map((item) => item.key)).size).toBe(all.length);
    for (const item of all) expect(item.words).toMatch(/\S/);
  });
});

describe('what is said', () => {
  it('tells a way with its rooms and what they hold, in the order of current', () => {
    const root = buildOutline(home);
    expect(root.words).toBe('Lantern house: 45 parts, 4 ways, 4 places');
    expect(root.children.map((board) => board.words)).toEqual([
      'Supply, 230 V 50 Hz, TN-S: 4 ways, 15 parts',
      'Under the stairs: 4 parts',
    ]);
    const [, power, lamps] = root.children[0]!.children.filter((item) => item.kind === 'way');
    expect(power!.words).toBe('Way 2, Q13, 16 A type C, Grain kitchen power: Grain kitchen: outlet 16 A');
    expect(lamps!.words).toContain('6 A type B, stays on in an outage');
    expect(lamps!.words).toMatch(/Lantern room: .*2 switches.*lamp 15 W/);
  });

  it('tells of a terminal what it carries and where its wire goes', () => {
    const root = buildOutline(noEarth);
    expect(byKey(root, 'end E1 E').words).toBe('Terminal E, earth: free');
    expect(byKey(root, 'end E1 L').words).toBe('Terminal L, line: to switch in Lantern room 2');
    expect(byKey(root, 'end E1 L').children[0]!.words).toBe(
      'Wire to terminal 2 of switch in Lantern room: switched line, in the cable 3 by 1.5 square millimetres, 5 m',
    );
  });

  it('tells each finding in full once, at the part it names first, and its heading at all it names', () => {
    const { findings } = examine(noEarth);
    const root = buildOutline(noEarth, findings);
    const full = items(root).filter((item) => item.kind === 'finding');
    expect(full).toHaveLength(findings.filter((finding) => !finding.silenced).length);
    const lamp = byKey(root, 'part E1');
    expect(lamp.findings).toEqual(['The lamp in Lantern room has no earth']);
    expect(lamp.children[0]!.words).toMatch(/^danger: The lamp in Lantern room has no earth\. /);
    const above = pathTo(root, 'part E1')!.map((key) => byKey(root, key));
    const { finding } = lamp.children[0]!;
    for (const item of above) expect(item.keys.filter((key) => key === finding)).toHaveLength(1);
    expect([...root.keys].sort()).toEqual(full.map((item) => item.finding).sort());
  });

  it('leaves out what somebody answers for', () => {
    const finding = examine(noEarth).findings.find((each) => each.rule === 'missing-earth')!;
    const root = buildOutline(noEarth, [{ ...finding, silenced: { reason: 'r', by: 'T. B.' } }]);
    expect(items(root).some((item) => item.kind === 'finding')).toBe(false);
  });

  it('keeps what no way reaches, and says that nothing is drawn on an empty sheet', () => {
    const loose: Installation = { ...home, parts: [...home.parts, { id: 'E99', kind: 'lamp', ref: 'E99', watts: 9 }] };
    const root = buildOutline(loose);
    expect(pathTo(root, 'part E99')).toHaveLength(2);
    const empty = emptyDocument('Kiln Row 3', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 });
    expect(buildOutline(empty).words).toBe('Kiln Row 3: nothing drawn yet');
  });

  it('says ratings, colours and contents as one speaks', () => {
    expect(spokenRating({ id: 'q', kind: 'mcb', rating: 16, curve: 'C', poles: 2 })).toBe('16 A type C, two poles');
    expect(spokenRating({ id: 'q', kind: 'rcd', rating: 40, sensitivity: 0.03, type: 'A', delay: 'S' })).toBe(
      '40 A, 30 mA, type A, delayed',
    );
    expect([colourWord('GNYE'), colourWord('XX')]).toEqual(['green and yellow', 'XX']);
    expect(
      contentWords([
        { id: 'a', kind: 'switch' },
        { id: 'b', kind: 'switch' },
        { id: 'c', kind: 'lamp', watts: 9 },
        { id: 'd', kind: 'joint' },
      ]),
    ).toBe('2 switches, lamp 9 W');
  });
});

describe('walking', () => {
  const root = buildOutline(home);
  const open = new Set(['sheet', root.children[0]!.key]);
  const rows = rowsOf(root, open);
  const way = rows.find((row) => row.item.kind === 'way')!;

  it('numbers levels and positions as a screen reader needs them', () => {
    expect(rows[0]).toMatchObject({ level: 1, setSize: 1, position: 1, expanded: true, parent: null });
    expect(way).toMatchObject({ level: 3, expanded: false, parent: root.children[0]!.key });
    const siblings = rows.filter((row) => row.parent === way.parent);
    expect(siblings.map((row) => row.position)).toEqual(siblings.map((_, i) => i + 1));
    for (const row of siblings) expect(row.setSize).toBe(siblings.length);
  });

  it('goes by the arrows, Home, End and the star', () => {
    expect(treeMove(rows, 'sheet', 'ArrowDown')).toEqual({ to: rows[1]!.item.key });
    expect(treeMove(rows, 'sheet', 'ArrowUp')).toBeNull();
    expect(treeMove(rows, way.item.key, 'ArrowRight')).toEqual({ to: way.item.key, unfold: [way.item.key] });
    expect(treeMove(rows, rows[1]!.item.key, 'ArrowRight')).toEqual({ to: rows[2]!.item.key });
    expect(treeMove(rows, rows[1]!.item.key, 'ArrowLeft')).toEqual({ to: rows[1]!.item.key, fold: rows[1]!.item.key });
    expect(treeMove(rows, way.item.key, 'ArrowLeft')).toEqual({ to: way.parent });
    expect(treeMove(rows, way.item.key, 'Home')).toEqual({ to: 'sheet' });
    expect(treeMove(rows, way.item.key, 'End')).toEqual({ to: rows.at(-1)!.item.key });
    const all = treeMove(rows, way.item.key, '*')!.unfold!;
    expect(all).toContain(way.item.key);
    expect(all).toHaveLength(rows.filter((row) => row.parent === way.parent && row.expanded === false).length);
    expect(treeMove(rows, 'gone', 'ArrowDown')).toEqual({ to: 'sheet' });
  });

  it('goes to what begins as typed, round from the item in hand', () => {
    const words = (key: string | null) => rows.find((row) => row.item.key === key)?.item.words ?? '';
    const first = typeAhead(rows, 'sheet', 'w')!;
    expect(words(first)).toMatch(/^Way 1/);
    expect(words(typeAhead(rows, first, 'w'))).toMatch(/^Way 2/);
    expect(words(typeAhead(rows, first, 'ww'))).toMatch(/^Way 2/);
    expect(words(typeAhead(rows, first, 'way 4'))).toMatch(/^Way 4/);
    expect(words(typeAhead(rows, 'sheet', '3'))).toMatch(/^Way 3/);
    expect(words(typeAhead(rows, 'sheet', 'q13'))).toMatch(/^Way 2, Q13/);
    expect(typeAhead(rows, 'sheet', 'zz')).toBeNull();
  });

  it('reaches every item by the arrows alone', () => {
    const all = new Set(items(root).map((item) => item.key));
    const unfolded = new Set<string>();
    const reached = new Set<string>();
    let at = 'sheet';
    for (let n = 0; n < 5 * all.size; n++) {
      reached.add(at);
      const shown: OutlineRow[] = rowsOf(root, unfolded);
      const into = treeMove(shown, at, 'ArrowRight');
      if (into?.unfold) {
        for (const key of into.unfold) unfolded.add(key);
        continue;
      }
      const next = treeMove(shown, at, 'ArrowDown');
      if (!next) break;
      at = next.to;
    }
    expect(reached).toEqual(all);
  });
});

describe('findings as they are announced', () => {
  const finding = (rule: string, severity: Finding['severity'], part = 'E1'): Finding => ({
    rule,
    severity,
    heading: `${rule} at ${part}`,
    message: '',
    parts: [part],
    wires: [],
    conditions: [],
  });

  it('says what came, the gravest first, what went and what stands', () => {
    const old = finding('no-spd', 'advice');
    expect(findingsNews(null, [])).toBe('No finding.');
    expect(findingsNews(null, [old])).toBe('1 finding in all.');
    expect(findingsNews([old], [old])).toBe('');
    expect(findingsNews([old], [finding('high-drop', 'defect'), finding('missing-earth', 'danger')])).toBe(
      'New danger: missing-earth at E1. New defect: high-drop at E1. 1 gone. 2 findings in all.',
    );
    expect(findingsNews([old], [])).toBe('1 gone. No finding.');
    const five = [1, 2, 3, 4, 5].map((n) => finding('missing-earth', 'danger', `E${n}`));
    expect(findingsNews([], five)).toContain('2 more new. 5 findings in all.');
  });

  it('takes a finding that somebody answers for as gone', () => {
    const one = finding('missing-earth', 'danger');
    expect(findingsNews([one], [{ ...one, silenced: { reason: 'r', by: 'b' } }])).toBe('1 gone. No finding.');
  });
});

it('builds the outline of a large home at once', () => {
  const large = draftedHome(24);
  expect(large.parts.length).toBeGreaterThan(300);
  const root = buildOutline(large, examine(large).findings);
  expect(items(root).length).toBeGreaterThan(2 * large.parts.length);
});
