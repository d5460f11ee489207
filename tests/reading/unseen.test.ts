import { readFileSync } from 'node:fs';
import { relative } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { ToChild } from '@/lib/jobs/readFile/messages';
import { readBytes } from '@/lib/jobs/readFile/readBytes';
import type { Reading } from '@/lib/reading/types';
import { sniffReport } from '@/lib/services/reading/sniff';
import { f1Of, familyOf, reportsOf, type Score, type Scored, scoreOf, sumOf } from './score';

/**
 * Reports of other hands. Those of `second-hand` may be tuned on; those of `unseen` were made from the trade's forms alone
 * and are never looked at while the reader is worked on. The floors stand a little under what was measured, so that a
 * change that reads unseen pages worse is noticed; the goals stand in the bench.
 */
async function read(scored: Scored): Promise<Reading | null> {
  const bytes = new Uint8Array(readFileSync(scored.path));
  const fileName = scored.wanted.file;
  const sniffed = sniffReport({ bytes, fileName });
  if (!sniffed.ok || sniffed.kind === 'png' || sniffed.kind === 'jpeg') return null;
  const message: ToChild = { kind: sniffed.kind, fileName, bytes };
  return readBytes(message, { page: () => undefined, scans: () => undefined });
}

async function scores(set: string, family: ReturnType<typeof familyOf>): Promise<Score[]> {
  const found: Score[] = [];
  for (const one of reportsOf(set)) {
    if (familyOf(one) !== family) continue;
    const reading = await read(one);
    if (reading !== null) found.push(scoreOf(one.wanted, reading));
  }
  return found;
}

describe('reports of other hands', () => {
  it.each([
    { set: 'second-hand', family: 'text PDF' as const, files: 140, f1: 0.97, sure: 0.99, kinds: 1 },
    { set: 'unseen', family: 'text PDF' as const, files: 12, f1: 0.93, sure: 0.94, kinds: 0.96 },
    { set: 'second-hand', family: 'data file' as const, files: 20, f1: 0.97, sure: 0.99, kinds: 1 },
    { set: 'unseen', family: 'data file' as const, files: 14, f1: 0.95, sure: 0.96, kinds: 0.96 },
  ])('$set: $family', async ({ set, family, files, f1, sure, kinds }) => {
    const found = await scores(set, family);
    const sum = sumOf(found);
    console.info(
      `${relative('.', set)} ${family}: ${sum.files} files, F1 ${f1Of(sum).f1.toFixed(4)}, sure ${sum.sureRight} of ${sum.sure}, kinds ${sum.kinds}`,
    );
    expect(sum.files).toBeGreaterThanOrEqual(files);
    expect(f1Of(sum).f1).toBeGreaterThanOrEqual(f1);
    expect(sum.sureRight / sum.sure).toBeGreaterThanOrEqual(sure);
    expect(sum.kinds / sum.files).toBeGreaterThanOrEqual(kinds);
  });
});
