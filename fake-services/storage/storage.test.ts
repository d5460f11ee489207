import { createHash } from 'node:crypto';
import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import {
  CopyObjectCommand,
  CreateBucketCommand,
  DeleteObjectCommand,
  DeleteObjectsCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
  type S3ClientConfig,
} from '@aws-sdk/client-s3';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { startStorage } from './server.mjs';

const KEYS = { accessKeyId: 'LOAMTEST', secretAccessKey: 'a-secret-for-this-test-only' };
const region = 'eu-central-1';
const Bucket = 'loamline';
let folder: string;
let store: Awaited<ReturnType<typeof startStorage>>;
let s3: S3Client;

function clientOf(changes: Partial<S3ClientConfig> = {}): S3Client {
  return new S3Client({
    endpoint: store.url,
    region,
    credentials: KEYS,
    forcePathStyle: true,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    ...changes,
  });
}

const md5 = (bytes: Buffer, encoding: 'hex' | 'base64') => createHash('md5').update(bytes).digest(encoding);

async function refusalOf(answer: Promise<unknown>): Promise<{ name: string; status: number | undefined }> {
  try {
    await answer;
  } catch (error) {
    const { name, $metadata } = error as { name: string; $metadata?: { httpStatusCode?: number } };
    return { name, status: $metadata?.httpStatusCode };
  }
  throw new Error('the store accepted what it should have refused');
}

async function bytesOf(Key: string, client = s3): Promise<Buffer> {
  const { Body } = await client.send(new GetObjectCommand({ Bucket, Key }));
  return Buffer.from((await Body?.transformToByteArray()) ?? []);
}

async function control(orders: Record<string, unknown>): Promise<void> {
  const answer = await fetch(`${store.url}/_control`, { method: 'POST', body: JSON.stringify(orders) });
  expect(answer.status).toBe(200);
}

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'store-'));
  store = await startStorage({ folder, port: 0, region, ...KEYS });
  s3 = clientOf();
  await s3.send(new CreateBucketCommand({ Bucket }));
});
afterAll(async () => {
  await store.close();
  await rm(folder, { recursive: true });
});
beforeEach(() => fetch(`${store.url}/_control`, { method: 'DELETE' }));

describe('buckets', () => {
  it('knows the one it has, refuses to make it twice, and does not know another', async () => {
    await s3.send(new HeadBucketCommand({ Bucket }));
    expect(await refusalOf(s3.send(new CreateBucketCommand({ Bucket })))).toEqual({
      name: 'BucketAlreadyOwnedByYou',
      status: 409,
    });
    expect((await refusalOf(s3.send(new HeadBucketCommand({ Bucket: 'other' })))).status).toBe(404);
    expect((await refusalOf(s3.send(new PutObjectCommand({ Bucket: 'other', Key: 'a', Body: 'x' })))).name).toBe(
      'NoSuchBucket',
    );
    expect((await refusalOf(s3.send(new CreateBucketCommand({ Bucket: 'Not_A_Name' })))).name).toBe(
      'InvalidBucketName',
    );
  });
});

