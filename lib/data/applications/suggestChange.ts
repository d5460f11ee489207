import { material, suggestIntendedChange } from '@/lib/domain/materials';
import { centimetres, kilograms, squareMetres, toInches } from '@/lib/domain/units';
import { Problem } from '@/lib/errors';
import { suggestChangeInput } from '@/lib/schemas/applications';
import { areaOfPlot } from '../plots/area';
import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { toKg } from './writeApplication';

/** What published rules let this amount be expected to do here, as a range; a refusal says what is missing. */
export const suggestChange = siteVerb({
  act: 'site.read',
  input: suggestChangeInput,
  run: async ({ tx, siteId, input }) => {
    const plotRow = await getPlotInSite(tx, siteId, input.plotId);
    const found = material(input.material);
    if (!found.ok) throw new Problem('invalid', 'This material is not in the catalogue.');
    const areaM2 = input.areaM2 ?? areaOfPlot(plotRow);
    if (areaM2 <= 0) {
      return { suggestions: [], sentence: 'Give the treated area, and the change to expect can be worked out.' };
    }
    const answer = suggestIntendedChange({
      material: found.material,
      amount: kilograms(toKg(input.amount, input.amountUnit)),
      area: squareMetres(areaM2),
      texture: plotRow.texture,
      depth: input.depthCm === undefined ? null : toInches(centimetres(input.depthCm)),
      freeLime: plotRow.freeLimeSeen,
    });
    return answer.ok
      ? { suggestions: [...answer.suggestions], sentence: null }
      : { suggestions: [], sentence: answer.sentence };
  },
});
