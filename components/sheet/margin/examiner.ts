import type { Installation } from '@/diagram/document/schema';
import type { Examination } from '@/diagram/rules/examination';

type Answer = { id: number; examination: Examination; ms: number } | { id: number; failure: string };
export type Examined = { examination: Examination; ms: number } | { failure: string };

interface Question {
  id: number;
  document: Installation;
  resolve: (answer: Examined | null) => void;
}

/** The part of a worker that is used here; a test brings its own. */
export interface ExamineWorker {
  postMessage(message: unknown): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<Answer>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

/**
 * Examines documents in a worker, one at a time. Of those that wait only the newest is examined; an answer that is no longer
 * asked for is null.
 */
export class Examiner {
  private worker: ExamineWorker | null = null;
  private running: Question | null = null;
  private waiting: Question | null = null;
  private next = 1;

  constructor(private readonly makeWorker: () => ExamineWorker) {}

  ask(document: Installation): Promise<Examined | null> {
    return new Promise((resolve) => {
      this.waiting?.resolve(null);
      this.waiting = { id: this.next++, document, resolve };
      this.start();
    });
  }

  private start(): void {
    if (this.running || !this.waiting) return;
    this.running = this.waiting;
    this.waiting = null;
    this.ready().postMessage({ id: this.running.id, document: this.running.document });
  }

  private ready(): ExamineWorker {
    if (this.worker) return this.worker;
    const worker = this.makeWorker();
    worker.onmessage = ({ data }) =>
      this.answer(
        data.id,
        'failure' in data ? { failure: data.failure } : { examination: data.examination, ms: data.ms },
      );
    worker.onerror = (event) => {
      const asked = this.running;
      this.close();
      if (asked) asked.resolve({ failure: event.message || 'The examination could not be loaded.' });
      this.start();
    };
    this.worker = worker;
    return worker;
  }

  private answer(id: number, answer: Examined): void {
    const asked = this.running;
    if (asked?.id !== id) return;
    this.running = null;
    // A newer drawing waits: this answer is about one that is no longer on the sheet.
    asked.resolve(this.waiting ? null : answer);
    this.start();
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
    this.running = null;
  }
}

export const browserExaminer = (): Examiner =>
  new Examiner(
    () => new Worker(new URL('./examine.worker.ts', import.meta.url), { type: 'module' }) as unknown as ExamineWorker,
  );
