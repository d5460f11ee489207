import { z } from 'zod';
import { fileResponse } from '@/app/api/v1/_file';
import { route } from '@/app/api/v1/_route';
import { getCopyBundle } from '@/lib/data/copies/getCopyFile';

export const GET = route({
  verb: getCopyBundle,
  answer: z.unknown(),
  summary: 'The blacked-out page with what the reader saw, in one archive',
  respond: fileResponse,
});
