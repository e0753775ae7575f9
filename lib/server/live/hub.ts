import 'server-only';
import { env } from '@/lib/server/env';
import { AppError } from '@/lib/server/errors';
import { Listener } from '@/lib/server/live/listener';
import type { Note } from '@/lib/server/live/notes';

/** A window that has a drawing open, as this process holds it. */
export interface Subscriber {
  teamId: string;
  drawingId: string;
  personId: string;
  streamId: string;
  /** something happened to the drawing; null: it may have, look */
  hear(note: Note | null): void;
  close(): void;
}

/** Windows of one person at once, in this process. More than a browser can hold open, less than would hurt. */
const PER_PERSON = 12;
const PER_PROCESS = 2_000;
const WAIT_S = 30;

const tooMany = (message: string) => new AppError('too-many', message, { wait: WAIT_S });

/** All streams of this process, and the one connection that tells them what happened. */
export class Hub {
  private readonly byDrawing = new Map<string, Set<Subscriber>>();
  private readonly perPerson = new Map<string, number>();
  private count = 0;
  private listener: Listener | null = null;
  private closing = false;

  /**
   * Adds a window.
   * @throws AppError too-many
   */
  join(subscriber: Subscriber): void {
    const { personId, drawingId } = subscriber;
    const held = this.perPerson.get(personId) ?? 0;
    if (this.closing) throw tooMany('The server is stopping.');
    if (held >= PER_PERSON) throw tooMany('This person has drawings open in many windows; this one asks now and then.');
    if (this.count >= PER_PROCESS) throw tooMany('Many drawings are open here; this window asks now and then.');
    this.count += 1;
    this.perPerson.set(personId, held + 1);
    const group = this.byDrawing.get(drawingId) ?? new Set();
    this.byDrawing.set(drawingId, group.add(subscriber));
    this.listener ??= new Listener(env().DATABASE_LISTEN_URL ?? env().DATABASE_URL, {
      note: (note) => this.tell(note),
      connected: () => this.all().forEach((each) => each.hear(null)),
    });
    this.listener.start();
  }

  leave(subscriber: Subscriber): void {
    const { personId, drawingId } = subscriber;
    const group = this.byDrawing.get(drawingId);
    if (!group?.delete(subscriber)) return;
    if (group.size === 0) this.byDrawing.delete(drawingId);
    this.count -= 1;
    const held = this.perPerson.get(personId)! - 1;
    if (held === 0) this.perPerson.delete(personId);
    else this.perPerson.set(personId, held);
  }

  all(): Subscriber[] {
    return [...this.byDrawing.values()].flatMap((group) => [...group]);
  }

  private tell(note: Note): void {
    for (const each of this.byDrawing.get(note.drawing) ?? []) if (each.teamId === note.team) each.hear(note);
  }

  /** Ends every stream and the connection; nothing is held open that would keep the server from stopping. */
  async close(): Promise<void> {
    this.closing = true;
    for (const each of this.all()) each.close();
    await this.listener?.stop();
    this.listener = null;
  }
}

const store = globalThis as typeof globalThis & { ohmsteadHub?: Hub };

/** The hub of this process: routes are bundled apart from one another, so it lives where all of them find it. */
export function hub(): Hub {
  if (!store.ohmsteadHub) {
    const made = new Hub();
    store.ohmsteadHub = made;
    for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => void made.close());
  }
  return store.ohmsteadHub;
}
