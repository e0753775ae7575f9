import 'server-only';
import type { Actor } from '@/lib/server/actor';
import { missing } from '@/lib/server/errors';
import { log } from '@/lib/server/log';
import { storage } from '@/lib/server/storage/driver';
import { findUpload } from '@/lib/server/uploads/find-upload';
import { STORED_TYPE, keyOf } from '@/lib/server/uploads/keys';
import { FILE_POLICY } from '@/lib/shared/file-policy';

/** s a browser may show the picture again without asking: a lost right bites within it */
const CACHE_S = 60;

/**
 * The bytes of a picture. They were written by this server and are of one harmless type; opened by its address it can
 * still do nothing. A removed one is given until it is swept, so that taking the removal back shows it again.
 */
export async function readUpload(actor: Actor, id: string, size: 'large' | 'small'): Promise<Response> {
  const upload = await findUpload(actor, id, 'picture.read');
  const bytes = await storage().get(keyOf(upload, size));
  if (!bytes) {
    log('upload.lost', { id, size });
    throw missing('picture');
  }
  return new Response(new Uint8Array(bytes), {
    headers: {
      'content-type': STORED_TYPE,
      'content-length': String(bytes.length),
      'content-disposition': `inline; filename="${upload.id}.webp"`,
      'content-security-policy': FILE_POLICY,
      'cache-control': `private, max-age=${CACHE_S}, must-revalidate`,
      'x-content-type-options': 'nosniff',
      vary: 'cookie',
    },
  });
}
