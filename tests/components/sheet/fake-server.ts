import { applyPatch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { Change, DrawingView, SavedChange } from '@/lib/shared/drawings';
import type { DrawingApi, SaveResult } from '@/components/sheet/drawing-api';

export const DRAWING = '5f0c2c0e-27a4-4a53-9b37-0c5e6f1b8a10';
export const ANNA = { id: 'anna', name: 'Anna Riedl', initials: 'A. R.' };
export const KOFI = { id: 'kofi', name: 'Kofi Owusu', initials: 'K. O.' };

/** The drawing routes in memory, with the promises of the real ones: one writer a revision, a retry answered as before. */
export class FakeServer {
  rev = 0;
  log: SavedChange[] = [];
  /** the next answers are lost on the way back, though the change is saved */
  loseAnswers = 0;
  down = false;
  /** set to answer so instead of saving */
  answer: SaveResult | null = null;

  constructor(
    public document: Installation,
    readonly person = ANNA,
  ) {}

  /** What somebody else saves. */
  write(change: Omit<Change, 'base'>, person = KOFI): void {
    this.rev += 1;
    this.document = applyPatch(this.document, change.patch);
    this.log.push({ ...change, rev: this.rev, person, at: '2026-11-30T13:02:00Z' });
  }

  view(): DrawingView {
    return {
      id: DRAWING,
      jobId: 'job',
      rev: this.rev,
      document: this.document,
      state: 'open',
      rights: { edit: true, record: true },
      titleBlock: {
        number: 'OH-1',
        title: 'Kiln Row 3',
        client: 'M. Tane',
        address: '',
        team: 'Tillmere',
        drawnBy: 'A. R.',
        drawnOn: '2026-11-30',
        checkedBy: null,
        revision: '-',
        state: 'draft',
      },
    };
  }

  api: DrawingApi = {
    save: async (_id, { base, ...change }) => {
      await Promise.resolve();
      if (this.down) return { kind: 'unreachable' };
      if (this.answer) return this.answer;
      const known = this.log.find((saved) => saved.saveId === change.saveId);
      if (known) return { kind: 'saved', rev: known.rev };
      if (base !== this.rev)
        return { kind: 'stale', since: structuredClone(this.log.filter((saved) => saved.rev > base)) };
      this.write(structuredClone(change), this.person);
      if (this.loseAnswers > 0) {
        this.loseAnswers -= 1;
        return { kind: 'unreachable' };
      }
      return { kind: 'saved', rev: this.rev };
    },
    since: async (_id, rev) => (this.down ? null : structuredClone(this.log.filter((saved) => saved.rev > rev))),
  };
}
