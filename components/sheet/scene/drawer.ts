import { diff } from '@/diagram/document/patch';
import { canonical, type Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { WorkerLine, type LineWorker } from '@/lib/shared/worker-line';
import { withDelta } from './scene-delta';
import { sceneOf, type DrawnAnswer, type Told, type Wanted } from './wanted';

/** What is on the canvas. */
export interface Shown {
  of: Wanted;
  scene: Scene;
  ghost: Scene | null;
}

export type DrawWorker = LineWorker<{ told: Told }, DrawnAnswer>;

const sameWish = (a: Wanted, b: Wanted): boolean =>
  a.document === b.document && a.ghost === b.ghost && a.face === b.face && a.place === b.place;

/** Works out what the canvas shows beside the page, so that no edit holds the page up. */
export class Drawer {
  private readonly line: WorkerLine<Wanted, { told: Told }, DrawnAnswer>;
  /** the document that the worker was told last, and the scene it holds */
  private told: Installation | null = null;
  private held: Scene | null = null;
  private asked: Wanted | null;

  /** @param shown what is on the canvas already */
  constructor(
    makeWorker: () => DrawWorker,
    private shown: Shown | null,
  ) {
    this.line = new WorkerLine(
      makeWorker,
      (wanted, fresh) => ({ told: this.tell(wanted, fresh) }),
      'The drawing could not be worked out.',
      // While a key is held down each step is worth seeing.
      true,
    );
    this.asked = shown?.of ?? null;
  }

  /** @returns what is on the canvas then; null where that was asked for before, or something newer meanwhile */
  async draw(wanted: Wanted): Promise<Shown | null> {
    if (this.asked && sameWish(this.asked, wanted)) return null;
    this.asked = wanted;
    const answer = await this.line.ask(wanted);
    if (!answer) return null;
    this.shown = 'failure' in answer ? drawHere(wanted, this.shown) : this.take(wanted, answer);
    return this.shown;
  }

  /** Has the worker ready before the first edit. */
  warm(): void {
    if (this.shown && !this.told) void this.line.ask(this.shown.of);
  }

  close(): void {
    this.line.close();
  }

  private tell({ document, ghost, face, place }: Wanted, fresh: boolean): Told {
    const before = this.told;
    this.told = canonical(document);
    const more = { face, place, ghost: ghost && diff(this.told, canonical(ghost)) };
    if (!fresh && before) return { ...more, patch: diff(before, this.told) };
    const { shown } = this;
    this.held = shown?.scene ?? null;
    const stands = shown?.of.document === document && shown.of.face === face && shown.of.place === place;
    return { ...more, document: this.told, before: this.held, stands };
  }

  private take(wanted: Wanted, { scene, ghost }: DrawnAnswer): Shown {
    const held = scene ? withDelta(this.held, scene) : this.held!;
    this.held = held;
    return { of: wanted, scene: held, ghost: ghost && withDelta(held, ghost) };
  }
}

/** Without its worker a browser works the drawing out on the page. */
function drawHere(wanted: Wanted, before: Shown | null): Shown {
  const scene = sceneOf(wanted.document, wanted, before?.scene ?? null);
  return { of: wanted, scene, ghost: wanted.ghost && sceneOf(wanted.ghost, wanted, scene) };
}

export const browserDrawer = (shown: Shown | null): Drawer =>
  new Drawer(
    () => new Worker(new URL('./draw.worker.ts', import.meta.url), { type: 'module' }) as unknown as DrawWorker,
    shown,
  );
