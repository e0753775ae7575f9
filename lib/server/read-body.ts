import 'server-only';
import { AppError } from '@/lib/server/errors';

const tooLarge = (maxBytes: number) =>
  new AppError('too-large', `This is more than the ${Math.floor(maxBytes / 1024)} kB that are taken at once.`);

/** A key that would reach an object's prototype has no business in any body; a schema would drop it in silence. */
function refuseReserved(this: unknown, key: string, value: unknown): unknown {
  if (key === '__proto__')
    throw new AppError('invalid', 'A name in the request is reserved.', {
      fields: { [key]: 'This name is reserved.' },
    });
  return value;
}

/**
 * The body of a request, refused before more than `maxBytes` of it are kept.
 * @throws AppError too-large
 */
export async function readBytes(request: Request, maxBytes: number): Promise<Buffer> {
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes) throw tooLarge(maxBytes);
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of request.body ?? []) {
    bytes += chunk.byteLength;
    if (bytes > maxBytes) throw tooLarge(maxBytes);
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}

/**
 * The JSON body of a request.
 * @throws AppError too-large or invalid
 */
export async function readJson(request: Request, maxBytes: number): Promise<unknown> {
  const text = (await readBytes(request, maxBytes)).toString('utf8');
  try {
    return JSON.parse(text, text.includes('__proto__') ? refuseReserved : undefined) as unknown;
  } catch (error) {
    if (error instanceof AppError) throw error;
    throw new AppError('invalid', 'The request is not JSON.');
  }
}
