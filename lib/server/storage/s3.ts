import 'server-only';
import { DeleteObjectCommand, GetObjectCommand, NoSuchKey, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import type { StorageDriver } from '@/lib/server/storage/driver';

interface Bucket {
  S3_BUCKET: string;
  S3_REGION: string;
  S3_ENDPOINT?: string;
  S3_ACCESS_KEY_ID?: string;
  S3_SECRET_ACCESS_KEY?: string;
}

const RETRIES = 3;
const TIMEOUT_MS = 15_000;

/** Objects of a bucket that nobody else can read: they leave it only through this server, which asks who wants them. */
export function s3Driver(bucket: Bucket): StorageDriver {
  const { S3_BUCKET: Bucket, S3_REGION, S3_ENDPOINT, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = bucket;
  const client = new S3Client({
    region: S3_REGION,
    maxAttempts: RETRIES,
    // Servers other than the first maker's do not know the newer checksums and keep their framing in the object.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    ...(S3_ENDPOINT && { endpoint: S3_ENDPOINT, forcePathStyle: true }),
    ...(S3_ACCESS_KEY_ID &&
      S3_SECRET_ACCESS_KEY && {
        credentials: { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY },
      }),
  });
  const within = () => ({ abortSignal: AbortSignal.timeout(TIMEOUT_MS) });
  return {
    async put(Key, bytes, ContentType) {
      await client.send(new PutObjectCommand({ Bucket, Key, Body: bytes, ContentType }), within());
    },
    async get(Key) {
      try {
        const { Body } = await client.send(new GetObjectCommand({ Bucket, Key }), within());
        return Body ? Buffer.from(await Body.transformToByteArray()) : null;
      } catch (error) {
        if (error instanceof NoSuchKey) return null;
        throw error;
      }
    },
    async remove(Key) {
      await client.send(new DeleteObjectCommand({ Bucket, Key }), within());
    },
  };
}
