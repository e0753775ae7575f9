import type { Installation } from '@/diagram/document/schema';
import type { Question, Rehearsed } from '@/diagram/rehearsal/rehearse';
import { WorkerLine, type Failure, type LineWorker, type Reply as ReplyOf } from '@/lib/shared/worker-line';

/** A document the first time and whenever it has changed, then questions about it. */
interface Message {
  document?: Installation;
  question: Question;
}

type Answer = { value: Rehearsed };
/** What the worker is told. */
export type Told = { id: number } & Message;
export type Reply = ReplyOf<Answer>;
export type Outcome = Answer | Failure;
export type RehearseWorker = LineWorker<Message, Answer>;

/** Rehearses beside the page; the newest question counts. */
export class Rehearser {
  private readonly line: WorkerLine<Required<Message>, Message, Answer>;
  /** the document that the worker has */
  private told: Installation | null = null;

  constructor(makeWorker: () => RehearseWorker) {
    this.line = new WorkerLine(
      makeWorker,
      ({ document, question }, fresh) => {
        const known = !fresh && document === this.told;
        this.told = document;
        return known ? { question } : { document, question };
      },
      'The rehearsal could not be loaded.',
    );
  }

  ask(document: Installation, question: Question): Promise<Outcome | null> {
    return this.line.ask({ document, question });
  }

  close(): void {
    this.line.close();
  }
}

export const browserRehearser = (): Rehearser =>
  new Rehearser(
    () => new Worker(new URL('./rehearse.worker.ts', import.meta.url), { type: 'module' }) as unknown as RehearseWorker,
  );