describe('objects', () => {
  it('gives back bytes, type, disposition and metadata as they were put, with the MD5 as ETag', async () => {
    const body = Buffer.from([...Array(70_000).keys()].map((each) => each % 256));
    const put = await s3.send(
      new PutObjectCommand({
        Bucket,
        Key: 'site/1/report é +&.pdf',
        Body: body,
        ContentType: 'application/pdf',
        ContentDisposition: 'attachment; filename="report.pdf"',
        Metadata: { sha256: 'abc' },
      }),
    );
    expect(put.ETag).toBe(`"${md5(body, 'hex')}"`);
    const got = await s3.send(new GetObjectCommand({ Bucket, Key: 'site/1/report é +&.pdf' }));
    expect(Buffer.from((await got.Body?.transformToByteArray()) ?? [])).toEqual(body);
    expect(got).toMatchObject({
      ContentType: 'application/pdf',
      ContentDisposition: 'attachment; filename="report.pdf"',
      ContentLength: 70_000,
      Metadata: { sha256: 'abc' },
    });
    const head = await s3.send(new HeadObjectCommand({ Bucket, Key: 'site/1/report é +&.pdf' }));
    expect(head).toMatchObject({ ContentLength: 70_000, ETag: put.ETag });
  });

  it('overwrites, keeps the new bytes only, and keeps them over a restart', async () => {
    await s3.send(new PutObjectCommand({ Bucket, Key: 'twice', Body: 'first' }));
    await s3.send(new PutObjectCommand({ Bucket, Key: 'twice', Body: 'second' }));
    // What a store killed in mid-write leaves behind: bytes that nothing names.
    await writeFile(path.join(folder, Bucket, 'orphan.bytes'), 'half');
    await store.close();
    store = await startStorage({ folder, port: 0, region, ...KEYS });
    s3 = clientOf();
    expect((await bytesOf('twice')).toString()).toBe('second');
    expect(await readdir(path.join(folder, Bucket))).not.toContain('orphan.bytes');
  });

  it('answers ranges as HTTP asks', async () => {
    await s3.send(new PutObjectCommand({ Bucket, Key: 'ten', Body: '0123456789' }));
    const range = async (Range: string) => {
      const got = await s3.send(new GetObjectCommand({ Bucket, Key: 'ten', Range }));
      return [await got.Body?.transformToString(), got.ContentRange];
    };
    expect(await range('bytes=2-4')).toEqual(['234', 'bytes 2-4/10']);
    expect(await range('bytes=7-')).toEqual(['789', 'bytes 7-9/10']);
    expect(await range('bytes=-3')).toEqual(['789', 'bytes 7-9/10']);
    expect(await range('bytes=8-99')).toEqual(['89', 'bytes 8-9/10']);
    expect(await refusalOf(range('bytes=10-'))).toEqual({ name: 'InvalidRange', status: 416 });
  });

  it('holds empty objects', async () => {
    await s3.send(new PutObjectCommand({ Bucket, Key: 'empty', Body: '' }));
    expect(await bytesOf('empty')).toHaveLength(0);
  });

  it('keeps conditions: put only when absent, get only when changed', async () => {
    await s3.send(new PutObjectCommand({ Bucket, Key: 'once', Body: 'a', IfNoneMatch: '*' }));
    expect(
      await refusalOf(s3.send(new PutObjectCommand({ Bucket, Key: 'once', Body: 'b', IfNoneMatch: '*' }))),
    ).toEqual({
      name: 'PreconditionFailed',
      status: 412,
    });
    expect((await bytesOf('once')).toString()).toBe('a');
    const IfNoneMatch = `"${md5(Buffer.from('a'), 'hex')}"`;
    expect((await refusalOf(s3.send(new GetObjectCommand({ Bucket, Key: 'once', IfNoneMatch })))).status).toBe(304);
  });

  it('deletes one, many, and what is not there', async () => {
    for (const Key of ['d/1', 'd/2', 'd/3 <&>']) await s3.send(new PutObjectCommand({ Bucket, Key, Body: Key }));
    await s3.send(new DeleteObjectCommand({ Bucket, Key: 'd/1' }));
    await s3.send(new DeleteObjectCommand({ Bucket, Key: 'd/1' }));
    expect(await refusalOf(bytesOf('d/1'))).toEqual({ name: 'NoSuchKey', status: 404 });
    const many = await s3.send(
      new DeleteObjectsCommand({
        Bucket,
        Delete: { Objects: [{ Key: 'd/2' }, { Key: 'd/3 <&>' }, { Key: 'd/none' }] },
      }),
    );
    expect(many.Deleted?.map(({ Key }) => Key)).toEqual(['d/2', 'd/3 <&>', 'd/none']);
    const left = await s3.send(new ListObjectsV2Command({ Bucket, Prefix: 'd/' }));
    expect(left.KeyCount).toBe(0);
  });
});

