import { route } from '@/app/api/v1/_route';
import { readAgain } from '@/lib/data/reports/readAgain';
import { reportStateAnswerSchema } from '@/lib/schemas/reports';

export const POST = route({ verb: readAgain, answer: reportStateAnswerSchema, summary: 'Let a file be read again' });
