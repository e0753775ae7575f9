import type { FaultWalk } from '@/diagram/circuit/fault-types';
import { diff, type Patch } from '@/diagram/document/patch';
import { canonical, type Installation } from '@/diagram/document/schema';
import type { Examination } from '@/diagram/rules/examination';
import type { Finding, Remedy } from '@/diagram/rules/types';
import { WorkerLine, type Failure, type LineWorker } from '@/lib/shared/worker-line';

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

type Answer<T> = { value: T; ms: number };
export type Outcome<T> = Answer<T> | Failure;
export type ExamineWorker = LineWorker<{ task: Told }, Answer<Examination | Proof>>;

/** Examines and proves beside the page; the newest task counts. */
export class Examiner {
  private readonly line: WorkerLine<Task, { task: Told }, Answer<Examination | Proof>>;
  /** the document that the worker was told last: it keeps that and what it worked out of it */
  private told: Installation | null = null;

  constructor(makeWorker: () => ExamineWorker) {
    this.line = new WorkerLine(
      makeWorker,
      (task, fresh) => ({ task: this.tell(task, fresh) }),
      'The examination could not be loaded.',
    );
  }

  examine(document: Installation): Promise<Outcome<Examination> | null> {
    return this.line.ask({ kind: 'examine', document }) as Promise<Outcome<Examination> | null>;
  }

  prove(document: Installation, finding: Finding): Promise<Outcome<Proof> | null> {
    return this.line.ask({ kind: 'prove', document, finding }) as Promise<Outcome<Proof> | null>;
  }

  private tell(task: Task, fresh: boolean): Told {
    const before = this.told;
    this.told = canonical(task.document);
    if (fresh || !before) return { ...task, document: this.told };
    const patch = diff(before, this.told);
    return task.kind === 'examine'
      ? { kind: 'examine-change', patch }
      : { kind: 'prove-change', patch, finding: task.finding };
  }

  close(): void {
    this.line.close();
  }
}

export const browserExaminer = (): Examiner =>
  new Examiner(
    () => new Worker(new URL('./examine.worker.ts', import.meta.url), { type: 'module' }) as unknown as ExamineWorker,
  );
