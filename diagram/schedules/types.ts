import type { FieldId } from './fields';

/** Tables of the schedules sheet; `sources`, `batteries` and `backup` stand together on the schedule of the backup. */
export const TABLE_IDS = ['ways', 'cables', 'loads', 'backup', 'sources', 'batteries', 'designations'] as const;
export type TableId = (typeof TABLE_IDS)[number];

/** The schedules as a person turns to them. */
export const SCHEDULES = ['ways', 'cables', 'loads', 'backup', 'designations'] as const;
export type ScheduleId = (typeof SCHEDULES)[number];

/** Which tables stand on a schedule, in order. */
export const TABLES_OF: Record<ScheduleId, readonly TableId[]> = {
  ways: ['ways'],
  cables: ['cables'],
  loads: ['loads'],
  backup: ['sources', 'batteries', 'backup'],
  designations: ['designations'],
};

/** The field of the drawing that a cell writes: of one part or cable, or of all the runs that a way's cell stands for. */
export interface FieldRef {
  of: 'part' | 'cable';
  ids: readonly string[];
  field: FieldId;
}

/** A cell that is typed into; its text is read from the document, so that it is never older than the drawing. */
export interface TypedCell {
  field: FieldRef;
  /** printed in grey behind the text: what the cell leaves out ("+1.5") */
  more?: string;
}

/** A cell that is worked out. */
export interface FigureCell {
  text: string;
  /** unrounded, for files; the text where left out */
  value?: number | null;
  /** why there is no figure, and what it waits for: "Iz needs how it is laid" */
  lacks?: string;
  /** the figure is beyond its limit */
  beyond?: boolean;
}

export type Cell = TypedCell | FigureCell;
export const isTyped = (cell: Cell): cell is TypedCell => 'field' in cell;

export interface Column {
  id: string;
  /** two lines of heading: what, and its unit */
  name: string;
  unit?: string;
  /** read to a screen reader where the heading is too short */
  spoken?: string;
  /** ch, of the widest text that is to be seen whole */
  width: number;
  right?: boolean;
  /** on a narrow sheet: `stays` is always there, the others are turned to page by page */
  page: 'stays' | string;
  /** on a phone, the page of a column that stays on a wider sheet */
  phone?: string;
  /** left out on a sheet that is just too narrow for all columns: another column tells the same, or it can wait */
  roomy?: boolean;
  /** only in files: the screen says it elsewhere */
  fileOnly?: boolean;
}

export interface Row {
  id: string;
  /** as commands and screen readers say it: "Way 4" */
  name: string;
  /** number in the ring at the left edge, of a way */
  number?: number;
  /** rows of one group stand together */
  group: string;
  /** the part taken in hand on the drawing */
  part: string | null;
  /** what the row stands for: findings that name any of these are its findings */
  parts: readonly string[];
  wires: readonly string[];
  /** the way whose curves are drawn while the row is in hand */
  way: string | null;
  cells: Readonly<Record<string, Cell>>;
}

export interface Table {
  id: TableId;
  /** "Schedule of ways" */
  title: string;
  /** many of them: "ways" */
  noun: string;
  columns: readonly Column[];
  rows: readonly Row[];
  /** said where there is no row */
  empty: string;
}
