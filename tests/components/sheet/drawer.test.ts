import { describe, expect, it } from 'vitest';
import { drawWith } from '@/components/sheet/scene/draw';
import { Drawer, type DrawWorker, type Shown } from '@/components/sheet/scene/drawer';
import { deltaOf, withDelta } from '@/components/sheet/scene/scene-delta';
import type { Told, Wanted } from '@/components/sheet/scene/wanted';
import { moveParts } from '@/diagram/commands/move-parts';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import { isRefusal } from '@/diagram/commands/types';
import { applyPatch } from '@/diagram/document/patch';
import type { Face, Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { placeAll } from '@/diagram/layout/place';
import type { Scene } from '@/diagram/layout/scene';
import { draftedHome } from '../../diagram/commands/drafted';

const drafted = draftedHome(6);
const home = applyPatch(drafted, placeAll(drafted));
const lamps = home.parts.filter(({ kind }) => kind === 'lamp').map(({ id }) => id);

const moved = (doc: Installation, face: Face, id: string): Installation =>
  applyPatch(doc, moveParts(doc, face, [id], 2500, 500).patch);

function without(doc: Installation, id: string): Installation {
  const command = deleteSelection(doc, [id], []);
  if (isRefusal(command)) throw new Error(command.refused);
  return applyPatch(doc, command.patch);
}

/** The worker as it is, on this thread; messages are copied as they would be on their way. */
class NearWorker implements DrawWorker {
  onmessage: DrawWorker['onmessage'] = null;
  onerror: DrawWorker['onerror'] = null;
  readonly heard: Told[] = [];
  readonly sent: string[] = [];
  private readonly draw = drawWith();
  postMessage(message: { id: number; told: Told }) {
    const { id, told } = structuredClone(message);
    this.heard.push(told);
    queueMicrotask(() => {
      const answer = this.draw(told);
      this.sent.push(JSON.stringify(answer));
      this.onmessage?.(new MessageEvent('message', { data: structuredClone({ id, ...answer }) }) as never);
    });
  }
  terminate() {}
}

const wish = (document: Installation, more: Partial<Wanted> = {}): Wanted => ({
  ...{ document, ghost: null, face: 'overview', place: null },
  ...more,
});
const shownOf = (of: Wanted): Shown => ({ of, scene: buildScene(of.document, of.face), ghost: null });

describe('a scene by what differs from the one before', () => {
  it('is the very scene, with the objects of the one before where they are alike', () => {
    const before = buildScene(home, 'overview');
    for (const next of [moved(home, 'overview', lamps[0]!), without(home, lamps[1]!), home]) {
      const after = buildScene(next, 'overview', { before });
      const delta = deltaOf(before, after);
      const again = withDelta(before, structuredClone(delta));
      expect(again).toEqual(after);
      for (const part of again.parts) {
        const old = before.parts.find(({ id }) => id === part.id);
        if (old && JSON.stringify(old) === JSON.stringify(part)) expect(part).toBe(old);
      }
      expect(JSON.stringify(delta).length).toBeLessThan(JSON.stringify(after).length / 4);
    }
    expect(withDelta(null, deltaOf(null, before))).toEqual(before);
  });
});

describe('drawing beside the page', () => {
  it('comes to the same bytes as on the page, edit after edit, on either face', async () => {
    for (const [face, place] of [
      ['overview', null],
      ['connections', 'room0'],
    ] as const) {
      const worker = new NearWorker();
      const drawer = new Drawer(() => worker, null);
      let before: Scene | null = null;
      let document = home;
      for (const edit of [
        (doc: Installation) => doc,
        (doc: Installation) => moved(doc, face, lamps[0]!),
        (doc: Installation) => without(doc, lamps[1]!),
        (doc: Installation) => applyPatch(doc, { set: { title: 'Another name' } }),
        (doc: Installation) => moved(doc, face, lamps[0]!),
      ]) {
        document = edit(document);
        const shown = await drawer.draw(wish(document, { face, place }));
        const here: Scene = buildScene(document, face, { before, ...(place !== null && { place }) });
        expect(JSON.stringify(shown!.scene)).toBe(JSON.stringify(here));
        before = here;
      }
      expect(worker.heard.map((told) => 'document' in told)).toEqual([true, false, false, false, false]);
    }
  });

  it('begins with what is on the canvas, says of a ghost only what it adds, and lets it go with the edit', async () => {
    const worker = new NearWorker();
    const drawer = new Drawer(() => worker, shownOf(wish(home)));
    const ghost = moved(home, 'overview', lamps[0]!);
    const over = (await drawer.draw(wish(home, { ghost })))!;
    const { scene } = shownOf(wish(home));
    expect(over.scene).toEqual(scene);
    expect(over.ghost).toEqual(buildScene(ghost, 'overview', { before: scene }));
    const others = over.ghost!.parts.filter((part) => !over.scene.parts.includes(part)).map(({ id }) => id);
    expect(others).toContain(lamps[0]);
    expect(others.length).toBeLessThan(over.scene.parts.length / 8);
    expect(worker.sent[0]!.length).toBeLessThan(JSON.stringify(scene).length / 4);
    const taken = (await drawer.draw(wish(ghost)))!;
    expect([taken.scene, taken.ghost]).toEqual([buildScene(ghost, 'overview', { before: scene }), null]);
  });

  it('is made ready without drawing anything anew, and asks for nothing twice', async () => {
    const worker = new NearWorker();
    const drawer = new Drawer(() => worker, shownOf(wish(home)));
    expect(await drawer.draw(wish(home))).toBeNull();
    expect(worker.heard).toEqual([]);
    drawer.warm();
    await Promise.resolve();
    await Promise.resolve();
    expect(worker.sent).toEqual([JSON.stringify({ scene: null, ghost: null })]);
    const next = moved(home, 'overview', lamps[0]!);
    expect((await drawer.draw(wish(next)))!.scene).toEqual(buildScene(next, 'overview', { before: shownOf(wish(home)).scene }));
  });

  it('works on the page where the worker fails, and in a new worker after that', async () => {
    const workers: NearWorker[] = [];
    const drawer = new Drawer(() => {
      workers.push(new NearWorker());
      return workers.at(-1)!;
    }, null);
    const asked = drawer.draw(wish(home));
    workers[0]!.onmessage = null;
    workers[0]!.onerror?.({ message: 'no such file' } as ErrorEvent);
    const first = (await asked)!;
    expect(first.scene).toEqual(buildScene(home, 'overview'));
    const next = without(home, lamps[1]!);
    expect((await drawer.draw(wish(next)))!.scene).toEqual(buildScene(next, 'overview', { before: first.scene }));
    expect(workers).toHaveLength(2);
  });
});
