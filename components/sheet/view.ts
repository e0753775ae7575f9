import { createStore, type StoreApi } from 'zustand/vanilla';
import { useStore } from 'zustand';
import { createContext, useContext } from 'react';
import type { End, Face, Installation } from '@/diagram/document/schema';
import type { Point } from '@/diagram/layout/scene';
import type { ShownWalk } from '@/components/rehearsal/on-sheet/shown-walk';
import type { TidyWay } from './tidy/use-tidy';
import type { Choice } from '@/diagram/commands/extend/types';

/** What the hands are doing on the sheet. One thing at a time; Esc goes one step back. */
export type Mode =
  | { kind: 'rest' }
  /** the slip of suggestions is open at a terminal */
  | { kind: 'extend'; end: End; typed: string; index: number; open: boolean; choice: Choice }
  /** a wire hangs from a terminal; arrows choose where it ends */
  | { kind: 'wire'; from: End; index: number }
  /** the parts in hand follow the arrows, in modules */
  | { kind: 'move'; dx: number; dy: number }
  /** a rating, designation or cable is written where it stands */
  | { kind: 'edit'; part?: string; parts?: readonly string[]; cable?: string; field?: 'place'; at: Point }
  /** a room is to be copied whole */
  | { kind: 'room'; place: string }
  /** a finger met two terminals: which one is meant; then what was under way goes on */
  | { kind: 'choose'; ends: readonly End[]; at: Point; back: Mode }
  | { kind: 'find' }
  | { kind: 'legend' }
  | { kind: 'commands' }
  | { kind: 'load'; loads: readonly string[] }
  /** the survey's draft lies over the sheet, dashed */
  | { kind: 'draft'; preview: Installation }
  | { kind: 'tidy'; way: TidyWay; preview: Installation; moved: number }
  | { kind: 'export' }
  | { kind: 'history' };

export type Condition = 'all' | 'mains' | 'outage' | 'main-off';

export interface Camera {
  all(): void;
  zoom(by: number): void;
  /** brings a point of the drawing, in 1/100 mm, into sight: near ones by the least move, others to the middle */
  show(point: Point): void;
  /** brings a place along the drawing, in 1/100 mm, to the middle; the height stays */
  across(x: number): void;
  /** moves the drawing up where so many px at the foot of the canvas hide a point of it */
  clear(point: Point, foot: number): void;
  /** where a point of the drawing stands, in px of the canvas box */
  onScreen(point: Point): Point;
}

/** The outline beside the canvas: kept while it is closed, so that it opens where it was left. */
export interface OutlineState {
  shown: boolean;
  /** keys of the items that are unfolded */
  open: ReadonlySet<string>;
  /** key of the item in hand */
  at: string;
  /** the outline had the hands last: what is opened from it gives the focus back to it */
  hand: boolean;
}

export interface ViewState {
  face: Face;
  /** the page of the connections face; null: the first */
  place: string | null;
  mode: Mode;
  /** the drawing as it would be: its new parts are shown dashed */
  ghost: Installation | null;
  condition: Condition;
  severities: ReadonlySet<'danger' | 'defect' | 'advice'>;
  /** place whose findings stand in the margin; null: all */
  room: string | null;
  /** key of the finding in hand */
  finding: string | null;
  /** key of the finding whose fault is to be shown as soon as it is worked out */
  wantsWalk: string | null;
  /** the fault walk that lies over the sheet, while its finding is in hand */
  walk: ShownWalk | null;
  camera: Camera | null;
  /** phones open for reading */
  editing: boolean;
  outline: OutlineState;
  setMode: (mode: Mode) => void;
  set: (state: Partial<Omit<ViewState, 'setMode' | 'set'>>) => void;
}

export type View = StoreApi<ViewState>;

export const REST: Mode = { kind: 'rest' };

export const createView = (face: Face, place: string | null): View =>
  createStore<ViewState>((set) => ({
    face,
    place,
    mode: REST,
    ghost: null,
    condition: 'all',
    severities: new Set(['danger', 'defect', 'advice']),
    room: null,
    finding: null,
    wantsWalk: null,
    walk: null,
    camera: null,
    editing: true,
    outline: { shown: false, open: new Set(['sheet']), at: 'sheet', hand: false },
    setMode: (mode) => set({ mode, ghost: null }),
    set,
  }));

const ViewContext = createContext<View | null>(null);
export const ViewProvider = ViewContext.Provider;

/** The view of the sheet this component stands on. */
export function useViewStore(): View {
  const view = useContext(ViewContext);
  if (!view) throw new Error('this component stands on a sheet');
  return view;
}

export const useView = <T>(read: (state: ViewState) => T): T => useStore(useViewStore(), read);
