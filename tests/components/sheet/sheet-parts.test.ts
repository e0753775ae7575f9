import { describe, expect, it, vi } from 'vitest';
import { ACTIONS, actionFor, keyName } from '@/components/sheet/actions';
import { importCommand } from '@/components/sheet/foot/import-file';
import { pictureSize, sizeOfSvg } from '@/components/sheet/foot/picture';
import { Examiner, type ExamineWorker, type Told } from '@/components/sheet/margin/examiner';
import { keyOf, letterOf, notesOf } from '@/components/sheet/margin/notes';
import { nextPart, firstPart, handEnd } from '@/components/sheet/navigate';
import { nodeOf } from '@/components/sheet/canvas/flow-items';
import { deltaOf, withDelta } from '@/components/sheet/scene/scene-delta';
import { walkFromSources } from '@/diagram/commands/walk';
import { placeSupply } from '@/diagram/commands/place-supply';
import { suggest } from '@/diagram/commands/extend/catalogue';
import { applyPatch } from '@/diagram/document/patch';
import { buildScene } from '@/diagram/layout/build-scene';
import { examine } from '@/diagram/rules/examine';
import { counter } from '../../diagram/commands/counter';
import { home } from './window';

function drawn() {
  const start = placeSupply(home());
  const doc = applyPatch(home(), start.patch);
  const line = suggest(doc, start.next!, { newId: counter(), typed: 'study lamps' }).fitting[0]!;
  return applyPatch(doc, line.place({ lamps: 2 }).patch);
}

describe('keys', () => {
  const press = (key: string, code = '', more: Partial<KeyboardEvent> = {}) =>
    keyName({ key, code, ctrlKey: false, metaKey: false, shiftKey: false, ...more });

  it('are claimed by one action each, and every action has words', () => {
    const keys = ACTIONS.flatMap((action) => (action.keys ? [action.keys] : []));
    expect(new Set(keys).size).toBe(keys.length);
    for (const action of ACTIONS) expect(action.words).toMatch(/\S/);
  });

  it.each([
    ['US', press('e', 'KeyE'), 'extend'],
    ['French, the letter is where it is printed', press('w', 'KeyZ'), 'wire'],
    ['Russian, by the place of the key', press('у', 'KeyE'), 'extend'],
    ['Arabic, by the place of the key', press('ث', 'KeyE'), 'extend'],
    ['capital by Shift', press('N', 'KeyN', { shiftKey: true }), 'last-note'],
    ['Ctrl Z', press('z', 'KeyZ', { ctrlKey: true }), 'undo'],
    ['Cmd Shift Z', press('Z', 'KeyZ', { metaKey: true, shiftKey: true }), 'redo'],
    ['Ctrl Y as redo', press('y', 'KeyY', { ctrlKey: true }), 'redo'],
    ['Backspace deletes', press('Backspace', 'Backspace'), 'delete'],
    ['plus without Shift', press('=', 'Equal'), 'larger'],
    ['Escape', press('Escape', 'Escape'), 'rest'],
  ])('%s', (_, key, id) => {
    expect(actionFor(key)?.id).toBe(id);
  });

  it('leaves other keys alone', () => {
    expect(actionFor(press('q', 'KeyQ'))).toBeUndefined();
    expect(actionFor(press('z', 'KeyZ'))).toBeUndefined();
  });
});

