import { createStore, type StoreApi } from 'zustand/vanilla';
import { applyPatch, diff, isEmptyPatch, type Patch } from '@/diagram/document/patch';
import type { DocumentError, End, Installation } from '@/diagram/document/schema';
import { disown, ownOnly } from '@/diagram/commands/merge';
import type { DrawingRights, DrawingView, SavedChange, TitleBlock } from '@/lib/shared/drawings';
import type { Peer } from '@/lib/shared/live';
import type { HistoryStep } from './outbox';
import type { SaveState } from './save-state';

/** What is in hand. It is the same on both faces and no part of the history. */
export interface Selection {
  parts: readonly string[];
  wires: readonly string[];
  /** the terminal in hand, from which the sheet extends */
  terminal: End | null;
}

export const NOTHING: Selection = { parts: [], wires: [], terminal: null };

/** Somebody's change and mine at the same places: to be decided key by key. */
export interface Conflict {
  keys: readonly string[];
  theirs: readonly SavedChange[];
  /** the document as I had it, before theirs came under it */
  myDocument: Installation;
  /** the document as the other person left it, to show beside mine */
  theirDocument: Installation;
}

export interface DrawingState {
  drawingId: string;
  jobId: string;
  document: Installation;
  /** the newest revision of the server that `document` contains */
  rev: number;
  rights: DrawingRights;
  titleBlock: TitleBlock;
  /** what of the stored drawing could not be read; the sheets are then open for reading */
  problems: readonly DocumentError[];
  selection: Selection;
  undoSteps: readonly HistoryStep[];
  redoSteps: readonly HistoryStep[];
  aside: readonly HistoryStep[];
  saveState: SaveState;
  conflict: Conflict | null;
  /** why this browser keeps nothing; null while it does */
  storageFailure: string | null;
  /** the newest change of somebody else that arrived while this sheet was open */
  news: SavedChange | null;
  /** who else has this drawing open now */
  peers: readonly Peer[];
  /** one line about what just happened, for the foot of the sheet and for screen readers */
  notice: string;

  /**
   * Does one named command: the document changes at once, the outbox keeps it, the network follows.
   * @returns false when it changes nothing or the drawing may only be read
   */
  run: (label: string, patch: Patch) => boolean;
  undo: () => void;
  redo: () => void;
  /** Somebody else has made a change: no undo of mine touches what it left. */
  disown: (theirs: Patch) => void;
  /** Brings back work of one's own that gave way to somebody else's. */
  bringBack: (step: HistoryStep) => void;
  select: (selection: Partial<Selection>) => void;
  say: (notice: string) => void;
}

export type DrawingStore = StoreApi<DrawingState>;

/** Takes each change over for keeping and sending. */
export type Keep = (label: string, patch: Patch) => void;

/** Ids in the selection that are no longer drawn go from it. */
export function stillThere(selection: Selection, document: Installation): Selection {
  const parts = new Set(document.parts.map((part) => part.id));
  const wires = new Set(document.wires.map((wire) => wire.id));
  const kept: Selection = {
    parts: selection.parts.filter((id) => parts.has(id)),
    wires: selection.wires.filter((id) => wires.has(id)),
    terminal: selection.terminal && parts.has(selection.terminal[0]) ? selection.terminal : null,
  };
  const same =
    kept.parts.length === selection.parts.length &&
    kept.wires.length === selection.wires.length &&
    kept.terminal === selection.terminal;
  return same ? selection : kept;
}

/**
 * The state of one drawing in this window. It knows nothing of storage or network: each change is handed to `keep`.
 */
export function createDrawingStore(view: DrawingView, keep: Keep): DrawingStore {
  return createStore<DrawingState>((set, get) => {
    /** Applies without a history entry; the caller keeps the books. */
    const apply = (label: string, patch: Patch): HistoryStep | null => {
      const { document, selection } = get();
      const next = applyPatch(document, patch);
      const back = diff(next, document);
      if (isEmptyPatch(back)) return null;
      set({ document: next, selection: stillThere(selection, next) });
      keep(label, patch);
      return { label, step: patch, back, at: Date.now() };
    };

    return {
      drawingId: view.id,
      jobId: view.jobId,
      document: view.document,
      rev: view.rev,
      rights: view.rights,
      titleBlock: view.titleBlock,
      problems: view.problems ?? [],
      selection: NOTHING,
      undoSteps: [],
      redoSteps: [],
      aside: [],
      saveState: { kind: 'saved', at: null },
      conflict: null,
      storageFailure: null,
      news: null,
      peers: [],
      notice: '',

      run(label, patch) {
        const step = get().rights.edit ? apply(label, patch) : null;
        if (!step) return false;
        set({ undoSteps: [...get().undoSteps, step], redoSteps: [], notice: label });
        return true;
      },

      undo() {
        const left = [...get().undoSteps];
        for (let entry = left.pop(); entry; entry = left.pop()) {
          const patch = ownOnly(get().document, entry.back, entry.step);
          // A step that others have written over since has nothing left to take back: the one before it is meant.
          const undone = apply(`Undo: ${entry.label}`, patch);
          if (!undone) continue;
          const again: HistoryStep = { label: entry.label, step: undone.back, back: patch, at: entry.at };
          set({ undoSteps: left, redoSteps: [...get().redoSteps, again], notice: `Taken back: ${entry.label}` });
          return;
        }
        set({ undoSteps: left, notice: 'Nothing of yours is left to take back.' });
      },

      redo() {
        const left = [...get().redoSteps];
        for (let entry = left.pop(); entry; entry = left.pop()) {
          const step = apply(entry.label, ownOnly(get().document, entry.step, entry.back));
          if (!step) continue;
          set({ redoSteps: left, undoSteps: [...get().undoSteps, step], notice: `Done again: ${entry.label}` });
          return;
        }
        set({ redoSteps: left, notice: 'Nothing was taken back.' });
      },

      disown(theirs) {
        const { undoSteps, redoSteps } = get();
        set({ undoSteps: disown(undoSteps, theirs), redoSteps: disown(redoSteps, theirs) });
      },

      bringBack(step) {
        if (get().run(`Bring back: ${step.label}`, step.step))
          set({ aside: get().aside.filter((other) => other !== step) });
      },

      select: (selection) => set({ selection: { ...get().selection, ...selection } }),
      say: (notice) => set({ notice }),
    };
  });
}
