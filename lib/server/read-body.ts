import 'server-only';
import { AppError } from '@/lib/server/errors';

const tooLarge = (maxBytes: number) =>
  new AppError('too-large', `This is more than the ${Math.floor(maxBytes / 1024)} kB that are taken at once.`);

/**
 * The JSON body of a request, refused before more than `maxBytes` of it are kept.
 * @throws AppError too-large or invalid
 */
export async function readJson(request: Request, maxBytes: number): Promise<unknown> {
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes) throw tooLarge(maxBytes);
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of request.body ?? []) {
    bytes += chunk.byteLength;
    if (bytes > maxBytes) throw tooLarge(maxBytes);
    chunks.push(chunk);
  }
  try {
    return JSON.parse(Buffer.concat(chunks).toString('utf8')) as unknown;
  } catch {
    throw new AppError('invalid', 'The request is not JSON.');
  }
}
