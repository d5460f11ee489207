import { route } from '@/app/api/v1/_route';
import { getBatch } from '@/lib/data/batches/getBatch';
import { batchSchema } from '@/lib/schemas/batches';

export const GET = route({ verb: getBatch, answer: batchSchema, summary: 'One batch, file by file' });
