import 'server-only';
import { env } from '@/lib/server/env';
import { diskDriver } from '@/lib/server/storage/disk';
import { s3Driver } from '@/lib/server/storage/s3';

/** Where files lie. Keys are the server's own, never made of what somebody typed. */
export interface StorageDriver {
  put(key: string, bytes: Buffer, type: string): Promise<void>;
  /** null where there is none */
  get(key: string): Promise<Buffer | null>;
  /** Taking away what is not there is no error. */
  remove(key: string): Promise<void>;
}

let chosen: StorageDriver | undefined;

/** A folder of this machine, or a bucket where the environment names one. */
export function storage(): StorageDriver {
  const { S3_BUCKET, UPLOADS_FOLDER } = env();
  return (chosen ??= S3_BUCKET ? s3Driver(env() as Parameters<typeof s3Driver>[0]) : diskDriver(UPLOADS_FOLDER));
}
