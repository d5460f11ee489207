'use client';

import type { ReactNode } from 'react';
import { ANALYTES } from '@/lib/domain/analytes';
import { noiseClassOf } from '@/lib/domain/effects';
import { MATERIALS, material } from '@/lib/domain/materials';
import { AMOUNT_UNITS, type AmountUnit, KG_PER } from '@/lib/schemas/applications';
import { DateField } from '@/lib/ui/fields/date-field';
import { NumberField } from '@/lib/ui/fields/number-field';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { SelectField } from '@/lib/ui/fields/select-field';
import { TextAreaField } from '@/lib/ui/fields/text-area-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { shortLabel } from '../../_components/history-props';
import { areaText, areaUnit, depthText, depthUnit, OWN, readNumber, toAreaM2, type Units } from './application-body';
import { MaterialFacts } from './material-facts';

export type Start = {
  material: string;
  ownName: string;
  reaction: string;
  affects: readonly string[];
  amount: string;
  amountUnit: AmountUnit;
  appliedOn: string;
  areaM2: number | null;
  depthCm: number | null;
  method: string;
  soilCondition: string;
  note: string;
};

/** What other parts of the form look at while it is filled in. */
export type Watched = {
  material: string;
  reaction: string;
  amount: string;
  amountUnit: string;
  area: string;
  depth: string;
};

export const watchStart = (start: Start, units: Units): Watched => ({
  material: start.material,
  reaction: start.reaction,
  amount: start.amount,
  amountUnit: start.amountUnit,
  area: start.areaM2 === null ? '' : areaText(start.areaM2, units),
  depth: start.depthCm === null ? '' : depthText(start.depthCm, units),
});

const REACTIONS = [
  { value: 'sulfur', label: 'Like sulfur: slowly, by soil life' },
  { value: 'lime', label: 'Like lime: over a year or more' },
  { value: 'soluble-salt', label: 'Like a soluble fertilizer: within weeks' },
  { value: '', label: 'Not known' },
];
const ACTED_ON = ANALYTES.filter(({ key }) => noiseClassOf(key).ok);
const isUnit = (text: string): text is AmountUnit => (AMOUNT_UNITS as readonly string[]).includes(text);

function rateOf({ amount, amountUnit, area }: Watched, areaM2: number | null, units: Units) {
  const kg = readNumber(amount).value;
  const typed = readNumber(area).value;
  const m2 = typed === undefined ? areaM2 : toAreaM2(typed, units);
  if (kg === undefined || kg <= 0 || m2 === null || m2 <= 0 || !isUnit(amountUnit)) return null;
  return { kg: kg * KG_PER[amountUnit], m2 };
}

type ApplicationFieldsProps = {
  start: Start;
  watched: Watched;
  onWatch: (part: Partial<Watched>) => void;
  units: Units;
  today: string;
  plotAreaM2: number | null;
  /** Only where the planned amount can still be told apart: when the record is new. */
  planned?: boolean;
  /** Between the amounts and the circumstances: the change meant. */
  children?: ReactNode;
};

export function ApplicationFields(props: ApplicationFieldsProps) {
  const { start, watched, onWatch, units, today, plotAreaM2, planned = false, children } = props;
  const shown = watchStart(start, units);
  const known = material(watched.material);
  const wholePlot =
    plotAreaM2 === null
      ? 'This plot has no area yet.'
      : `The whole plot is ${areaText(plotAreaM2, units)} ${areaUnit(units)}.`;
  return (
    <div className="@container">
      <div className="grid gap-6 @3xl:grid-cols-[minmax(0,1fr)_minmax(0,24rem)] @3xl:gap-x-8">
        <div className="grid content-start gap-6">
          <SelectField
            name="material"
            label="Material"
            prompt="Choose a material"
            defaultValue={start.material}
            options={[
              ...MATERIALS.map(({ key, name }) => ({ value: key, label: name })),
              { value: OWN, label: 'Something else, named by me' },
            ]}
            onChange={(event) => onWatch({ material: event.currentTarget.value })}
          />
          {watched.material === OWN ? <OwnMaterial start={start} onWatch={onWatch} /> : null}
          <div className="grid items-start gap-5 sm:grid-cols-2">
            <NumberField
              name="amount"
              label="Amount spread"
              defaultValue={start.amount}
              onChange={(event) => onWatch({ amount: event.currentTarget.value })}
            />
            <SelectField
              name="amountUnit"
              label="Weighed in"
              defaultValue={start.amountUnit}
              options={AMOUNT_UNITS.map((unit) => ({ value: unit, label: unit }))}
              onChange={(event) => onWatch({ amountUnit: event.currentTarget.value })}
            />
            <NumberField
              name="areaM2"
              label="Area treated"
              unit={areaUnit(units)}
              hint={wholePlot}
              defaultValue={shown.area}
              onChange={(event) => onWatch({ area: event.currentTarget.value })}
            />
            <NumberField
              name="depthCm"
              label="Worked in to a depth of"
              unit={depthUnit(units)}
              hint="0 when it was left on top."
              optional
              defaultValue={shown.depth}
              onChange={(event) => onWatch({ depth: event.currentTarget.value })}
            />
          </div>
        </div>
        <div className="@3xl:col-start-2 @3xl:row-span-2 @3xl:row-start-1">
          <MaterialFacts
            material={known.ok ? known.material : null}
            rate={rateOf(watched, plotAreaM2, units)}
            units={units}
          />
        </div>
        <div className="grid content-start gap-6">
          {planned ? (
            <NumberField
              name="plannedAmount"
              label="Amount planned, if it was another"
              hint="In the same unit of weight. A plan spread short is then judged by what was really spread."
              optional
            />
          ) : null}
          <DateField name="appliedOn" label="Day" defaultValue={start.appliedOn} max={today} />
          {children}
          <TextField
            name="method"
            label="How it was spread"
            hint="Broadcast and raked in, say, or with a drop spreader."
            optional
            defaultValue={start.method}
          />
          <TextField
            name="soilCondition"
            label="The soil that day"
            hint="Dry, moist, wet; cold or warm."
            optional
            defaultValue={start.soilCondition}
          />
          <TextAreaField name="note" label="Note" optional rows={3} defaultValue={start.note} />
        </div>
      </div>
    </div>
  );
}

function OwnMaterial({ start, onWatch }: Pick<ApplicationFieldsProps, 'start' | 'onWatch'>) {
  return (
    <div className="grid gap-6 border-l-2 border-gley pl-4">
      <TextField name="material.name" label="Name of the material" defaultValue={start.ownName} />
      <RadioGroup
        name="material.reaction"
        label="How it acts"
        hint="It decides when a later test can judge it."
        defaultValue={start.reaction}
        options={REACTIONS}
        onChange={(event) => onWatch({ reaction: event.currentTarget.value })}
      />
      <details open={start.affects.length > 0}>
        <summary className="text-link flex min-h-(--target) items-center font-semibold">What it acts on</summary>
        <fieldset className="grid gap-x-6 sm:grid-cols-2">
          <legend className="pb-1 text-sm text-clay">
            Tests of these are then not mistaken for the work of something else.
          </legend>
          {ACTED_ON.map(({ key, label }) => (
            <label key={key} className="flex min-h-(--target) items-center gap-3">
              <input
                type="checkbox"
                name="material.affects"
                value={key}
                defaultChecked={start.affects.includes(key)}
                className="tick"
              />
              {shortLabel(key, label)}
            </label>
          ))}
        </fieldset>
      </details>
    </div>
  );
}
