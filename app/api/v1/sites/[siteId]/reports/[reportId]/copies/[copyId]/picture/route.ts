import { z } from 'zod';
import { fileResponse } from '@/app/api/v1/_file';
import { route } from '@/app/api/v1/_route';
import { getCopyPicture } from '@/lib/data/copies/getCopyFile';

export const GET = route({
  verb: getCopyPicture,
  answer: z.unknown(),
  summary: 'The blacked-out page as a picture',
  respond: fileResponse,
});
