import { z } from 'zod';
import { PatchSchema, type Patch } from '@/diagram/document/patch';
import { IdSchema, type DocumentError, type Installation } from '@/diagram/document/schema';
import { TABLE_IDS } from '@/diagram/schedules/types';

/** Requests and answers of the drawing routes; the same schema serves the screen and the handler. */

export const uuid = z.uuid();
export const DrawingParams = z.object({ drawingId: uuid });

/** One saved command: what was done, in words and as data. */
export const ChangeSchema = z.strictObject({
  /** made by the window that drew it; a retry with the same id is answered, not applied again */
  saveId: uuid,
  /** the revision the change starts from */
  base: z.int().nonnegative(),
  /** "Move Study fan to backup": what history shows */
  label: z.string().min(1).max(160),
  patch: PatchSchema,
});
export type Change = z.infer<typeof ChangeSchema>;

export interface SavedChange {
  rev: number;
  saveId: string;
  label: string;
  patch: Patch;
  /** who made it */
  person: { id: string; name: string; initials: string };
  /** ISO 8601, UTC */
  at: string;
}

/** What the person who asks may do with a drawing. */
export interface DrawingRights {
  edit: boolean;
  /** record a revision */
  record: boolean;
}

export interface DrawingView {
  id: string;
  jobId: string;
  rev: number;
  document: Installation;
  state: 'open' | 'submitted' | 'issued';
  rights: DrawingRights;
  /** what of the stored drawing could not be read; absent where it is whole. It is then open for reading only */
  problems?: readonly DocumentError[];
  /** for the title block */
  titleBlock: TitleBlock;
}

export interface TitleBlock {
  number: string;
  title: string;
  client: string;
  address: string;
  team: string;
  drawnBy: string;
  /** ISO date of the newest change */
  drawnOn: string;
  checkedBy: string | null;
  /** letter of the newest recorded revision, or "-" */
  revision: string;
  state: string;
}

/** 200: saved (or had been saved before). */
export interface SaveAnswer {
  rev: number;
}

/** 409: somebody saved meanwhile. The client rebases, or asks when the same things were touched. */
export interface StaleAnswer {
  error: 'stale';
  message: string;
  rev: number;
  since: SavedChange[];
}

/** Which sheet is to be printed. */
export const SheetQuerySchema = z.object({
  face: z.enum(['overview', 'connections', 'all']).default('overview'),
  paper: z.enum(['A4', 'A3', 'A2', 'A1']).default('A3'),
  /** id of a room: its page of the connections */
  place: IdSchema.optional(),
  /** one sheet of several, for formats that hold one page; from 1 */
  sheet: z.coerce.number().int().min(1).max(500).default(1),
  /** letters as text in the shipped font, or as shapes that look the same in any program */
  lettering: z.enum(['text', 'outlines']).default('text'),
});
export type SheetQuery = z.infer<typeof SheetQuerySchema>;

/** The same with the plans of the storeys, which are printed over their pictures. */
export const PdfQuerySchema = SheetQuerySchema.extend({
  face: z.enum(['overview', 'connections', 'all', 'plan']).default('overview'),
  /** id of one plan; all storeys where left out */
  storey: IdSchema.optional(),
});

/** Which table of the schedules is asked for as a file. */
export const TableQuerySchema = z.object({ table: z.enum(TABLE_IDS).default('ways') });

export const RevisionSchema = z.strictObject({
  note: z.string().trim().min(1, 'say in a few words what this revision is').max(200),
});

export interface RevisionView {
  id: string;
  /** A, B, C ... */
  letter: string;
  rev: number;
  note: string;
  state: 'draft' | 'submitted' | 'returned' | 'approved' | 'issued';
  /** sha256 of the frozen document */
  hash: string;
  by: string;
  at: string;
}
