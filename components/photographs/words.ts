import type { Installation } from '@/diagram/document/schema';
import type { Subject, UploadView } from '@/lib/shared/uploads';
import type { Shows } from './picture-api';

export const SUBJECT_WORDS: Record<Exclude<Subject, 'room'>, string> = {
  board: 'Board',
  meter: 'Meter',
  plan: 'Floor plan',
  other: 'Something else',
};

type Places = Installation['places'];

/** What a picture shows, in words: "Board", "Study". */
export function showsWords({ subject, place }: Pick<UploadView, 'subject' | 'place'>, places: Places): string {
  if (subject !== 'room') return SUBJECT_WORDS[subject];
  return places.find(({ id }) => id === place)?.name ?? 'A room';
}

/** What an image is called for whoever does not see it. */
export const altOf = (upload: UploadView, places: Places): string =>
  upload.caption || `Photograph: ${showsWords(upload, places).toLowerCase()}`;

/** What can be chosen for a picture, as a value of a select and back. */
export const showsOptions = (places: Places) => [
  { value: 'board', label: 'Board' },
  { value: 'meter', label: 'Meter' },
  ...places.map(({ id, name }) => ({ value: `room:${id}`, label: name })),
  { value: 'plan', label: 'Floor plan' },
  { value: 'other', label: 'Something else' },
];
export const showsValue = ({ subject, place }: Pick<UploadView, 'subject' | 'place'>): string =>
  subject === 'room' ? (place ? `room:${place}` : 'other') : subject;
export const showsOf = (value: string): Shows =>
  value.startsWith('room:') ? { subject: 'room', place: value.slice(5) } : { subject: value as Subject };
