'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { Form } from '@/lib/ui/fields/form';
import type { Option } from '@/lib/ui/fields/select-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { type LengthUnit, shownLength, typedMetres } from '../../_components/lengths';
import { PlaceFields, PlanFields } from '../../_components/site-fields';

type Props = {
  unit: LengthUnit;
  countries: readonly Option[];
  country: string;
  zones: readonly Option[];
  zone: string;
};

export function NewSiteForm({ unit, countries, country, zones, zone }: Props) {
  const { send, busy, problem } = useSubmit<{ siteId: string }>();
  const [leaving, setLeaving] = useState(false);
  const router = useRouter();
  const open = async (values: Record<string, string>) => {
    const body = {
      name: values.name,
      country: values.country,
      hemisphere: values.hemisphere,
      timeZone: values.timeZone,
      planWidthM: typedMetres(values.planWidthM, unit),
      planHeightM: typedMetres(values.planHeightM, unit),
    };
    const result = await send('sites', { body });
    if (!result.ok) return;
    setLeaving(true);
    router.push(`/sites/${result.data.siteId}`);
    router.refresh();
  };
  return (
    <Form problem={problem} onSubmit={open}>
      <TextField name="name" label="Name of the site" hint="As its members call it." autoComplete="off" />
      <PlaceFields countries={countries} zones={zones} country={country} zone={zone} hemisphere="north" />
      <PlanFields unit={unit} width={shownLength(40, unit)} height={shownLength(25, unit)} />
      <div>
        <Button type="submit" busy={busy || leaving} busyLabel="Opening">
          Open the site
        </Button>
      </div>
    </Form>
  );
}
