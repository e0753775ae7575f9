import 'server-only';
import { randomUUID } from 'node:crypto';
import type { Actor } from '@/lib/server/actor';
import { hub, type Subscriber } from '@/lib/server/live/hub';
import { arrive, depart, stay, whoIsHere } from '@/lib/server/live/presence';
import { AppError } from '@/lib/server/errors';
import { findJob } from '@/lib/server/jobs/find-job';
import { describeFault, log } from '@/lib/server/log';
import { authorize } from '@/lib/server/policies';
import { actorOf } from '@/lib/server/session';
import type { LiveEvents } from '@/lib/shared/live';
import { Drawing } from '@/models';

/** ms between two looks whether the session lives and the right is held: a lost one ends the stream within 15 s. */
export const CHECK_MS = 10_000;
/** bytes a window may be behind before it is let go: it comes back and asks */
const MOST_BEHIND = 64 * 1024;

const HEADERS = {
  'content-type': 'text/event-stream; charset=utf-8',
  // no-transform: a compressed stream would be held back until its block is full
  'cache-control': 'no-store, no-transform',
  'x-accel-buffering': 'no',
  'x-content-type-options': 'nosniff',
  connection: 'close',
};

/** The person behind a stream as they are now, when they may still read the drawing. Being looked at is no sign of life. */
async function stillMay({ teamId, sessionId, personId }: Actor, drawingId: string): Promise<boolean> {
  const now = await actorOf({ tid: teamId, sid: sessionId, sub: personId }, { touch: false });
  if (!now) return false;
  try {
    authorize(now, 'drawing.read', await findJob(now, { drawingId }));
    return true;
  } catch (error) {
    if (error instanceof AppError) return false;
    throw error;
  }
}

/** One window's stream: what it is told, in order, and its end. */
class Stream implements Subscriber {
  readonly teamId: string;
  readonly personId: string;
  readonly streamId = randomUUID();
  readonly body: ReadableStream<Uint8Array>;
  private controller!: ReadableStreamDefaultController<Uint8Array>;
  private timer: NodeJS.Timeout | undefined;
  private open = true;
  private toldRev = -1;
  private toldPeople = '';
  private looking: Promise<void> | null = null;
  private lookAgain = false;

  constructor(
    private readonly actor: Actor,
    readonly drawingId: string,
  ) {
    this.teamId = actor.teamId;
    this.personId = actor.personId;
    this.body = new ReadableStream<Uint8Array>(
      { start: (controller) => void (this.controller = controller), cancel: () => this.close() },
      { highWaterMark: MOST_BEHIND, size: (chunk) => chunk.byteLength },
    );
  }

  async begin(): Promise<void> {
    hub().join(this);
    try {
      this.write('retry: 2000\n\n');
      await arrive(this);
      await this.look(true);
    } catch (error) {
      this.close();
      throw error;
    }
    this.timer = setInterval(() => void this.check(), CHECK_MS);
    this.timer.unref();
  }

  hear: Subscriber['hear'] = (note) => {
    if (note?.rev !== undefined) this.tellRev(note.rev);
    else void this.look(note === null);
  };

  /** Reads who is here, and the newest revision where it may have been missed; looks that come together are one. */
  private async look(atRev: boolean): Promise<void> {
    if (atRev) {
      const head = await Drawing.findOne({ attributes: ['rev'], where: { teamId: this.teamId, id: this.drawingId } });
      if (head) this.tellRev(head.rev);
    }
    if (this.looking) {
      this.lookAgain = true;
      return this.looking;
    }
    this.looking = this.readPeople()
      .catch((error) => log('live.failed', { drawingId: this.drawingId, ...describeFault(error) }))
      .finally(() => (this.looking = null));
    await this.looking;
    if (this.lookAgain) {
      this.lookAgain = false;
      await this.look(false);
    }
  }

  private tellRev(rev: number): void {
    if (rev <= this.toldRev) return;
    this.toldRev = rev;
    this.event('rev', { rev });
  }

  private async readPeople(): Promise<void> {
    const people = await whoIsHere(this.teamId, this.drawingId);
    const text = JSON.stringify(people);
    if (text === this.toldPeople) return;
    this.toldPeople = text;
    this.event('people', { people });
  }

  /** The heartbeat: a comment for the proxies in between, and the end where the right to read has gone. */
  private async check(): Promise<void> {
    // What was said ten seconds ago and more has been taken by nobody: the window went away before its answer began, and
    // nothing else would ever say so.
    if ((this.controller.desiredSize ?? 0) < MOST_BEHIND) return this.close();
    this.write(': here\n\n');
    try {
      if (await stillMay(this.actor, this.drawingId)) await stay(this);
      else this.close();
    } catch (error) {
      // The database is away: nobody's rights can be read, so nobody is told more.
      log('live.failed', { drawingId: this.drawingId, ...describeFault(error) });
      this.close();
    }
  }

  private event<K extends keyof typeof LiveEvents>(name: K, data: (typeof LiveEvents)[K]['_output']): void {
    this.write(`event: ${name}\ndata: ${JSON.stringify(data)}\n\n`);
  }

  private write(text: string): void {
    if (!this.open) return;
    if ((this.controller.desiredSize ?? 0) <= 0) return this.close();
    this.controller.enqueue(new TextEncoder().encode(text));
  }

  close(): void {
    if (!this.open) return;
    this.open = false;
    clearInterval(this.timer);
    hub().leave(this);
    try {
      this.controller.close();
    } catch {
      // The window closed it first.
    }
    void depart(this).catch((error) => log('live.failed', { drawingId: this.drawingId, ...describeFault(error) }));
  }
}

/**
 * The events of a drawing for one window: revisions as they are saved, and who else has it open. It lives as long as the
 * session does and the drawing may be read.
 * @throws AppError too-many
 */
export async function openStream(actor: Actor, drawingId: string): Promise<Response> {
  authorize(actor, 'drawing.read', await findJob(actor, { drawingId }));
  const stream = new Stream(actor, drawingId);
  await stream.begin();
  return new Response(stream.body, { headers: HEADERS });
}
