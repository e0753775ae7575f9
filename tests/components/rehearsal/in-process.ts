import { Rehearser, type Reply, type RehearseWorker, type Told } from '@/components/rehearsal/rehearser';
import type { Installation } from '@/diagram/document/schema';
import { createRehearsal, type Question, type Rehearsed } from '@/diagram/rehearsal/rehearse';
import type { DrawingView } from '@/lib/shared/drawings';

/** The rehearsal's worker without a worker: it answers a moment later, as one does. */
export class InProcess implements RehearseWorker {
  onmessage: ((event: MessageEvent<Reply>) => void) | null = null;
  onerror: ((event: ErrorEvent) => void) | null = null;
  private rehearse: ((question: Question) => Rehearsed) | undefined;
  private ended = false;
  /** what it has been told, in order */
  static told: Told[] = [];

  postMessage({ id, document, question }: Told): void {
    InProcess.told.push({ id, question, ...(document && { document }) });
    setTimeout(() => {
      if (this.ended) return;
      if (document) this.rehearse = createRehearsal(document);
      this.onmessage?.({ data: { id, value: this.rehearse!(question) } } as MessageEvent<Reply>);
    });
  }

  terminate(): void {
    this.ended = true;
  }
}

export const inProcess = (): Rehearser => new Rehearser(() => new InProcess());

/** A rehearser whose worker fails once, then answers. */
export function failingOnce(): () => Rehearser {
  let failed = false;
  return () =>
    new Rehearser(() => {
      if (failed) return new InProcess();
      failed = true;
      const worker: RehearseWorker = {
        onmessage: null,
        onerror: null,
        postMessage: ({ id }) =>
          setTimeout(() =>
            worker.onmessage?.({ data: { id, failure: 'The switches are stuck.' } } as MessageEvent<Reply>),
          ),
        terminate: () => undefined,
      };
      return worker;
    });
}

let drawings = 0;

/** A drawing as the page gives it to the sheet; each is another, so that nothing is kept from test to test. */
export function viewOf(document: Installation, edit = true): DrawingView {
  const id = `00000000-0000-4000-8000-${String(++drawings).padStart(12, '0')}`;
  return {
    id,
    jobId: id,
    rev: 0,
    document,
    state: 'open',
    rights: { edit, record: edit },
    titleBlock: {
      number: 'OH-1',
      title: 'Kiln Row 3',
      client: 'M. Orrin',
      address: 'Kiln Row 3',
      team: 'Tillmere',
      drawnBy: 'T. B.',
      drawnOn: '2026-11-30T00:00:00Z',
      checkedBy: null,
      revision: '-',
      state: 'draft',
    },
  };
}
