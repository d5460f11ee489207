import { nothingSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { openDue } from './openDue';

export const listDue = siteVerb({ act: 'site.read', input: nothingSchema, run: openDue });
