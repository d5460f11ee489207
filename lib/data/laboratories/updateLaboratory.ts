import { and, eq } from 'drizzle-orm';
import { laboratory } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { type Laboratory, updateLaboratoryInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { laboratoryNameOnce } from './laboratoryNameOnce';

/** A new name keeps every result where it is; the old name stays known as another spelling when it is listed. */
export const updateLaboratory = siteVerb({
  act: 'ground.edit',
  input: updateLaboratoryInput,
  run: async ({ tx, siteId, input, audit }): Promise<Laboratory> => {
    const [row] = await laboratoryNameOnce(input.name, () =>
      tx
        .update(laboratory)
        .set({ name: input.name, otherSpellings: [...new Set(input.otherSpellings)] })
        .where(and(eq(laboratory.siteId, siteId), eq(laboratory.id, input.laboratoryId)))
        .returning(),
    );
    if (!row) throw notFound();
    await audit({ act: 'laboratory.update', objectKind: 'laboratory', objectId: row.id, detail: { name: row.name } });
    return { id: row.id, name: row.name, otherSpellings: row.otherSpellings };
  },
});
