import { uploadRoute } from '@/app/api/v1/_upload';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { LARGEST_UPLOAD_BYTES, uploadAnswerSchema } from '@/lib/schemas/reports';

export const POST = uploadRoute({
  verb: uploadReport,
  answer: uploadAnswerSchema,
  summary: 'Send a report file; the same file sent again is recognised',
  largestBytes: LARGEST_UPLOAD_BYTES,
  status: (result) => (result.kind === 'received' ? 201 : 200),
});
