import type { z } from 'zod';
import type { FrozenMaterial } from '@/db/schema';
import { citation, material } from '@/lib/domain/materials';
import { Problem } from '@/lib/errors';
import type { materialSchema } from '@/lib/schemas/applications';

/** A copy of the catalogue entry as it reads today, or what the grower's own label says. */
export function freezeMaterial(input: z.output<typeof materialSchema>): FrozenMaterial {
  if (!('key' in input)) {
    return {
      key: 'own',
      name: input.name,
      reaction: input.reaction,
      affects: input.affects,
      analysis: {},
      source: 'as entered by the grower',
    };
  }
  const found = material(input.key);
  if (!found.ok) {
    throw new Problem('invalid', 'This material is not in the catalogue.', {
      fields: { material: 'Choose a material of the list, or enter your own.' },
    });
  }
  const { key, name, reaction, affects, analysis, source } = found.material;
  return {
    key,
    name,
    reaction,
    affects: [...affects],
    analysis: Object.fromEntries(Object.entries(analysis).map(([part, figure]) => [part, figure.percent])),
    source: citation(source),
  };
}
