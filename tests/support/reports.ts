import { randomUUID } from 'node:crypto';
import type { RouteHandler } from '@/app/api/v1/_route';
import type { Reading, ReadResult, ReadSample } from '@/lib/reading/types';

export { problemOf } from './people';

export function readResult(over: Partial<ReadResult> & Pick<ReadResult, 'analyte' | 'printed'>): ReadResult {
  return {
    label: over.analyte,
    value: Number(over.printed),
    qualifier: '=',
    unit: null,
    unitPrinted: null,
    form: null,
    method: null,
    methodPrinted: null,
    rating: null,
    primary: true,
    page: 1,
    box: [0.5, 0.2, 0.55, 0.22],
    cell: null,
    confidence: 0.98,
    doubts: [],
    ...over,
  };
}

export function readSample(over: Partial<ReadSample>): ReadSample {
  return {
    sampleId: null,
    labNumber: null,
    fieldName: null,
    depth: null,
    dateSampled: null,
    dateSampledPrinted: null,
    dateReported: null,
    dateReportedPrinted: null,
    results: [],
    ...over,
  };
}

export function soilReading(samples: readonly ReadSample[], over: Partial<Reading> = {}): Reading {
  return {
    file: 'report.pdf',
    kind: 'soil',
    error: null,
    pages: 1,
    warnings: [],
    lab: { name: 'Marsh Lane Soil Bench' },
    samples,
    recommendations: [],
    ...over,
  };
}

/** The smallest text that calls itself a PDF; each one is other bytes. */
export const pdfBytes = (tag: string = randomUUID()): Uint8Array =>
  new TextEncoder().encode(`%PDF-1.4\n% ${tag}\n%%EOF\n`);

/** Tells the store to misbehave. */
export async function tellStore(orders: Record<string, unknown>): Promise<void> {
  const answer = await fetch(`${process.env.S3_ENDPOINT}/_control`, { method: 'POST', body: JSON.stringify(orders) });
  if (!answer.ok) throw new Error('The store did not take this order.');
}
export const calmStore = () => fetch(`${process.env.S3_ENDPOINT}/_control`, { method: 'DELETE' });

export function call(
  handler: RouteHandler,
  init: RequestInit & { url?: string; cookie?: string },
  params: Record<string, string>,
): Promise<Response> {
  const { url = '/', cookie, ...rest } = init;
  const headers = new Headers(rest.headers);
  if (!headers.has('sec-fetch-site')) headers.set('sec-fetch-site', 'same-origin');
  if (cookie) headers.set('cookie', cookie);
  const request = new Request(new URL(url, process.env.APP_ORIGIN), { ...rest, headers });
  return handler(request, { params: Promise.resolve(params) });
}

export function fileForm(bytes: Uint8Array, name: string, fields: Record<string, string> = {}): FormData {
  const form = new FormData();
  form.set('file', new File([new Uint8Array(bytes)], name));
  for (const [key, value] of Object.entries(fields)) form.set(key, value);
  return form;
}
