import type { Answer } from '@/lib/shared/api-client';
import type { ErrorAnswer } from '@/lib/shared/errors';
import { MOST_PICTURE_BYTES, type Subject, type UploadView } from '@/lib/shared/uploads';

/** What a picture shows: a subject, or a room of the drawing. */
export interface Shows {
  subject: Subject;
  place?: string;
}

const refusal = (message: string, error: ErrorAnswer['error'] = 'failed'): Answer<UploadView> => ({
  ok: false,
  offline: error === 'failed',
  refusal: { error, message },
});

/** px: what the server keeps of a picture at most */
const LARGE = 3000;

/** A picture that is larger than the server takes, made smaller here; null where this browser cannot read it. */
async function smaller(file: Blob): Promise<Blob | null> {
  try {
    const bitmap = await createImageBitmap(file);
    const scale = Math.min(1, LARGE / Math.max(bitmap.width, bitmap.height));
    const canvas = new OffscreenCanvas(Math.round(bitmap.width * scale), Math.round(bitmap.height * scale));
    canvas.getContext('2d')!.drawImage(bitmap, 0, 0, canvas.width, canvas.height);
    bitmap.close();
    return await canvas.convertToBlob({ type: 'image/jpeg', quality: 0.9 });
  } catch {
    // Not a picture, or one this browser knows nothing of: the server says in words what it is.
    return null;
  }
}

/** Sends one picture to a job. The same id sent again is answered, not stored twice. */
export async function sendPicture(jobId: string, id: string, file: File, shows: Shows): Promise<Answer<UploadView>> {
  const body = file.size > MOST_PICTURE_BYTES ? await smaller(file) : file;
  if (!body || body.size > MOST_PICTURE_BYTES)
    return refusal('This file is larger than 10 MB and cannot be made smaller here.', 'too-large');
  const query = new URLSearchParams({ id, ...shows });
  let response: Response;
  try {
    response = await fetch(`/api/jobs/${jobId}/uploads?${query}`, {
      method: 'POST',
      headers: { 'content-type': body.type || 'application/octet-stream' },
      body,
    });
  } catch {
    return refusal('Not sent: the server did not answer. The picture is still here; try again when the network is back.');
  }
  const data = (await response.json().catch(() => null)) as UploadView | ErrorAnswer | null;
  if (data && 'error' in data) return { ok: false, offline: false, refusal: data };
  if (!data || !response.ok) return refusal('Not sent: the server answered with something else. Try again in a moment.');
  return { ok: true, data };
}
