import type { FaultWalk } from '@/diagram/circuit/fault-types';
import { diff, type Patch } from '@/diagram/document/patch';
import { canonical, type Installation } from '@/diagram/document/schema';
import type { Examination } from '@/diagram/rules/examination';
import type { Finding, Remedy } from '@/diagram/rules/types';

/** What a finding in hand needs beyond its words. */
export interface Proof {
  /** edits that put it right, each of them tried */
  remedies: Remedy[];
  /** the fault that shows it; null where none does or none can be walked */
  walk: FaultWalk | null;
  /** the value without which the fault cannot be walked */
  cannot: string | null;
}

export type Task =
  | { kind: 'examine'; document: Installation }
  | { kind: 'prove'; document: Installation; finding: Finding };

/** What a worker is told: the document whole the first time, then what differs from the one it was told last. */
export type Told =
  | Task
  | { kind: 'examine-change'; patch: Patch }
  | { kind: 'prove-change'; patch: Patch; finding: Finding };

type Answer = { id: number; value: Examination | Proof; ms: number } | { id: number; failure: string };
export type Outcome<T> = { value: T; ms: number } | { failure: string };

interface Question {
  id: number;
  task: Task;
  resolve: (answer: Outcome<Examination | Proof> | null) => void;
}

/** The part of a worker that is used here; a test brings its own. */
export interface ExamineWorker {
  postMessage(message: { id: number; task: Told }): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<Answer>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

/**
 * Asks a worker, one task at a time. Of those that wait only the newest is done; an answer that is no longer asked for is
 * null.
 */
export class Examiner {
  private worker: ExamineWorker | null = null;
  private running: Question | null = null;
  private waiting: Question | null = null;
  private next = 1;
  /** the document that the worker was told last: it keeps that and what it worked out of it */
  private told: Installation | null = null;

  constructor(private readonly makeWorker: () => ExamineWorker) {}

  examine(document: Installation): Promise<Outcome<Examination> | null> {
    return this.ask({ kind: 'examine', document }) as Promise<Outcome<Examination> | null>;
  }

  prove(document: Installation, finding: Finding): Promise<Outcome<Proof> | null> {
    return this.ask({ kind: 'prove', document, finding }) as Promise<Outcome<Proof> | null>;
  }

  private ask(task: Task): Promise<Outcome<Examination | Proof> | null> {
    return new Promise((resolve) => {
      this.waiting?.resolve(null);
      this.waiting = { id: this.next++, task, resolve };
      this.start();
    });
  }

  private start(): void {
    if (this.running || !this.waiting) return;
    const asked = this.waiting;
    this.running = asked;
    this.waiting = null;
    const worker = this.ready();
    worker.postMessage({ id: asked.id, task: this.tell(asked.task) });
  }

  private tell(task: Task): Told {
    const before = this.told;
    this.told = canonical(task.document);
    if (!before) return { ...task, document: this.told };
    const patch = diff(before, this.told);
    return task.kind === 'examine'
      ? { kind: 'examine-change', patch }
      : { kind: 'prove-change', patch, finding: task.finding };
  }

  private ready(): ExamineWorker {
    if (this.worker) return this.worker;
    const worker = this.makeWorker();
    worker.onmessage = ({ data }) => this.answer(data);
    worker.onerror = (event) => {
      const asked = this.running;
      this.close();
      asked?.resolve({ failure: event.message || 'The examination could not be loaded.' });
      this.start();
    };
    this.worker = worker;
    return worker;
  }

  private answer(answer: Answer): void {
    const asked = this.running;
    if (asked?.id !== answer.id) return;
    this.running = null;
    const outcome = 'failure' in answer ? { failure: answer.failure } : { value: answer.value, ms: answer.ms };
    // A newer task waits: this answer is about a drawing that is no longer on the sheet.
    asked.resolve(this.waiting ? null : outcome);
    this.start();
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
    this.running = null;
    this.told = null;
  }
}

export const browserExaminer = (): Examiner =>
  new Examiner(
    () => new Worker(new URL('./examine.worker.ts', import.meta.url), { type: 'module' }) as unknown as ExamineWorker,
  );
