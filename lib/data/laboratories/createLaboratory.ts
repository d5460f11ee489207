import { laboratory } from '@/db/schema';
import { createLaboratoryInput, type Laboratory } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { laboratoryNameOnce } from './laboratoryNameOnce';

export const createLaboratory = siteVerb({
  act: 'ground.edit',
  input: createLaboratoryInput,
  run: async ({ ctx, tx, siteId, input, audit }): Promise<Laboratory> => {
    const [row] = await laboratoryNameOnce(input.name, () =>
      tx.insert(laboratory).values({ siteId, name: input.name, createdAt: ctx.now }).returning(),
    );
    if (!row) throw new Error('The laboratory was not written.');
    await audit({ act: 'laboratory.create', objectKind: 'laboratory', objectId: row.id, detail: { name: row.name } });
    return { id: row.id, name: row.name, otherSpellings: row.otherSpellings };
  },
});
