import { z } from 'zod';
import { IdSchema } from '@/diagram/document/schema';

/** Types a browser may send, as the content says them. */
export const PICTURE_TYPES = ['image/jpeg', 'image/png', 'image/webp'] as const;
export type PictureType = (typeof PICTURE_TYPES)[number];

/** bytes of one picture as it is sent */
export const MOST_PICTURE_BYTES = 10_000_000;
/** pictures of one job, removed ones not counted */
export const MOST_PICTURES = 80;

export const SUBJECTS = ['board', 'meter', 'room', 'plan', 'other'] as const;
export type Subject = (typeof SUBJECTS)[number];

export const UploadParams = z.object({ uploadId: z.uuid() });

const caption = z.string().trim().max(200);

/** What is said of a picture as it is sent; the picture itself is the body. */
export const UploadQuerySchema = z
  .object({
    /** made by the window; a retry with the same one is answered, not stored again */
    id: z.uuid(),
    subject: z.enum(SUBJECTS).default('other'),
    /** id of a room of the drawing */
    place: IdSchema.optional(),
    caption: caption.default(''),
  })
  .refine(({ place, subject }) => !place || subject === 'room', { path: ['place'], message: 'Only a room has a place.' });
export type UploadQuery = z.infer<typeof UploadQuerySchema>;

export const UploadPatchSchema = z
  .strictObject({
    caption: caption.optional(),
    subject: z.enum(SUBJECTS).optional(),
    /** given together with the subject */
    place: IdSchema.nullable().optional(),
    /** true takes it from the list; false brings it back */
    removed: z.boolean().optional(),
  })
  .refine(({ place, subject }) => !place || subject === 'room', { path: ['place'], message: 'Only a room has a place.' });
export type UploadPatch = z.infer<typeof UploadPatchSchema>;

export const UploadSizeSchema = z.object({ size: z.enum(['large', 'small']).default('large') });

/** Where the bytes of a picture are. */
export const pictureHref = (uploadId: string, size: 'large' | 'small' = 'large') =>
  `/api/uploads/${uploadId}?size=${size}`;

export interface UploadView {
  id: string;
  subject: Subject;
  place: string | null;
  caption: string;
  /** px */
  width: number;
  height: number;
  by: { name: string; initials: string };
  /** ISO 8601, UTC */
  at: string;
  removed: boolean;
}

export interface UploadList {
  uploads: UploadView[];
  /** the person who asks may add, name and remove */
  mayEdit: boolean;
}
