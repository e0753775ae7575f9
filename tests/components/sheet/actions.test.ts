import { readFileSync } from 'node:fs';
import { describe, expect, it, vi } from 'vitest';
import { fitsWords } from '@/diagram/commands/extend/catalogue';
import { emptyDocument } from '@/diagram/document/schema';
import { ACTIONS, KEYS_HELP, actionFor, keyName, type ActionContext } from '@/components/sheet/actions';

/** What the keys of a keyboard send: the letter that is printed on a key, by the place of the key. */
const LAYOUTS: Record<string, Record<string, string>> = {
  US: { KeyE: 'e', KeyW: 'w', KeyM: 'm', KeyB: 'b', KeyN: 'n', KeyG: 'g', KeyO: 'o', KeyZ: 'z', KeyQ: 'q', KeyA: 'a', KeyL: 'l' },
  // azerty: a and q, z and w change places, m lies right of l
  French: { KeyE: 'e', KeyZ: 'w', Semicolon: 'm', KeyB: 'b', KeyN: 'n', KeyG: 'g', KeyO: 'o', KeyW: 'z', KeyA: 'q', KeyQ: 'a', KeyL: 'l' },
  Russian: { KeyE: 'у', KeyW: 'ц', KeyM: 'ь', KeyB: 'и', KeyN: 'т', KeyG: 'п', KeyO: 'щ', KeyZ: 'я', KeyQ: 'й', KeyA: 'ф', KeyL: 'д' },
  Arabic: { KeyE: 'ث', KeyW: 'ص', KeyM: 'ة', KeyB: 'لا', KeyN: 'ى', KeyG: 'ل', KeyO: 'خ', KeyZ: 'ئ', KeyQ: 'ض', KeyA: 'ش', KeyL: 'م' },
};
const PLAIN = { e: 'extend', w: 'wire', m: 'move', b: 'load', n: 'next-note', g: 'face', o: 'outline', l: 'edit-cable' };
const WITH_CTRL = { z: 'undo', a: 'all' };

/** The place of a letter's key: where it is printed, on Latin layouts; where a US keyboard has it on others. */
function keyOf(layout: string, letter: string): { code: string; key: string } {
  const keys = LAYOUTS[layout]!;
  const printed = Object.entries(keys).find(([, key]) => key === letter);
  const code = printed ? printed[0] : Object.entries(LAYOUTS.US!).find(([, key]) => key === letter)![0];
  return { code, key: keys[code]! };
}

const pressed = (layout: string, letter: string, more: Partial<KeyboardEvent> = {}) =>
  actionFor(keyName({ ...keyOf(layout, letter), ctrlKey: false, metaKey: false, shiftKey: false, ...more }))?.id;

describe.each(Object.keys(LAYOUTS))('on a %s keyboard', (layout) => {
  it.each(Object.entries(PLAIN))('%s does %s', (letter, action) => {
    expect(pressed(layout, letter)).toBe(action);
  });

  it.each(Object.entries(WITH_CTRL))('Ctrl and Cmd %s does %s', (letter, action) => {
    expect(pressed(layout, letter, { ctrlKey: true })).toBe(action);
    expect(pressed(layout, letter, { metaKey: true })).toBe(action);
  });

  it('Ctrl Shift Z does again what was taken back', () => {
    const { key, code } = keyOf(layout, 'z');
    const event = { key: key.toUpperCase(), code, ctrlKey: true, metaKey: false, shiftKey: true };
    expect(actionFor(keyName(event))?.id).toBe('redo');
  });

  it('a letter that means nothing does nothing', () => {
    expect(pressed(layout, 'q')).toBeUndefined();
  });
});