describe('arrows', () => {
  const doc = drawn();
  const walk = walkFromSources(doc);
  const scene = buildScene(doc, 'overview');
  const kind = (id: string | null) => doc.parts.find((part) => part.id === id)?.kind;

  it('follow the conductor from the source to a lamp and back', () => {
    const path: (string | undefined)[] = [];
    let at: string | null = firstPart(scene);
    for (let n = 0; at && n < 20; n++) {
      path.push(kind(at));
      const next: string | null = nextPart(doc, walk, scene, at, 'down');
      if (!next || path.at(-1) === 'lamp') break;
      at = next;
    }
    expect(path.slice(0, 4)).toEqual(['supply', 'fuse', 'meter', 'isolator']);
    expect(path.at(-1)).toBe('lamp');
    for (let n = 0; n < 20 && kind(at) !== 'supply'; n++) at = nextPart(doc, walk, scene, at!, 'up');
    expect(kind(at)).toBe('supply');
  });

  it('hold a breaker at its outgoing terminal and a bar at a free screw', () => {
    const mcb = doc.parts.find((part) => part.kind === 'mcb')!;
    expect(handEnd(doc, walk, mcb.id)).toEqual([mcb.id, '2']);
    expect(handEnd(doc, walk, 'rcd1.line-bar')).toEqual(['rcd1.line-bar', '3']);
    expect(handEnd(doc, walk, 'none')).toBeNull();
  });
});

describe('the canvas draws again only what changed', () => {
  it('keeps every object of the scene that is as before, and its node', () => {
    const doc = drawn();
    const before = buildScene(doc, 'overview');
    const mcb = doc.parts.find((part) => part.kind === 'mcb')!;
    const changed = applyPatch(doc, { set: { parts: [{ ...mcb, rating: 16 } as typeof mcb] } });
    const after = withDelta(before, deltaOf(before, buildScene(changed, 'overview')));
    const fresh = after.parts.filter((part) => !before.parts.includes(part));
    expect(fresh.map((part) => part.id)).toEqual([mcb.id]);
    expect(after.runs.filter((run) => !before.runs.includes(run))).toEqual([]);
    expect(nodeOf(after.parts[0]!)).toBe(nodeOf(after.parts[0]!));
  });
});

describe('findings as notes', () => {
  it('letters them, ties them to what this face draws, and filters by condition and severity', () => {
    const doc = drawn();
    const lamp = doc.parts.find((part) => part.kind === 'lamp')!;
    const broken = applyPatch(doc, {
      remove: {
        wires: doc.wires.filter((wire) => wire.to[0] === lamp.id && wire.role === 'earth').map((wire) => wire.id),
      },
    });
    const scene = buildScene(broken, 'overview');
    const { findings } = examine(broken);
    const all = { room: null, condition: 'all', severities: new Set(['danger', 'defect', 'advice'] as const) } as const;
    const notes = notesOf(findings, broken, scene, all);
    const earth = notes.find((note) => note.finding.rule === 'missing-earth')!;
    expect(notes[0]!.letter).toBe('a');
    expect(earth.parts).toEqual([lamp.id]);
    expect(earth.grid).toMatch(/^[A-F][1-8]$/);
    expect(
      notesOf(findings, broken, scene, { ...all, severities: new Set(['advice'] as const) }).some(
        (note) => note.finding.severity !== 'advice',
      ),
    ).toBe(false);
    expect(keyOf(earth.finding)).toContain('missing-earth');
  });

  it('goes on after z', () => {
    expect([0, 25, 26, 27, 52].map(letterOf)).toEqual(['a', 'z', 'aa', 'ab', 'ba']);
  });
});