describe('listing', () => {
  it('pages with tokens in byte order, by prefix, from a key, and by folders', async () => {
    const keys = ['l/B', 'l/a/1', 'l/a/2', 'l/b c', 'l/é', 'l/z&<'];
    for (const Key of [...keys].reverse()) await s3.send(new PutObjectCommand({ Bucket, Key, Body: 'x' }));
    const seen: (string | undefined)[] = [];
    let ContinuationToken: string | undefined;
    let pages = 0;
    do {
      const page = await s3.send(
        new ListObjectsV2Command({
          Bucket,
          Prefix: 'l/',
          MaxKeys: 2,
          ...(ContinuationToken ? { ContinuationToken } : {}),
        }),
      );
      expect(page.IsTruncated).toBe(page.NextContinuationToken !== undefined);
      seen.push(...(page.Contents ?? []).map(({ Key }) => Key));
      ContinuationToken = page.NextContinuationToken;
      pages += 1;
    } while (ContinuationToken !== undefined);
    expect(pages).toBe(3);
    expect(seen).toEqual(['l/B', 'l/a/1', 'l/a/2', 'l/b c', 'l/z&<', 'l/é']);
    const from = await s3.send(new ListObjectsV2Command({ Bucket, Prefix: 'l/', StartAfter: 'l/b c' }));
    expect(from.Contents?.map(({ Key }) => Key)).toEqual(['l/z&<', 'l/é']);
    const folders = await s3.send(new ListObjectsV2Command({ Bucket, Prefix: 'l/', Delimiter: '/' }));
    expect(folders.CommonPrefixes?.map(({ Prefix }) => Prefix)).toEqual(['l/a/']);
    expect(folders.Contents?.map(({ Key }) => Key)).toEqual(['l/B', 'l/b c', 'l/z&<', 'l/é']);
  });

  it('refuses a token it never gave', async () => {
    const answer = s3.send(new ListObjectsV2Command({ Bucket, ContinuationToken: '***' }));
    expect((await refusalOf(answer)).name).toBe('InvalidArgument');
  });
});

describe('who may call', () => {
  it('refuses the anonymous, a wrong secret, an unknown key, another region and an old signature', async () => {
    await s3.send(new PutObjectCommand({ Bucket, Key: 'private', Body: 'x' }));
    expect((await fetch(`${store.url}/${Bucket}/private`)).status).toBe(403);
    const get = () => new GetObjectCommand({ Bucket, Key: 'private' });
    const wrong = clientOf({ credentials: { ...KEYS, secretAccessKey: 'another' } });
    expect(await refusalOf(wrong.send(get()))).toEqual({ name: 'SignatureDoesNotMatch', status: 403 });
    const unknown = clientOf({ credentials: { ...KEYS, accessKeyId: 'NOBODY' } });
    expect(await refusalOf(unknown.send(get()))).toEqual({ name: 'InvalidAccessKeyId', status: 403 });
    expect((await refusalOf(clientOf({ region: 'us-west-2' }).send(get()))).status).toBe(400);
    const later = await startStorage({
      folder,
      port: 0,
      region,
      ...KEYS,
      now: () => new Date(Date.now() + 16 * 60_000),
    });
    const late = clientOf({ endpoint: later.url, maxAttempts: 1 });
    expect(await refusalOf(late.send(get()))).toEqual({ name: 'RequestTimeTooSkewed', status: 403 });
    await later.close();
  });

  it('refuses a request whose path, query or signed header was changed after signing', async () => {
    const changed = async (
      change: (request: { path: string; query: Record<string, unknown>; headers: Record<string, string> }) => void,
    ) => {
      const client = clientOf();
      client.middlewareStack.add(
        (next) => (args) => {
          change(args.request as Parameters<typeof change>[0]);
          return next(args);
        },
        { step: 'finalizeRequest', priority: 'low', name: 'tamper' },
      );
      return refusalOf(client.send(new GetObjectCommand({ Bucket, Key: 'private' })));
    };
    const refused = { name: 'SignatureDoesNotMatch', status: 403 };
    expect(await changed((request) => (request.path = `/${Bucket}/twice`))).toEqual(refused);
    expect(await changed((request) => (request.query['response-content-type'] = 'text/html'))).toEqual(refused);
    expect(await changed((request) => (request.headers['x-amz-date'] = '20260101T000000Z'))).toMatchObject({
      status: 403,
    });
    expect(await changed((request) => (request.headers['x-amz-acl'] = 'public-read'))).toMatchObject({ status: 403 });
  });
});

