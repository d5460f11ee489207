import { createHash } from 'node:crypto';
import { authorization } from './signature.mjs';

/** Makes the bucket through the S3 protocol itself, so that it serves the fake and a real store alike, with nothing installed. */
export async function createBucket(env) {
  const url = new URL(`/${env.S3_BUCKET}`, env.S3_ENDPOINT);
  const date = new Date().toISOString().replace(/[-:]|\.\d+/g, '');
  const payloadHash = createHash('sha256').update('').digest('hex');
  const headers = { host: url.host, 'x-amz-content-sha256': payloadHash, 'x-amz-date': date };
  const signed = authorization({
    method: 'PUT',
    url: url.pathname,
    headers,
    payloadHash,
    accessKeyId: env.S3_ACCESS_KEY_ID,
    secretAccessKey: env.S3_SECRET_ACCESS_KEY,
    region: env.S3_REGION,
  });
  const response = await fetch(url, { method: 'PUT', headers: { ...headers, authorization: signed } });
  const text = await response.text();
  if (!response.ok && !text.includes('BucketAlreadyOwnedByYou')) {
    throw new Error(
      `The store at ${env.S3_ENDPOINT} did not make the bucket ${env.S3_BUCKET}: ${response.status} ${text}`,
    );
  }
}
