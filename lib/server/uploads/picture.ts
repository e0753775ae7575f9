import 'server-only';
import sharp from 'sharp';
import { AppError } from '@/lib/server/errors';
import type { PictureType } from '@/lib/shared/uploads';

/** px: more would take more memory than a picture is worth */
const MOST_PIXELS = 64_000_000;
/** px, the longer side */
const LARGE = 3000;
const SMALL = 480;
const TIMEOUT_S = 15;
const MOST_WAITING = 20;

// Of all that the decoder can read, three kinds are let in; none of the others is ever tried.
sharp.block({ operation: ['VipsForeignLoad'] });
sharp.unblock({
  operation: ['VipsForeignLoadJpegBuffer', 'VipsForeignLoadPngBuffer', 'VipsForeignLoadWebpBuffer'],
});
sharp.cache(false);
sharp.concurrency(1);

const ascii = (bytes: Buffer, from: number, to: number) => bytes.toString('latin1', from, to);

/** What a file is by its first bytes; null where it is none of the kinds we know. */
export function kindOf(bytes: Buffer): PictureType | 'heic' | null {
  if (bytes.length > 3 && bytes[0] === 0xff && bytes[1] === 0xd8 && bytes[2] === 0xff) return 'image/jpeg';
  if (ascii(bytes, 0, 8) === '\x89PNG\r\n\x1a\n') return 'image/png';
  if (ascii(bytes, 0, 4) === 'RIFF' && ascii(bytes, 8, 12) === 'WEBP') return 'image/webp';
  if (ascii(bytes, 4, 8) === 'ftyp' && /^(hei|hev|mif1|msf1|avif)/.test(ascii(bytes, 8, 12))) return 'heic';
  return null;
}

const refuse = (message: string) => new AppError('invalid', message, { fields: { picture: message } });

/**
 * The type of a picture, decided by its content.
 * @throws AppError invalid, in words, for what is no picture we read or calls itself another
 */
export function checkKind(bytes: Buffer, claimed: string): PictureType {
  const kind = kindOf(bytes);
  if (kind === 'heic')
    throw refuse(
      'This is a HEIC picture, which cannot be read here. Send it as JPEG: on the phone, set the camera to the most compatible format, or share the picture as JPEG.',
    );
  if (!kind) throw refuse('This is no picture that can be read here. JPEG, PNG and WebP can.');
  if (kind !== claimed)
    throw refuse(`The file calls itself ${claimed.replace('image/', '') || 'nothing'} and is ${kind.replace('image/', '')}. Give it its right ending.`);
  return kind;
}

export interface Pictures {
  /** px of the large one */
  width: number;
  height: number;
  large: Buffer;
  small: Buffer;
}

async function encode(bytes: Buffer, kind: PictureType): Promise<Pictures> {
  const quality = kind === 'image/png' ? 92 : 84; // a plan is thin lines: they show the losses first
  const { data: large, info } = await sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error' })
    .autoOrient()
    .resize({ width: LARGE, height: LARGE, fit: 'inside', withoutEnlargement: true })
    .flatten({ background: '#ffffff' })
    .webp({ quality })
    .timeout({ seconds: TIMEOUT_S })
    .toBuffer({ resolveWithObject: true });
  const small = await sharp(large)
    .resize({ width: SMALL, height: SMALL, fit: 'inside', withoutEnlargement: true })
    .webp({ quality: 80 })
    .timeout({ seconds: TIMEOUT_S })
    .toBuffer();
  return { width: info.width, height: info.height, large, small };
}

/** A stored picture as JPEG, which paper formats carry as it is. */
export const asJpeg = (stored: Buffer): Promise<Buffer> =>
  sharp(stored, { limitInputPixels: MOST_PIXELS })
    .flatten({ background: '#ffffff' })
    .jpeg({ quality: 88 })
    .timeout({ seconds: TIMEOUT_S })
    .toBuffer();

let last: Promise<unknown> = Promise.resolve();
let waiting = 0;

/**
 * The picture read and written anew, upright, in two sizes, as WebP. Nothing of the file that was sent remains: no place
 * where it was taken, no words, no second file hidden in it. One at a time: a decoded picture is large.
 * @throws AppError invalid where it cannot be read, too-many where many wait already
 */
export async function readPicture(bytes: Buffer, kind: PictureType): Promise<Pictures> {
  if (waiting >= MOST_WAITING)
    throw new AppError('too-many', 'Many pictures arrive at this moment. Send it again in a little while.', { wait: 10 });
  waiting += 1;
  const turn = last.then(() => encode(bytes, kind));
  last = turn.catch(() => undefined);
  try {
    return await turn;
  } catch (error) {
    const message = error instanceof Error ? error.message : '';
    if (/pixel limit|exceeds/i.test(message))
      throw refuse(`This picture has more than ${MOST_PIXELS / 1e6} million points. Make it smaller and send it again.`);
    throw refuse('This picture is damaged: it cannot be read to its end. Take or export it again.');
  } finally {
    waiting -= 1;
  }
}
