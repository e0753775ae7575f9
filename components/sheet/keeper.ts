import { applyPatch, type Patch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { DrawingView, SavedChange } from '@/lib/shared/drawings';
import type { DrawingApi } from './drawing-api';
import { HistoryKeeper } from './history-keeper';
import { newUuid } from './identity';
import type { Outbox, QueuedChange } from './outbox';
import { settleAll, takeIn } from './rebase';
import type { SaveState } from './save-state';
import { stillThere, type DrawingStore } from './store';

/** Who draws, and in which window. */
export interface Drawer {
  personId: string;
  windowId: string;
}

export interface KeeperTools {
  api: DrawingApi;
  /** rejects when the browser refuses storage */
  outbox: Promise<Outbox>;
  drawer: Promise<Drawer>;
  /** ids of the windows that live now; null where the browser cannot tell */
  openWindows: () => Promise<Set<string> | null>;
  /** tells the other windows of this browser that a revision was saved */
  announce: (rev: number) => void;
}

const LONGEST_WAIT = 30_000;

/**
 * Keeps the changes of one drawing: outbox first, then the network, one after the other and each against the revision it
 * was drawn on. Changes of others are taken in under the unsent ones where both can stand, else the person is asked.
 */
export class Keeper {
  /** the document of the server at `rev` */
  private base: Installation;
  private rev: number;
  private pending: QueuedChange[] = [];
  private unkept = new Set<string>();
  private writes = new Map<string, Promise<void>>();
  private outbox: Outbox | null = null;
  private drawer: Drawer = { personId: '', windowId: '' };
  private trouble: Extract<SaveState, { kind: 'kept' }>['why'] | null = null;
  private refusal = '';
  private attempt = 0;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private readonly history: HistoryKeeper;
  private busy = false;
  private stopped = false;
  private savedAt: number | null = null;
  private order = 0;
  /** the newest revision that somebody spoke of */
  private heard = 0;
  readonly ready: Promise<void>;

  constructor(
    private readonly view: DrawingView,
    private readonly store: () => DrawingStore,
    private readonly tools: KeeperTools,
  ) {
    this.base = view.document;
    this.rev = view.rev;
    this.history = new HistoryKeeper(store, (error) => this.storageFailed(error));
    this.ready = this.open();
  }

  /** Finds what an earlier window left unsent, and this window's history. */
  private async open(): Promise<void> {
    try {
      this.drawer = await this.tools.drawer;
      this.outbox = await this.tools.outbox;
      const { personId, windowId } = this.drawer;
      const alive = await this.tools.openWindows();
      const left = (await this.outbox.unsent(this.view.id, personId)).filter(
        (change) => change.windowId === windowId || !alive?.has(change.windowId),
      );
      const adopted = left.map((change) => ({ ...change, windowId }));
      if (adopted.length > 0) await this.outbox.replace(adopted);
      this.pending = [...adopted, ...this.pending];
      await this.history.restore(this.outbox, this.place);
      if (adopted.length > 0) {
        this.rebuild();
        this.store().setState({ notice: `Found on this device: ${adopted.length} unsent, being saved now.` });
      }
    } catch (error) {
      this.storageFailed(error);
    }
    this.report();
  }

  /** Takes a command over: it is in the outbox before it is sent. */
  keep(label: string, patch: Patch): void {
    const order = Math.max(Date.now() * 1000, this.order + 1);
    this.order = order;
    const saveId = newUuid();
    const change: QueuedChange = {
      saveId,
      drawingId: this.view.id,
      ...this.drawer,
      order,
      label,
      patch,
      base: this.rev,
    };
    this.pending.push(change);
    this.unkept.add(saveId);
    this.writes.set(
      saveId,
      this.ready.then(() => this.write(saveId)),
    );
    this.report();
    void this.pump();
  }

  private async write(saveId: string): Promise<void> {
    const change = this.pending.find((other) => other.saveId === saveId);
    if (!change || !this.outbox) return;
    try {
      Object.assign(change, this.drawer);
      await this.outbox.add(change);
      this.unkept.delete(saveId);
    } catch (error) {
      this.storageFailed(error);
    }
    this.writes.delete(saveId);
    this.keepHistory();
    this.report();
  }

  private storageFailed(error: unknown): void {
    const why =
      error instanceof DOMException && error.name === 'QuotaExceededError'
        ? 'its storage is full'
        : 'it refuses storage';
    this.store().setState({
      storageFailure: `This browser keeps nothing: ${why}. Stay here until the sheet says Saved, or get the file.`,
    });
  }

  /** Sends the oldest change; the next follows when it is saved. */
  async pump(): Promise<void> {
    await this.ready;
    const change = this.pending[0];
    if (!change && this.heard > this.rev) return this.poll();
    if (!change || this.busy || this.stopped || this.store().getState().conflict || this.trouble === 'refused') return;
    this.busy = true;
    clearTimeout(this.timer);
    await this.writes.get(change.saveId);
    const { saveId, base, label, patch } = change;
    const result = await this.tools.api.save(this.view.id, { saveId, base, label, patch });
    this.busy = false;
    if (this.stopped) return;
    switch (result.kind) {
      case 'saved':
        this.trouble = null;
        this.attempt = 0;
        await this.saved(change, result.rev);
        break;
      case 'stale':
        this.trouble = null;
        this.attempt = 0;
        await this.absorb(result.since);
        break;
      case 'refused':
        this.trouble = 'refused';
        this.refusal = result.message;
        break;
      default:
        this.trouble = result.kind === 'signed-out' ? 'signed-out' : 'offline';
        this.retryLater();
    }
    this.report();
    if (!this.trouble) void this.pump();
  }

  private retryLater(): void {
    const wait = Math.min(LONGEST_WAIT, 1000 * 2 ** this.attempt) * (0.75 + Math.random() / 2);
    this.attempt += 1;
    this.timer = setTimeout(() => void this.pump(), wait);
  }

  /** Tries at once: the network is back, or the person asks for it. */
  retry(): void {
    this.attempt = 0;
    if (this.trouble === 'refused') this.trouble = null;
    void this.pump();
  }

  private async saved(change: QueuedChange, rev: number): Promise<void> {
    this.pending = this.pending.filter((other) => other !== change);
    this.unkept.delete(change.saveId);
    if (rev === this.rev + 1) {
      this.base = applyPatch(this.base, change.patch);
      this.rev = rev;
      for (const other of this.pending) other.base = rev;
      this.store().setState({ rev });
    } else {
      // Saved earlier, its answer was lost: the server's document has it, with what came after.
      this.rebuild();
    }
    this.savedAt = Date.now();
    await this.forget([change.saveId]);
    this.tools.announce(rev);
    if (rev > this.rev) await this.poll();
  }

  private async forget(saveIds: readonly string[]): Promise<void> {
    try {
      await this.outbox?.remove(saveIds);
    } catch (error) {
      // Left in the outbox it is sent once more, which its save id makes harmless.
      this.storageFailed(error);
    }
  }

  /** Asks for changes of others; they arrive under what is not sent yet. */
  async poll(): Promise<void> {
    await this.ready;
    if (this.busy || this.stopped || this.store().getState().conflict) return;
    this.busy = true;
    const heard = this.heard;
    const since = await this.tools.api.since(this.view.id, this.rev);
    this.busy = false;
    // What was heard of is answered; only what is heard of meanwhile has to be asked for again.
    if (this.heard === heard) this.heard = 0;
    if (since && since.length > 0) await this.absorb(since);
    void this.pump();
  }

  /** A revision is there that may be newer than ours: asked for at once, or as soon as the save under way is answered. */
  hear(rev: number): void {
    this.heard = Math.max(this.heard, rev);
    if (this.heard > this.rev) void this.poll();
  }

  /** Takes in the changes of others, and finds which of mine are already among them. */
  private async absorb(since: readonly SavedChange[]): Promise<void> {
    const before = this.rev;
    const { base, rev, pending, done, theirs, keys } = takeIn(
      { base: this.base, rev: this.rev, pending: this.pending },
      since,
    );
    const myDocument = this.store().getState().document;
    this.base = base;
    this.rev = rev;
    this.pending = pending;
    this.rebuild();
    for (const change of theirs) if (change.rev > before) this.store().getState().disown(change.patch);
    if (done.length > 0) this.savedAt = Date.now();
    const newest = theirs.findLast((change) => change.rev > before && change.person.id !== this.drawer.personId);
    this.store().setState({
      ...(newest && { news: newest }),
      ...(keys.length > 0 && { conflict: { keys, theirs, myDocument, theirDocument: base } }),
    });
    await this.rewrite(done);
    this.report();
  }

  private async rewrite(gone: readonly string[]): Promise<void> {
    await this.ready;
    try {
      await this.outbox?.replace(this.pending, gone);
    } catch (error) {
      this.storageFailed(error);
    }
  }

  /**
   * The person has chosen: at the keys in `theirs` the other's stands, at all others mine. What gives way is set aside, not
   * lost.
   */
  async decide(theirs: ReadonlySet<string>): Promise<void> {
    const { conflict, aside } = this.store().getState();
    if (!conflict) return;
    const { kept, gone, aside: put } = settleAll(this.pending, conflict, theirs, this.rev);
    this.pending = kept;
    this.store().setState({ conflict: null, aside: [...aside, ...put] });
    this.rebuild();
    await this.rewrite(gone);
    this.keepHistory();
    this.report();
    void this.pump();
  }

  /** Sets aside all that the server refuses, so that drawing can go on. */
  async setAside(): Promise<void> {
    const put = this.pending.map(({ label, patch }) => ({ label, step: patch, back: {}, at: Date.now() }));
    const gone = this.pending.map((change) => change.saveId);
    this.pending = [];
    this.trouble = null;
    this.store().setState({ aside: [...this.store().getState().aside, ...put] });
    this.rebuild();
    await this.forget(gone);
    this.keepHistory();
    this.report();
  }

  private rebuild(): void {
    const store = this.store();
    const document = this.pending.reduce((doc, change) => applyPatch(doc, change.patch), this.base);
    store.setState({ document, rev: this.rev, selection: stillThere(store.getState().selection, document) });
  }

  private keepHistory(): void {
    this.history.later(() => this.writeHistory());
  }

  /** Writes the history now; undo then survives a reload. */
  writeHistory(): Promise<void> {
    return this.history.write(this.outbox, this.place);
  }

  private get place() {
    return { drawingId: this.view.id, ...this.drawer };
  }

  /** True while closing the window would lose a change. */
  get wouldLose(): boolean {
    return this.unkept.size > 0;
  }

  private report(): void {
    this.store().setState({ saveState: this.state() });
  }

  private state(): SaveState {
    const count = this.pending.length;
    if (count === 0) return { kind: 'saved', at: this.savedAt };
    if (this.store().getState().conflict) return { kind: 'conflict', count };
    if (!this.trouble) return { kind: 'saving' };
    if (this.unkept.size > 0) return { kind: 'unkept', count };
    return { kind: 'kept', count, why: this.trouble, ...(this.trouble === 'refused' && { message: this.refusal }) };
  }

  stop(): void {
    this.stopped = true;
    clearTimeout(this.timer);
    this.history.stop();
  }
}