describe('checksums', () => {
  it('takes a right MD5 and refuses a wrong one, with nothing kept', async () => {
    const body = Buffer.from('measured');
    await s3.send(new PutObjectCommand({ Bucket, Key: 'sum', Body: body, ContentMD5: md5(body, 'base64') }));
    const wrong = new PutObjectCommand({
      Bucket,
      Key: 'sum-wrong',
      Body: body,
      ContentMD5: md5(Buffer.from('other'), 'base64'),
    });
    expect(await refusalOf(s3.send(wrong))).toEqual({ name: 'BadDigest', status: 400 });
    expect((await refusalOf(bytesOf('sum-wrong'))).name).toBe('NoSuchKey');
  });

  it('refuses a wrong SHA-256 and a wrong CRC32', async () => {
    const sha = new PutObjectCommand({
      Bucket,
      Key: 's',
      Body: 'x',
      ChecksumSHA256: Buffer.alloc(32).toString('base64'),
    });
    expect((await refusalOf(s3.send(sha))).name).toBe('BadDigest');
    const crc = new PutObjectCommand({ Bucket, Key: 's', Body: 'x', ChecksumCRC32: 'AAAAAA==' });
    expect((await refusalOf(s3.send(crc))).name).toBe('BadDigest');
  });

  it('refuses a body that is not the one that was signed', async () => {
    const client = clientOf({ maxAttempts: 1 });
    client.middlewareStack.add(
      (next) => (args) => {
        (args.request as { body: unknown }).body = 'damaged!';
        return next(args);
      },
      { step: 'finalizeRequest', priority: 'low', name: 'damage' },
    );
    const answer = client.send(new PutObjectCommand({ Bucket, Key: 's', Body: 'original' }));
    expect((await refusalOf(answer)).name).toBe('XAmzContentSHA256Mismatch');
  });

  it('decodes a stream sent in chunks with a trailing CRC32, the default of the SDK', async () => {
    const client = clientOf({
      requestChecksumCalculation: 'WHEN_SUPPORTED',
      responseChecksumValidation: 'WHEN_SUPPORTED',
    });
    const body = Buffer.alloc(200_003, 'soil');
    const Body = Readable.from([body.subarray(0, 65_537), body.subarray(65_537)]);
    await client.send(new PutObjectCommand({ Bucket, Key: 'stream', Body, ContentLength: body.length }));
    expect(await bytesOf('stream', client)).toEqual(body);
    const plain = Readable.from([body]);
    await s3.send(new PutObjectCommand({ Bucket, Key: 'plain-stream', Body: plain, ContentLength: body.length }));
    expect(await bytesOf('plain-stream')).toEqual(body);
  });
});

describe('misbehaving on demand', () => {
  it('fails the next calls, and the SDK gets through by trying again', async () => {
    await control({ fail: 2 });
    await s3.send(new PutObjectCommand({ Bucket, Key: 'retried', Body: 'x' }));
    await control({ fail: 1 });
    const once = clientOf({ maxAttempts: 1 });
    expect(await refusalOf(once.send(new GetObjectCommand({ Bucket, Key: 'retried' })))).toEqual({
      name: 'SlowDown',
      status: 503,
    });
    expect((await bytesOf('retried', once)).toString()).toBe('x');
  });

  it('answers slowly, with wrong bytes, cuts the connection, or loses only the answer', async () => {
    const once = clientOf({ maxAttempts: 1 });
    await once.send(new PutObjectCommand({ Bucket, Key: 'odd', Body: 'right' }));
    await control({ slow: 1, milliseconds: 150 });
    const before = performance.now();
    await bytesOf('odd', once);
    expect(performance.now() - before).toBeGreaterThan(140);
    await control({ garbage: 1 });
    expect((await bytesOf('odd', once)).toString()).toBe('?!?!?');
    await control({ drop: 1, method: 'DELETE' });
    expect((await bytesOf('odd', once)).toString()).toBe('right');
    await expect(once.send(new DeleteObjectCommand({ Bucket, Key: 'odd' }))).rejects.toThrow();
    expect((await bytesOf('odd', once)).toString()).toBe('right');
    await control({ lose: 1 });
    await expect(once.send(new PutObjectCommand({ Bucket, Key: 'odd', Body: 'new' }))).rejects.toThrow();
    expect((await bytesOf('odd', once)).toString()).toBe('new');
  });

  it('refuses orders it does not know', async () => {
    const answer = await fetch(`${store.url}/_control`, { method: 'POST', body: '{"explode":1}' });
    expect(answer.status).toBe(400);
  });
});

it('says plainly what it cannot do instead of doing something else', async () => {
  const copy = new CopyObjectCommand({ Bucket, Key: 'copy', CopySource: `${Bucket}/twice` });
  expect((await refusalOf(s3.send(copy))).name).toBe('NotImplemented');
});
