import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { HOSTILE } from '@/fixtures/make/hostile';
import { HONEST } from '@/fixtures/make/hostile/pdf';
import { activePdf } from '@/fixtures/make/hostile/pdfTricks';
import { AT_THE_LIMIT } from '@/fixtures/make/hostile/textCases';
import { TIME_LIMIT_MS } from '@/lib/jobs/readFile/limits';
import { readFile } from '@/lib/jobs/readFile/readFile';
import { hasHidden } from '@/lib/reading/plain';
import type { Reading } from '@/lib/reading/types';

/** What happened, what became of the file, what to do next. */
const SENTENCE = /^[A-Z].{30,}\.$/s;
const NEXT = /upload|type the numbers|paste|cut it|save/i;

function everyText(value: unknown): string[] {
  if (typeof value === 'string') return [value];
  if (typeof value !== 'object' || value === null) return [];
  return Object.values(value).flatMap(everyText);
}

const valuesOf = (reading: Reading) =>
  reading.samples.flatMap((sample) => sample.results.map((result) => result.value));

/** Two at a time, as the worker's lanes do; each test waits for its own. */
const LANES = 2;
const lanes: Promise<unknown>[] = Array.from({ length: LANES }, () => Promise.resolve());
function inLane(at: number, run: () => Promise<Reading>): Promise<Reading> {
  const reading = (lanes[at % LANES] ?? Promise.resolve()).then(run);
  lanes[at % LANES] = reading.catch(() => undefined);
  return reading;
}

describe('files made to do harm', () => {
  const cases = HOSTILE.filter((one) => one.minutes !== true).map((one, at) => ({ ...one, at }));
  const readings: Promise<Reading>[] = [];
  beforeAll(() => {
    for (const { at, bytes, fileName, timeLimitMs = TIME_LIMIT_MS } of cases)
      readings.push(inLane(at, async () => readFile({ bytes: await bytes(), fileName, timeLimitMs })));
  });
  it.each(cases)('$name', { timeout: 120_000 }, async ({ at, want }) => {
    const reading = await readings[at];
    if (reading === undefined) throw new Error('It was not read.');
    expect(everyText({ ...reading, file: '' }).filter((text) => hasHidden(text) || text.length > 1_000)).toEqual([]);
    if ('codes' in want) {
      expect(want.codes).toContain(reading.error?.code);
      expect(reading).toMatchObject({ kind: 'refused', samples: [] });
      expect(reading.error?.sentence).toMatch(SENTENCE);
      expect(reading.error?.sentence).toMatch(NEXT);
      return;
    }
    expect(reading.kind).toBe('soil');
    expect(valuesOf(reading)).toEqual(expect.arrayContaining([...want.read]));
    if (want.warns !== undefined) expect(reading.warnings.map((warning) => warning.code)).toContain(want.warns);
  });
});

it('reads a table of exactly as many rows as are taken', { timeout: 60_000 }, async () => {
  const reading = await readFile({ bytes: AT_THE_LIMIT.bytes(), fileName: AT_THE_LIMIT.fileName });
  expect(reading.samples).toHaveLength(AT_THE_LIMIT.samples);
});

describe('a PDF with scripts, launch actions, forms, attachments and outside references', () => {
  const folder = mkdtempSync(join(tmpdir(), 'active-'));
  const marker = join(folder, 'ran');
  const asked: string[] = [];
  let server: Server;
  let origin = '';
  beforeAll(async () => {
    server = createServer((request, response) => {
      asked.push(request.url ?? '');
      response.end('x');
    });
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  });
  afterAll(() => {
    server.close();
    rmSync(folder, { recursive: true, force: true });
  });

  it('is read for its numbers; nothing is run, written or fetched', { timeout: 60_000 }, async () => {
    await fetch(`${origin}/planted`);
    expect(asked).toEqual(['/planted']);
    const reading = await readFile({ bytes: activePdf(origin, marker), fileName: 'active.pdf' });
    expect(valuesOf(reading)).toEqual(HONEST);
    expect(asked).toEqual(['/planted']);
    expect(existsSync(marker)).toBe(false);
  });
});
