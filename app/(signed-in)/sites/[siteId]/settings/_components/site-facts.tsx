import { ROLE_WORDS } from '@/lib/access/words';
import type { Site } from '@/lib/schemas/sites';
import { DefinitionList } from '@/lib/ui/show/definition-list';
import { type LengthUnit, shownLength } from '../../../../_components/lengths';
import { MONTHS } from './months';

type Props = { site: Site; unit: LengthUnit; country: string | undefined };

export function SiteFacts({ site, unit, country }: Props) {
  const warm = MONTHS.filter((_, month) => site.warmMonths[month]);
  return (
    <DefinitionList
      items={[
        { term: 'Name', said: site.name },
        { term: 'Country', said: country ?? site.country },
        { term: 'Half of the earth', said: site.hemisphere === 'north' ? 'North' : 'South' },
        { term: 'Time zone', said: site.timeZone.replaceAll('_', ' ') },
        {
          term: 'Size of the plan',
          said: `${shownLength(site.planWidthM, unit)} by ${shownLength(site.planHeightM, unit)} ${unit}`,
        },
        { term: 'Warm months', said: warm.length > 0 ? warm.join(', ') : 'none' },
        { term: 'You are', said: ROLE_WORDS[site.role].a },
      ]}
    />
  );
}