describe('examining beside the page', () => {
  class SlowWorker implements ExamineWorker {
    static made = 0;
    asked: { id: number; task: Told }[] = [];
    onmessage: ExamineWorker['onmessage'] = null;
    onerror: ExamineWorker['onerror'] = null;
    ended = false;
    constructor() {
      SlowWorker.made++;
    }
    postMessage(message: { id: number; task: Told }) {
      this.asked.push(message);
    }
    terminate() {
      this.ended = true;
    }
    answer(value: unknown) {
      const { id } = this.asked.at(-1)!;
      this.onmessage?.(new MessageEvent('message', { data: { id, value, ms: 1 } }) as never);
    }
  }

  it('does one at a time, and of those that wait only the newest', async () => {
    const worker = new SlowWorker();
    const examiner = new Examiner(() => worker);
    const first = examiner.examine(home());
    const second = examiner.examine({ ...home(), title: 'second' });
    const third = examiner.examine({ ...home(), title: 'third' });
    expect(worker.asked).toHaveLength(1);
    expect(await second).toBeNull();
    worker.answer('old');
    expect(await first).toBeNull();
    expect(worker.asked.map(({ task }) => task)).toEqual([
      { kind: 'examine', document: home() },
      { kind: 'examine-change', patch: { set: { title: 'third' } } },
    ]);
    worker.answer('new');
    expect(await third).toEqual({ value: 'new', ms: 1 });
  });

  it('tells the worker a drawing once: what is asked of the same drawing again goes without it', () => {
    const worker = new SlowWorker();
    const examiner = new Examiner(() => worker);
    const finding = examine(drawn()).findings[0]!;
    void examiner.prove(drawn(), finding);
    worker.answer('proof');
    void examiner.prove(drawn(), finding);
    expect(worker.asked.map(({ task }) => task)).toEqual([
      { kind: 'prove', document: drawn(), finding },
      { kind: 'prove-change', patch: {}, finding },
    ]);
  });

  it('says that it failed, and works again with a new worker', async () => {
    const workers: SlowWorker[] = [];
    const examiner = new Examiner(() => {
      const worker = new SlowWorker();
      workers.push(worker);
      return worker;
    });
    const asked = examiner.examine(home());
    workers[0]!.onerror?.({ message: 'no such file' } as ErrorEvent);
    expect(await asked).toEqual({ failure: 'no such file' });
    expect(workers[0]!.ended).toBe(true);
    const again = examiner.examine(home());
    workers[1]!.answer('fine');
    expect(workers[1]!.asked).toEqual([expect.objectContaining({ task: { kind: 'examine', document: home() } })]);
    expect(await again).toEqual({ value: 'fine', ms: 1 });
  });
});

describe('files', () => {
  it('reads a good file as one change', () => {
    const doc = drawn();
    const outcome = importCommand(home(), 'kiln.json', JSON.stringify(doc));
    expect(outcome).toMatchObject({ label: 'Import kiln.json' });
    if ('errors' in outcome) throw new Error('refused');
    expect(applyPatch(home(), outcome.patch)).toEqual(doc);
  });

  it.each([
    ['not json', '{', 'kiln.json', 'no JSON'],
    [
      'a wrong rating',
      JSON.stringify({ ...home(), parts: [{ id: 'q', kind: 'mcb', rating: 'ten' }] }),
      'parts.0.rating',
      '',
    ],
    [
      'a reserved id',
      JSON.stringify({ ...home(), parts: [{ id: 'constructor', kind: 'mcb' }] }),
      'parts.0.id',
      'reserved',
    ],
    [
      'two of one id',
      JSON.stringify({
        ...home(),
        parts: [
          { id: 'q', kind: 'mcb' },
          { id: 'q', kind: 'lamp' },
        ],
      }),
      'parts.1.id',
      'twice',
    ],
  ])('names path and reason of %s, and changes nothing', (_, text, path, words) => {
    const outcome = importCommand(home(), 'kiln.json', text);
    if (!('errors' in outcome)) throw new Error('taken');
    expect(outcome.errors[0]!.path).toBe(path);
    expect(outcome.errors[0]!.message).toContain(words);
  });

  it('says which picture is too large for a browser', () => {
    expect(sizeOfSvg('<svg xmlns="x" width="420mm" height="297mm" viewBox="0 0 1 1">')).toEqual({
      width: 420,
      height: 297,
    });
    expect(sizeOfSvg('<svg width="10">')).toBeNull();
    expect(pictureSize({ width: 420, height: 297 }, 300)).toEqual({ width: 4961, height: 3508 });
    expect(pictureSize({ width: 841, height: 594 }, 600)).toEqual({ refused: expect.stringContaining('fewer dots') });
  });
});

vi.setConfig({ testTimeout: 60_000 });
