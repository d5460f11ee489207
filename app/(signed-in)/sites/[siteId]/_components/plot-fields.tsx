import type { TargetList } from '@/lib/schemas/targets';
import { CheckField } from '@/lib/ui/fields/check-field';
import { NumberField } from '@/lib/ui/fields/number-field';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { SelectField } from '@/lib/ui/fields/select-field';
import { TextAreaField } from '@/lib/ui/fields/text-area-field';
import { TextField } from '@/lib/ui/fields/text-field';
import type { LengthUnit } from '@/lib/ui/site-plan/types';
import type { PlotValues } from './plot-values';
import { targetOptions } from './target-options';

type PlotFieldsProps = {
  readonly values: PlotValues;
  readonly unit: LengthUnit;
  readonly year: number;
  readonly targets: TargetList;
  readonly freeShape: boolean;
};

export function PlotFields({ values, unit, year, targets, freeShape }: PlotFieldsProps) {
  const sets = targetOptions(targets, values.targetSetKey, values.cropSetKey);
  const length = { unit, inputMode: 'decimal' as const, autoComplete: 'off' };
  return (
    <>
      <TextField
        name="name"
        label="Name"
        hint="As it stands on your sample bags, so that a report finds its plot."
        autoComplete="off"
        defaultValue={values.name}
      />
      <fieldset className="grid gap-2">
        <legend className="font-semibold">Place and size on the plan</legend>
        <p className="max-w-measure text-sm text-clay">
          {freeShape
            ? 'This plot has a shape of its own: it is moved and stretched as a whole. Its corners are dragged on the plan.'
            : 'From the lower left corner of the plan. Empty: the plot stands in the list and can be drawn later.'}
        </p>
        <div className="grid grid-cols-2 gap-4">
          <TextField name="left" label="From the left" {...length} defaultValue={values.left} />
          <TextField name="bottom" label="From the bottom" {...length} defaultValue={values.bottom} />
          <TextField name="width" label="Width" {...length} defaultValue={values.width} />
          <TextField name="length" label="Length" {...length} defaultValue={values.length} />
        </div>
      </fieldset>
      <NumberField
        name="areaTypedM2"
        label="Area, if you know it better"
        hint="A typed area wins over the plan: paths and corners are yours to leave out. Empty: taken from the plan."
        unit={unit === 'ft' ? 'sq ft' : 'm²'}
        optional
        defaultValue={values.areaTypedM2}
      />
      <TextField
        name="crop"
        label={`Crop of ${year}`}
        hint="What is harvested this year."
        optional
        autoComplete="off"
        defaultValue={values.crop}
      />
      <SelectField
        name="cropSetKey"
        label={`Target set for the crop of ${year}`}
        hint="Only where this crop wants another than the plot."
        optional
        options={sets}
        prompt="As the plot"
        defaultValue={values.cropSetKey}
      />
      <SelectField
        name="targetSetKey"
        label="Target set of the plot"
        hint="The bands its tests are held against. The built-in sets hold published pH bands; your own can hold more."
        optional
        options={sets}
        prompt="None yet"
        defaultValue={values.targetSetKey}
      />
      <RadioGroup
        name="established"
        label="Ground"
        inline
        defaultValue={values.established}
        options={[
          { value: 'yes', label: 'Worked for years' },
          { value: 'no', label: 'New ground' },
        ]}
      />
      <RadioGroup
        name="texture"
        label="Texture"
        hint="Rub a moist pinch: gritty is light, sticky and shiny is heavy. It decides how much lime or sulfur a step of pH takes."
        inline
        defaultValue={values.texture}
        options={[
          { value: '', label: 'Not known' },
          { value: 'light', label: 'Light (sandy)' },
          { value: 'medium', label: 'Medium (loam)' },
          { value: 'heavy', label: 'Heavy (clay)' },
        ]}
      />
      <CheckField
        name="freeLimeSeen"
        label="Free lime was seen"
        hint="A drop of vinegar fizzes on the soil. Sulfur is used up by free lime before pH moves."
        defaultChecked={values.freeLimeSeen === 'on'}
      />
      <TextAreaField name="notes" label="Notes" optional defaultValue={values.notes} />
    </>
  );
}