describe('the command list', () => {
  const source = (file: string) => readFileSync(`components/sheet/${file}`, 'utf8');

  it('has an entry with words for every key that the sheet hears', () => {
    // Keys are heard in use-keyboard.ts alone; what is not an arrow, Tab, or the Enter that ends a wire or a
    // move is an action; Ctrl V is left to the browser, whose paste event does the same as the action.
    const heard = [...source('use-keyboard.ts').matchAll(/key === '([^']+)'/g)].map((match) => match[1]!);
    expect(new Set(heard)).toEqual(new Set(['Tab', 'Enter', 'Ctrl V']));
    for (const action of ACTIONS) if (action.keys) expect(actionFor(action.keys)).toBe(action);
    const told = new Set(KEYS_HELP.flatMap((help) => help.keys));
    for (const key of ['Tab', '↑', '↓', '←', '→']) expect(told).toContain(key);
    for (const action of ACTIONS) if (action.keys && action.id !== 'keys') expect(told).toContain(action.keys);
  });

  it('has no key handler on the sheet besides the one that reads the actions', () => {
    // Panels hear keys of their own fields; the sheet and the canvas hear none but through the list.
    for (const file of ['sheet.tsx', 'canvas/canvas.tsx', 'foot/sheet-foot.tsx', 'margin/sheet-margin.tsx'])
      expect(source(file), file).not.toMatch(/onKey(Down|Up|Press)=|addEventListener\('key/);
    expect(source('surface.tsx').match(/onKeyDown=/g)).toHaveLength(1);
    const single = [...source('surface.tsx').matchAll(/useSingleKeys\(\{ '([^']+)'/g)].map((match) => match[1]!);
    for (const key of single) expect(actionFor(key)).toBeDefined();
  });

  it('leads by its words to every act of the hands', () => {
    // Every public act of the hands that a person can ask for is reached from an action, a panel or the pointer.
    const acts = [
      ...['extend', 'edit', 'editCable', 'wire', 'startMove', 'chooseWay'],
      ...['remove', 'renumber', 'placeSupply', 'editPlace', 'letGo'],
    ];
    const asked = new Set<string>();
    const state = { selection: { parts: [], wires: [], terminal: null }, undo: vi.fn(), redo: vi.fn(), say: vi.fn(), select: vi.fn() };
    const given: Record<string, unknown> = {
      store: { getState: () => state },
      view: { getState: () => ({ face: 'overview', camera: null, setMode: vi.fn(), set: vi.fn() }) },
      scene: () => ({ parts: [] }),
      doc: emptyDocument('Kiln Row 3', 'IEC', { system: 'TN-S', voltage: 230, frequency: 50 }),
      clipboard: { copy: vi.fn(), paste: vi.fn(), duplicate: vi.fn() },
    };
    const hands = new Proxy(given, {
      get: (_, name: string) => given[name] ?? (() => void asked.add(name)),
    }) as unknown as ActionContext['hands'];
    const turns = { otherFace: vi.fn(), schedule: vi.fn(), nextNote: vi.fn(), page: vi.fn() };
    const rest = { ...turns, tidy: vi.fn(), outline: vi.fn(), toSheet: vi.fn(), keys: vi.fn() };
    for (const action of ACTIONS) action.does({ ...rest, hands });
    for (const id of ['otherFace', 'schedule', 'nextNote', 'page', 'tidy', 'outline', 'keys'] as const) expect(rest[id]).toHaveBeenCalled();
    for (const act of acts) expect(asked, act).toContain(act);
  });

  it.each([
    ['place exactly', 'place'],
    ['align row', 'row'],
    ['align column', 'column'],
    ['space evenly row', 'space-row'],
    ['distribute down', 'space-column'],
    ['move module', 'move'],
    ['tidy', 'tidy'],
    ['placed again', 'unpin'],
    ['position mm', 'place'],
    ['renumber', 'renumber'],
    ['copy room', 'copy-room'],
    ['outline', 'outline'],
    ['rotate', 'turn'],
    ['quarter', 'turn'],
    ['lock', 'lock'],
    ['unlock', 'lock'],
    ['show me', 'show'],
    ['play fault', 'play'],
  ])('finds "%s"', (typed, id) => {
    const found = ACTIONS.filter((action) => fitsWords(action.words, typed));
    expect(found.map((action) => action.id)).toContain(id);
  });
});
