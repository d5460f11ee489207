import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { application } from '@/db/schema';
import { idSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { loadApplications } from './loadApplications';

export const listApplications = siteVerb({
  act: 'site.read',
  input: z.strictObject({ plotId: idSchema.optional() }),
  run: async ({ tx, siteId, person, input }) => ({
    applications: await loadApplications(
      tx,
      siteId,
      person.id,
      input.plotId ? eq(application.plotId, input.plotId) : undefined,
    ),
  }),
});
