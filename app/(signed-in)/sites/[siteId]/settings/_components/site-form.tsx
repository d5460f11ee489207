'use client';

import { useRouter } from 'next/navigation';
import type { Site } from '@/lib/schemas/sites';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { CheckField } from '@/lib/ui/fields/check-field';
import { Form } from '@/lib/ui/fields/form';
import type { Option } from '@/lib/ui/fields/select-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { type LengthUnit, shownLength, typedMetres } from '../../../../_components/lengths';
import { PlaceFields, PlanFields } from '../../../../_components/site-fields';
import { MONTHS } from './months';

type Props = { site: Site; unit: LengthUnit; countries: readonly Option[]; zones: readonly Option[] };

export function SiteForm({ site, unit, countries, zones }: Props) {
  const { send, busy, problem } = useSubmit<Site>();
  const announce = useAnnounce();
  const router = useRouter();
  const width = shownLength(site.planWidthM, unit);
  const height = shownLength(site.planHeightM, unit);
  const save = async (values: Record<string, string>) => {
    const body = {
      name: values.name,
      country: values.country,
      hemisphere: values.hemisphere,
      timeZone: values.timeZone,
      warmMonths: MONTHS.map((_, month) => values[`warm-${month}`] === 'on'),
      // Left alone it is not sent: the rounded number shown must not replace the exact one kept.
      ...(values.planWidthM === width ? {} : { planWidthM: typedMetres(values.planWidthM, unit) }),
      ...(values.planHeightM === height ? {} : { planHeightM: typedMetres(values.planHeightM, unit) }),
    };
    const result = await send(`/sites/${site.id}`, { method: 'PATCH', body });
    if (!result.ok) return;
    announce('The settings of the site are kept.', { tone: 'saved' });
    router.refresh();
  };
  return (
    <Form problem={problem} onSubmit={save}>
      <TextField name="name" label="Name of the site" autoComplete="off" defaultValue={site.name} />
      <PlaceFields
        countries={countries}
        zones={zones}
        country={site.country}
        zone={site.timeZone}
        hemisphere={site.hemisphere}
      />
      <PlanFields unit={unit} width={width} height={height} />
      <fieldset className="grid gap-2">
        <legend className="font-semibold">Warm months</legend>
        <p className="max-w-measure text-sm text-clay">
          Months whose soil is at 13 °C (55 °F) or more on average. Sulfur reacts in these. April to October in the
          north and October to April in the south are assumed; tick what your ground does.
        </p>
        <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-3">
          {MONTHS.map((name, month) => (
            <CheckField
              key={name}
              name={`warm-${month}`}
              label={name}
              defaultChecked={site.warmMonths[month] ?? false}
            />
          ))}
        </div>
      </fieldset>
      <div>
        <Button type="submit" busy={busy} busyLabel="Saving">
          Save the settings
        </Button>
      </div>
    </Form>
  );
}
