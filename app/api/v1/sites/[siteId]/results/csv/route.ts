import { z } from 'zod';
import { contentDisposition } from '@/app/api/v1/_file';
import { route } from '@/app/api/v1/_route';
import { exportResults } from '@/lib/data/results/exportResults';

export const GET = route({
  verb: exportResults,
  answer: z.string(),
  summary: 'Confirmed results as CSV',
  respond: ({ fileName, text }) =>
    new Response(text, {
      headers: {
        'content-type': 'text/csv; charset=utf-8; header=present',
        'content-disposition': contentDisposition('attachment', fileName),
        'x-content-type-options': 'nosniff',
        'cache-control': 'private, no-store',
      },
    }),
});
