import { createHash } from 'node:crypto';
import { DeleteObjectCommand, GetObjectCommand, NoSuchKey, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { env } from '@/lib/env';
import { Problem } from '@/lib/errors';

let client: S3Client | undefined;

function s3(): S3Client {
  client ??= new S3Client({
    endpoint: env().S3_ENDPOINT,
    region: env().S3_REGION,
    credentials: { accessKeyId: env().S3_ACCESS_KEY_ID, secretAccessKey: env().S3_SECRET_ACCESS_KEY },
    forcePathStyle: true,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 2,
    requestHandler: { connectionTimeout: 1500, requestTimeout: 8000 },
  });
  return client;
}

const notAnswering = (kept: string) =>
  new Problem('unavailable', `The file store is not answering. ${kept}`, {
    reason: 'file-store',
    retryAfterSeconds: 10,
  });

export const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

export async function putFile(key: string, bytes: Uint8Array, contentType: string): Promise<void> {
  try {
    await s3().send(
      new PutObjectCommand({
        Bucket: env().S3_BUCKET,
        Key: key,
        Body: bytes,
        ContentType: contentType,
        ContentMD5: createHash('md5').update(bytes).digest('base64'),
      }),
    );
  } catch (error) {
    throw Object.assign(notAnswering('Nothing was saved; the file is still with you. Try again in a minute.'), {
      cause: error,
    });
  }
}

/** Bytes whose hash differs from the one taken at upload are never handed on. */
export async function getFile(key: string, expectedSha256: string): Promise<Uint8Array> {
  let bytes: Uint8Array;
  try {
    const answer = await s3().send(new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
    if (!answer.Body) throw new Error('no body');
    bytes = await answer.Body.transformToByteArray();
  } catch (error) {
    if (error instanceof NoSuchKey) throw new Problem('not-found', 'The file is no longer in the store.');
    throw Object.assign(notAnswering('The numbers are safe; the page itself can be shown later.'), { cause: error });
  }
  if (sha256(bytes) !== expectedSha256) {
    throw new Problem('unavailable', 'The file store gave back other bytes than were stored, so they are not used.', {
      reason: 'file-changed',
    });
  }
  return bytes;
}

/** Where the cells of a workbook stand as plain text, beside the workbook itself. */
export const cellsKey = (fileKey: string): string => `${fileKey}.cells.json`;

/** What was made of a file and can be made again: it has no hash of its own. Null when there is none. */
export async function getMade(key: string): Promise<Uint8Array | null> {
  try {
    const answer = await s3().send(new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
    return (await answer.Body?.transformToByteArray()) ?? null;
  } catch (error) {
    if (error instanceof NoSuchKey) return null;
    throw Object.assign(notAnswering('The numbers are safe; the page itself can be shown later.'), { cause: error });
  }
}

export async function deleteFile(key: string): Promise<void> {
  await s3().send(new DeleteObjectCommand({ Bucket: env().S3_BUCKET, Key: key }));
}
