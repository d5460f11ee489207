import { NumberField } from '@/lib/ui/fields/number-field';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { type Option, SelectField } from '@/lib/ui/fields/select-field';
import type { LengthUnit } from './lengths';

type PlaceFieldsProps = {
  countries: readonly Option[];
  zones: readonly Option[];
  country: string;
  zone: string;
  hemisphere: 'north' | 'south';
};

/** Where the ground lies: it decides what spring means and when a reminder is due. */
export function PlaceFields({ countries, zones, country, zone, hemisphere }: PlaceFieldsProps) {
  const known = countries.some((option) => option.value === country);
  return (
    <>
      <SelectField
        name="country"
        label="Country"
        options={known ? countries : [...countries, { value: country, label: country }]}
        defaultValue={country}
      />
      <RadioGroup
        name="hemisphere"
        label="Half of the earth"
        hint="So that spring means spring."
        inline
        defaultValue={hemisphere}
        options={[
          { value: 'north', label: 'North' },
          { value: 'south', label: 'South' },
        ]}
      />
      <SelectField name="timeZone" label="Time zone of the site" options={zones} defaultValue={zone} />
    </>
  );
}

export function PlanFields({ unit, width, height }: { unit: LengthUnit; width: string; height: string }) {
  return (
    <fieldset className="grid gap-2">
      <legend className="font-semibold">Size of the plan</legend>
      <p className="max-w-measure text-sm text-clay">
        A rectangle that holds all plots, roughly. The plan is drawn to this scale; it can be changed later.
      </p>
      <div className="grid gap-4 sm:grid-cols-2">
        <NumberField name="planWidthM" label="Left to right" unit={unit} defaultValue={width} />
        <NumberField name="planHeightM" label="Front to back" unit={unit} defaultValue={height} />
      </div>
    </fieldset>
  );
}
